using ScopeReader.Numerics;

namespace ScopeReader.Ringing;

/// <summary>Least-squares fit of a damped sinusoid, its time counted from the first point.</summary>
/// <remarks>
/// Variable projection (Golub and Pereyra 1973, in the form of Kaufman 1975; from memory): for each frequency and decay the
/// linear unknowns are solved for; frequency and decay move by a damped Gauss-Newton step of the whole problem. The covariance
/// is that of the whole problem, so it reaches the Cramér-Rao bound where the noise is white.
/// </remarks>
public sealed class DampedSinusoidFit
{
    private const int MostSteps = 60;

    private readonly double[,] _covariance;

    private DampedSinusoidFit(DampedSinusoid curve, double[,] covariance, double chiSquare, int points) =>
        (Curve, _covariance, ChiSquare, Points) = (curve, covariance, chiSquare, points);

    /// <summary>The fitted curve; its time 0 is that of the first point.</summary>
    public DampedSinusoid Curve { get; }

    /// <summary>Sum of squared residuals, each over its variance.</summary>
    public double ChiSquare { get; }

    /// <summary>How many points were fitted.</summary>
    public int Points { get; }

    /// <summary>Points less unknowns.</summary>
    public int DegreesOfFreedom => Points - DampedSinusoid.Unknowns;

    /// <summary>Sum of squared residuals over degrees of freedom: 1 where the points' variances are right and the curve fits.</summary>
    public double ReducedChiSquare => ChiSquare / DegreesOfFreedom;

    /// <summary>Fits from a start.</summary>
    /// <param name="times">Shape [n], rising, n above 5.</param>
    /// <param name="values">Shape [n].</param>
    /// <param name="variances">Shape [n], above 0.</param>
    /// <param name="frequency">Start of the frequency, cycles per unit of time; within about half a cycle over the points.</param>
    /// <param name="decay">Start of the decay, 1 per unit of time.</param>
    /// <returns>Null where the points do not determine the curve.</returns>
    public static DampedSinusoidFit? From(ReadOnlySpan<double> times, ReadOnlySpan<double> values, ReadOnlySpan<double> variances, double frequency, double decay)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(frequency);
        if (times.Length <= DampedSinusoid.Unknowns)
            return null;
        var equations = new NormalEquations(DampedSinusoid.Unknowns);
        var linear = new NormalEquations(3);
        if (Project(times, values, variances, frequency, decay, linear) is not { } best)
            return null;
        double damping = 1e-3, span = times[^1] - times[0];
        for (int step = 0; step < MostSteps; step++)
        {
            Accumulate(times, values, variances, best.Curve, equations);
            if (equations.Factor(damping) is not { } factor)
                return null;
            double[] move = equations.Solve(factor);
            double f = best.Curve.Frequency + move[0], a = best.Curve.Decay + move[1];
            // Beyond these a curve over this span is no sinusoid, or has grown out of all bounds.
            bool isSane = f > 0.02 / span && a > -3 / span && a < 50 * f;
            if (isSane && Project(times, values, variances, f, a, linear) is { } next && next.ChiSquare <= best.ChiSquare)
            {
                bool done = Math.Abs(move[0]) < 1e-13 * f && Math.Abs(move[1]) < 1e-13 * f || best.ChiSquare - next.ChiSquare < 1e-10 * next.ChiSquare;
                (best, damping) = (next, damping / 10);
                if (done)
                    break;
            }
            else if (damping > 1e6)
                break;
            else
                damping = Math.Max(damping * 10, 1e-6);
        }
        return Covariance(times, variances, best.Curve) is { } covariance ? new DampedSinusoidFit(best.Curve, covariance, best.ChiSquare, times.Length) : null;
    }

    /// <summary>Covariances of f, α, Cosine, Sine and Offset that points of such variances allow: the Cramér-Rao bound.</summary>
    /// <param name="times">Shape [n], counted from the first.</param>
    /// <param name="variances">Shape [n], above 0.</param>
    /// <param name="curve">The curve.</param>
    /// <returns>Shape [5, 5]; null where the points do not determine the curve.</returns>
    public static double[,]? Covariance(ReadOnlySpan<double> times, ReadOnlySpan<double> variances, DampedSinusoid curve)
    {
        var equations = new NormalEquations(DampedSinusoid.Unknowns);
        Span<double> row = stackalloc double[DampedSinusoid.Unknowns];
        for (int i = 0; i < times.Length; i++)
        {
            curve.Gradient(times[i] - times[0], row);
            equations.Add(row, 0, 1 / variances[i]);
        }
        if (equations.Factor() is not { } factor)
            return null;
        var covariance = new double[DampedSinusoid.Unknowns, DampedSinusoid.Unknowns];
        for (int i = 0; i < DampedSinusoid.Unknowns; i++)
        {
            double[] column = equations.Covariances(factor, i);
            for (int j = 0; j < DampedSinusoid.Unknowns; j++)
                covariance[i, j] = column[j];
        }
        return covariance;
    }

    /// <summary>Standard uncertainty of a function of the unknowns.</summary>
    /// <param name="gradient">Shape [5]: its change with f, α, Cosine, Sine and Offset.</param>
    public double Uncertainty(ReadOnlySpan<double> gradient)
    {
        double variance = 0;
        for (int i = 0; i < DampedSinusoid.Unknowns; i++)
            for (int j = 0; j < DampedSinusoid.Unknowns; j++)
                variance += gradient[i] * gradient[j] * _covariance[i, j];
        return Math.Sqrt(Math.Max(0, variance));
    }

    private static (DampedSinusoid Curve, double ChiSquare)? Project(ReadOnlySpan<double> times, ReadOnlySpan<double> values, ReadOnlySpan<double> variances,
        double frequency, double decay, NormalEquations linear)
    {
        linear.Clear();
        Span<double> row = stackalloc double[DampedSinusoid.Unknowns];
        var shape = new DampedSinusoid(frequency, decay, 0, 0, 0);
        for (int i = 0; i < times.Length; i++)
        {
            shape.Gradient(times[i] - times[0], row);
            linear.Add(row[2..], values[i], 1 / variances[i]);
        }
        if (linear.Factor() is not { } factor)
            return null;
        double[] x = linear.Solve(factor);
        var curve = new DampedSinusoid(frequency, decay, x[0], x[1], x[2]);
        double chiSquare = 0;
        for (int i = 0; i < times.Length; i++)
        {
            double residual = values[i] - curve.At(times[i] - times[0]);
            chiSquare += residual * residual / variances[i];
        }
        return (curve, chiSquare);
    }

    private static void Accumulate(ReadOnlySpan<double> times, ReadOnlySpan<double> values, ReadOnlySpan<double> variances, DampedSinusoid curve, NormalEquations equations)
    {
        equations.Clear();
        Span<double> row = stackalloc double[DampedSinusoid.Unknowns];
        for (int i = 0; i < times.Length; i++)
        {
            curve.Gradient(times[i] - times[0], row);
            equations.Add(row, values[i] - curve.At(times[i] - times[0]), 1 / variances[i]);
        }
    }
}
