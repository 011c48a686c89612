namespace ScopeReader.Files.Axes;

/// <summary>Cuts a column of times that is not evenly spaced as a whole where it falls back and where it jumps.</summary>
internal static class Pieces
{
    private const int Most = 10_000;
    private const double GapSteps = 1.5, SingleUlp = 1.0 / (1 << 24);

    /// <summary>The stretches between falls and gaps.</summary>
    /// <param name="times">Shape [n], as printed; NaN where one is missing.</param>
    /// <param name="half">Half of the last printed digit.</param>
    /// <returns>Null where there would be too many.</returns>
    public static List<Piece>? Of(ReadOnlySpan<double> times, double half)
    {
        var pieces = new List<Piece>();
        int start = 0;
        for (int i = 1; i <= times.Length; i++)
        {
            if (i < times.Length && !(times[i] < times[i - 1] - 2 * half) && !double.IsNaN(times[i]) && !double.IsNaN(times[i - 1]))
                continue;
            if (!double.IsNaN(times[start]))
                AddBetweenGaps(pieces, times, start, i - start, half);
            start = i;
            if (pieces.Count > Most)
                return null;
        }
        return pieces;
    }

    /// <summary>The spacing of a stretch, as if printed to a last digit or kept in single precision; null where it has none.</summary>
    public static Spacing? SpacingOf(ReadOnlySpan<double> times, double half)
    {
        Spacing? spacing = Fitted(times, half, 0).Fit();
        return spacing ?? Fitted(times, half, SingleUlp).Fit();
    }

    /// <summary>The nearest even spacing of a stretch.</summary>
    public static Spacing NearestOf(ReadOnlySpan<double> times, double half) => Fitted(times, half, 0).Nearest();

    private static SpacingFit Fitted(ReadOnlySpan<double> times, double half, double relative)
    {
        var fit = new SpacingFit();
        for (int i = 0; i < times.Length; i++)
            fit.Add(i, times[i], Math.Max(half, relative * Math.Abs(times[i])));
        return fit;
    }

    private static void AddBetweenGaps(List<Piece> pieces, ReadOnlySpan<double> times, int first, int length, double half)
    {
        ReadOnlySpan<double> stretch = times.Slice(first, length);
        Spacing? spacing = length > 1 ? SpacingOf(stretch, half) : null;
        if (spacing is not null || length < 4)
        {
            pieces.Add(new Piece(first, length, spacing));
            return;
        }
        double gap = GapSteps * MedianStep(stretch) + 2 * half;
        int start = 0;
        for (int i = 1; i <= length; i++)
        {
            if (i < length && stretch[i] - stretch[i - 1] <= gap)
                continue;
            pieces.Add(new Piece(first + start, i - start, i - start > 1 ? SpacingOf(stretch[start..i], half) : null));
            start = i;
            if (pieces.Count > Most)
                return;
        }
    }

    private static double MedianStep(ReadOnlySpan<double> times)
    {
        double[] steps = new double[times.Length - 1];
        for (int i = 0; i < steps.Length; i++)
            steps[i] = times[i + 1] - times[i];
        Array.Sort(steps);
        return steps[steps.Length / 2];
    }
}
