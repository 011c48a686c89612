using ScopeReader.Numerics;

namespace ScopeReader.Ringing;

/// <summary>Least-squares fit of one or more damped sinusoids on a level, their time counted from the first point.</summary>
/// <remarks>
/// Variable projection (Golub and Pereyra 1973, in the form of Kaufman 1975; from memory): for each frequency and decay the
/// linear unknowns are solved for; frequency and decay move by a damped Gauss-Newton step of the whole problem. The covariance
/// is that of the whole problem, so it reaches the Cramér-Rao bound where the noise is white.
/// </remarks>
public sealed class DampedSinusoidFit
{
    private const int MostSteps = 60, PerMode = DampedSinusoid.Unknowns - 1;

    private readonly double[,] _covariance;

    private DampedSinusoidFit(DampedSinusoid[] modes, double[,] covariance, double chiSquare, int points) =>
        (Modes, _covariance, ChiSquare, Points) = (modes, covariance, chiSquare, points);

    /// <summary>The first of the modes; its time 0 is that of the first point, its offset that of all.</summary>
    public DampedSinusoid Curve => Modes[0];

    /// <summary>The damped sinusoids in the order of their starts; the first has the offset.</summary>
    public IReadOnlyList<DampedSinusoid> Modes { get; }

    /// <summary>Sum of squared residuals, each over its variance.</summary>
    public double ChiSquare { get; }

    /// <summary>How many points were fitted.</summary>
    public int Points { get; }

    /// <summary>How many unknowns it has: four a mode and the offset.</summary>
    public int Unknowns => PerMode * Modes.Count + 1;

    /// <summary>Points less unknowns.</summary>
    public int DegreesOfFreedom => Points - Unknowns;

    /// <summary>Sum of squared residuals over degrees of freedom: 1 where the points' variances are right and the curve fits.</summary>
    public double ReducedChiSquare => ChiSquare / DegreesOfFreedom;

    /// <summary>Value at a time, all modes.</summary>
    public double At(double time) => At(Modes, time);

    /// <summary>Fits one from a start.</summary>
    /// <param name="times">Shape [n], rising, n above 5.</param>
    /// <param name="values">Shape [n].</param>
    /// <param name="variances">Shape [n], above 0.</param>
    /// <param name="frequency">Start of the frequency, cycles per unit of time; within about half a cycle over the points.</param>
    /// <param name="decay">Start of the decay, 1 per unit of time.</param>
    /// <returns>Null where the points do not determine the curve.</returns>
    public static DampedSinusoidFit? From(ReadOnlySpan<double> times, ReadOnlySpan<double> values, ReadOnlySpan<double> variances, double frequency, double decay) =>
        From(times, values, variances, [(frequency, decay)]);

    /// <summary>Fits several from their starts.</summary>
    /// <param name="times">Shape [n], rising, n above four times the modes and one.</param>
    /// <param name="values">Shape [n].</param>
    /// <param name="variances">Shape [n], above 0.</param>
    /// <param name="starts">Frequency and decay of each.</param>
    /// <returns>Null where the points do not determine the curves.</returns>
    public static DampedSinusoidFit? From(ReadOnlySpan<double> times, ReadOnlySpan<double> values, ReadOnlySpan<double> variances, ReadOnlySpan<(double Frequency, double Decay)> starts)
    {
        foreach (var (frequency, _) in starts)
            ArgumentOutOfRangeException.ThrowIfNegativeOrZero(frequency, nameof(starts));
        int unknowns = PerMode * starts.Length + 1;
        if (times.Length <= unknowns)
            return null;
        var equations = new NormalEquations(unknowns);
        var linear = new NormalEquations(2 * starts.Length + 1);
        if (Project(times, values, variances, starts, linear) is not { } best)
            return null;
        double damping = 1e-3, span = times[^1] - times[0];
        var next = new (double Frequency, double Decay)[starts.Length];
        for (int step = 0; step < MostSteps; step++)
        {
            Accumulate(times, values, variances, best.Modes, equations);
            if (equations.Factor(damping) is not { } factor)
                return null;
            double[] move = equations.Solve(factor);
            bool isSane = true, isDone = true;
            for (int m = 0; m < next.Length; m++)
            {
                double df = move[PerMode * m], da = move[PerMode * m + 1], f = best.Modes[m].Frequency + df, a = best.Modes[m].Decay + da;
                next[m] = (f, a);
                // Beyond these a curve over this span is no sinusoid, or has grown out of all bounds.
                isSane &= f > 0.02 / span && a > -3 / span && a < 50 * f;
                isDone &= Math.Abs(df) < 1e-13 * f && Math.Abs(da) < 1e-13 * f;
            }
            if (isSane && Project(times, values, variances, next, linear) is { } found && found.ChiSquare <= best.ChiSquare)
            {
                isDone |= best.ChiSquare - found.ChiSquare < 1e-10 * found.ChiSquare;
                (best, damping) = (found, damping / 10);
                if (isDone)
                    break;
            }
            else if (damping > 1e6)
                break;
            else
                damping = Math.Max(damping * 10, 1e-6);
        }
        return Covariance(times, variances, best.Modes) is { } covariance ? new DampedSinusoidFit(best.Modes, covariance, best.ChiSquare, times.Length) : null;
    }

