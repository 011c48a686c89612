using ScopeReader.Numerics;

namespace ScopeReader.Edges;

/// <summary>How the samples of an averaged edge scatter, ringing and droop left out; of the step.</summary>
/// <param name="Scatter">Rms scatter of samples taken at the same time after their edges.</param>
/// <param name="CodeError">Rms of the converter's rounding that averaging such samples does not remove.</param>
internal readonly record struct EdgeNoise(double Scatter, double CodeError)
{
    private const int MostPlaces = 64, FewestPoints = 9, FewestRepeats = 200;

    private const double StatesOverLocal = 0.8;

    /// <summary>Estimates both.</summary>
    /// <param name="times">Shape [points], samples.</param>
    /// <param name="values">Shape [points], of the step.</param>
    /// <param name="counts">Shape [points].</param>
    /// <param name="squares">Shape [points]: sum of squared distances of a point's samples from their mean.</param>
    /// <param name="duration">About the transition duration, samples.</param>
    /// <param name="states">Rms noise of the states: ringing and droop on them make it too large.</param>
    /// <param name="step">The converter's step; 0 where none shows.</param>
    public static EdgeNoise Of(ReadOnlySpan<double> times, ReadOnlySpan<double> values, ReadOnlySpan<double> counts, ReadOnlySpan<double> squares,
        double duration, double states, double step)
    {
        double scatter = Repeats(times, counts, squares, duration, step > 0) is { } repeats ? Math.Min(states, repeats) : states;
        // The local estimate rests on few samples: it counts where the states show clearly more, which is then no noise.
        if (scatter == states && Local(times, values, counts, duration) is { } local && local < StatesOverLocal * states)
            scatter = local;
        if (step == 0)
            return new EdgeNoise(scatter, 0);
        // Variance of rounded samples of noise s about a value anywhere between codes, in steps: s/√π while s is small (a code
        // flips only near a boundary), s² + 1/12 once the noise spreads over codes. The two meet at s = 0.3.
        double v = scatter * scatter / (step * step), noise = v < 0.172 ? v * Math.Sqrt(Math.PI) : Math.Sqrt(v - 1.0 / 12);
        // First harmonic of the rounding error as a function of the value, under Gaussian noise: what dither leaves of it.
        return new EdgeNoise(scatter, step / Math.Sqrt(12) * Math.Exp(-2 * Math.PI * Math.PI * noise * noise));
    }

    // Samples that share a cell, from the last quarter of the points, where ringing no longer moves within a cell. A state that
    // lies on the boundary of two codes flips at the least noise, so of two states the one that scatters less counts.
    private static double? Repeats(ReadOnlySpan<double> times, ReadOnlySpan<double> counts, ReadOnlySpan<double> squares, double duration, bool isCoded)
    {
        int late = IndexAt(times, Math.Max(2 * duration, 0.75 * times[^1])), early = IndexAt(times, -2 * duration);
        double? after = Pooled(counts[late..], squares[late..]), before = Pooled(counts[..early], squares[..early]);
        return isCoded && before < after ? before : after;
    }

    private static double? Pooled(ReadOnlySpan<double> counts, ReadOnlySpan<double> squares)
    {
        double sum = 0, freedom = 0;
        for (int i = 0; i < counts.Length; i++)
        {
            if (counts[i] < 2)
                continue;
            sum += squares[i];
            freedom += counts[i] - 1;
        }
        return freedom >= FewestRepeats ? Math.Sqrt(sum / freedom) : null;
    }

    // Samples about local curves: median over windows after the edge, each as short as holds a cubic with some to spare.
    private static double? Local(ReadOnlySpan<double> times, ReadOnlySpan<double> values, ReadOnlySpan<double> counts, double duration)
    {
        var variances = new List<double>(MostPlaces);
        var equations = new NormalEquations(4);
        double from = 2 * duration, step = Math.Max((times[^1] - from) / MostPlaces, duration / 4);
        int end = 0;
        for (double centre = from; centre < times[^1]; centre += step)
        {
            int first = IndexAt(times, centre);
            double halfWidth = duration / 4;
            do
            {
                end = IndexAt(times, centre + 2 * halfWidth);
                halfWidth *= 1.3;
            }
            while (end - first < FewestPoints && end < times.Length);
            if (end - first >= FewestPoints && Variance(times[first..end], values[first..end], counts[first..end], equations) is { } variance)
                variances.Add(variance);
        }
        if (variances.Count < 3)
            return null;
        variances.Sort();
        return Math.Sqrt(variances[variances.Count / 2]);
    }

    // Variance of one sample from the residuals of a cubic; a median of such variances is low by (1 − 2/9ν)³.
    private static double? Variance(ReadOnlySpan<double> times, ReadOnlySpan<double> values, ReadOnlySpan<double> counts, NormalEquations equations)
    {
        equations.Clear();
        Span<double> row = stackalloc double[4];
        double middle = (times[0] + times[^1]) / 2, half = (times[^1] - times[0]) / 2;
        for (int i = 0; i < times.Length; i++)
        {
            Powers(row, (times[i] - middle) / half);
            equations.Add(row, values[i], counts[i]);
        }
        if (equations.Factor() is not { } factor)
            return null;
        double[] c = equations.Solve(factor);
        double sum = 0;
        for (int i = 0; i < times.Length; i++)
        {
            Powers(row, (times[i] - middle) / half);
            double residual = values[i] - (c[0] * row[0] + c[1] * row[1] + c[2] * row[2] + c[3] * row[3]);
            sum += counts[i] * residual * residual;
        }
        double freedom = times.Length - 4;
        return sum / freedom / Math.Pow(1 - 2 / (9 * freedom), 3);
    }

    private static void Powers(Span<double> row, double x) => (row[0], row[1], row[2], row[3]) = (1, x, x * x, x * x * x);

    private static int IndexAt(ReadOnlySpan<double> times, double time)
    {
        int index = times.BinarySearch(time);
        return index < 0 ? ~index : index;
    }
}
