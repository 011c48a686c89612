namespace ScopeReader.Files.Axes;

/// <summary>Times that stand twice each: with the lowest and with the highest sample of every interval, as peak detection is saved.</summary>
internal static class TimePairs
{
    private const int Fewest = 3;

    /// <summary>The spacing from pair to pair; null where the times are no pairs.</summary>
    /// <param name="times">Shape [n], as printed; NaN where one is missing.</param>
    /// <param name="half">Half of the widest last digit.</param>
    public static Spacing? Of(ReadOnlySpan<double> times, double half)
    {
        // A file that breaks off may end in half a pair.
        double[] single = new double[times.Length / 2];
        for (int k = 0; k < single.Length; k++)
        {
            if (times[2 * k] != times[2 * k + 1])
                return null;
            single[k] = times[2 * k];
        }
        return single.Length >= Fewest ? Pieces.SpacingOf(single, half) : null;
    }
}