    /// <summary>Fits one without a start.</summary>
    /// <param name="times">Shape [n], rising, n of 12 or more.</param>
    /// <param name="values">Shape [n].</param>
    /// <param name="variances">Shape [n], above 0.</param>
    /// <returns>Null where the points show none.</returns>
    public static DampedSinusoidFit? Find(double[] times, double[] values, double[] variances) => RingingSearch.One(new RingingWindow(times, values, variances));

    /// <summary>Covariances of f, α, Cosine, Sine and Offset that points of such variances allow: the Cramér-Rao bound.</summary>
    /// <param name="times">Shape [n], counted from the first.</param>
    /// <param name="variances">Shape [n], above 0.</param>
    /// <param name="curve">The curve.</param>
    /// <returns>Shape [5, 5]; null where the points do not determine the curve.</returns>
    public static double[,]? Covariance(ReadOnlySpan<double> times, ReadOnlySpan<double> variances, DampedSinusoid curve) => Covariance(times, variances, [curve]);

    /// <summary>Standard uncertainty of a function of one mode's unknowns.</summary>
    /// <param name="gradient">Shape [4 or more]: its change with the mode's f, α, Cosine and Sine; with one mode also Offset.</param>
    /// <param name="mode">Which mode.</param>
    public double Uncertainty(ReadOnlySpan<double> gradient, int mode = 0)
    {
        int first = PerMode * mode, count = Modes.Count == 1 ? gradient.Length : PerMode;
        double variance = 0;
        for (int i = 0; i < count; i++)
            for (int j = 0; j < count; j++)
                variance += gradient[i] * gradient[j] * _covariance[first + i, first + j];
        return Math.Sqrt(Math.Max(0, variance));
    }

    private static double At(IReadOnlyList<DampedSinusoid> modes, double time)
    {
        double value = 0;
        foreach (DampedSinusoid mode in modes)
            value += mode.At(time);
        return value;
    }

    private static double[,]? Covariance(ReadOnlySpan<double> times, ReadOnlySpan<double> variances, DampedSinusoid[] modes)
    {
        int unknowns = PerMode * modes.Length + 1;
        var equations = new NormalEquations(unknowns);
        Span<double> row = stackalloc double[unknowns];
        for (int i = 0; i < times.Length; i++)
        {
            Gradient(modes, times[i] - times[0], row);
            equations.Add(row, 0, 1 / variances[i]);
        }
        if (equations.Factor() is not { } factor)
            return null;
        var covariance = new double[unknowns, unknowns];
        for (int i = 0; i < unknowns; i++)
        {
            double[] column = equations.Covariances(factor, i);
            for (int j = 0; j < unknowns; j++)
                covariance[i, j] = column[j];
        }
        return covariance;
    }

    private static void Gradient(DampedSinusoid[] modes, double time, Span<double> row)
    {
        Span<double> one = stackalloc double[DampedSinusoid.Unknowns];
        for (int m = 0; m < modes.Length; m++)
        {
            modes[m].Gradient(time, one);
            one[..PerMode].CopyTo(row[(PerMode * m)..]);
        }
        row[^1] = 1;
    }

    private static (DampedSinusoid[] Modes, double ChiSquare)? Project(ReadOnlySpan<double> times, ReadOnlySpan<double> values, ReadOnlySpan<double> variances,
        ReadOnlySpan<(double Frequency, double Decay)> shapes, NormalEquations linear)
    {
        linear.Clear();
        Span<double> row = stackalloc double[2 * shapes.Length + 1], one = stackalloc double[DampedSinusoid.Unknowns];
        for (int i = 0; i < times.Length; i++)
        {
            for (int m = 0; m < shapes.Length; m++)
            {
                new DampedSinusoid(shapes[m].Frequency, shapes[m].Decay, 0, 0, 0).Gradient(times[i] - times[0], one);
                (row[2 * m], row[2 * m + 1]) = (one[2], one[3]);
            }
            row[^1] = 1;
            linear.Add(row, values[i], 1 / variances[i]);
        }
        if (linear.Factor() is not { } factor)
            return null;
        double[] x = linear.Solve(factor);
        var modes = new DampedSinusoid[shapes.Length];
        for (int m = 0; m < modes.Length; m++)
            modes[m] = new DampedSinusoid(shapes[m].Frequency, shapes[m].Decay, x[2 * m], x[2 * m + 1], m == 0 ? x[^1] : 0);
        double chiSquare = 0;
        for (int i = 0; i < times.Length; i++)
        {
            double residual = values[i] - At(modes, times[i] - times[0]);
            chiSquare += residual * residual / variances[i];
        }
        return (modes, chiSquare);
    }

    private static void Accumulate(ReadOnlySpan<double> times, ReadOnlySpan<double> values, ReadOnlySpan<double> variances, DampedSinusoid[] modes, NormalEquations equations)
    {
        equations.Clear();
        Span<double> row = stackalloc double[PerMode * modes.Length + 1];
        for (int i = 0; i < times.Length; i++)
        {
            Gradient(modes, times[i] - times[0], row);
            equations.Add(row, values[i] - At(modes, times[i] - times[0]), 1 / variances[i]);
        }
    }
}
