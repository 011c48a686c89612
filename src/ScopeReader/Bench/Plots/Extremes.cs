namespace ScopeReader.Bench.Plots;

/// <summary>The smallest and largest value of any stretch of a record, at a cost that does not grow with the stretch.</summary>
/// <remarks>
/// Groups of 16 samples, groups of 16 of those, and so on: an eighth of the record's memory. A stretch is made of a few
/// hundred values at most, so that a single-sample glitch in ten million is still drawn, and in its place. The samples
/// are lent at each call: they stay where the capture has them.
/// </remarks>
internal sealed class Extremes
{
    private const int Group = 16;
    private readonly double[][] _smallest, _largest;

    /// <summary>Goes through the record once.</summary>
    public Extremes(ReadOnlySpan<double> record)
    {
        var smallest = new List<double[]>();
        var largest = new List<double[]>();
        ReadOnlySpan<double> low = record, high = record;
        while (low.Length > Group)
        {
            int groups = (low.Length + Group - 1) / Group;
            double[] lows = new double[groups], highs = new double[groups];
            for (int g = 0; g < groups; g++)
            {
                (double a, double b) = (double.PositiveInfinity, double.NegativeInfinity);
                Scan(low, high, g * Group, Math.Min(low.Length, (g + 1) * Group), ref a, ref b);
                (lows[g], highs[g]) = (a, b);
            }
            smallest.Add(lows);
            largest.Add(highs);
            low = lows;
            high = highs;
        }
        (_smallest, _largest) = ([.. smallest], [.. largest]);
    }

    /// <summary>Smallest and largest value of samples <paramref name="start"/> to before <paramref name="end"/>.</summary>
    /// <param name="record">The record that this was made from.</param>
    /// <param name="start">Index of the first sample.</param>
    /// <param name="end">Index after the last; above <paramref name="start"/>, in range.</param>
    public (double Smallest, double Largest) Of(ReadOnlySpan<double> record, int start, int end)
    {
        (double a, double b) = (double.PositiveInfinity, double.NegativeInfinity);
        ReadOnlySpan<double> low = record, high = record;
        for (int level = 0; ; level++)
        {
            int first = (start + Group - 1) / Group, last = end / Group;
            if (level == _smallest.Length || first >= last)
            {
                Scan(low, high, start, end, ref a, ref b);
                return (a, b);
            }
            // What sticks out at both ends, then the whole groups one level up.
            Scan(low, high, start, first * Group, ref a, ref b);
            Scan(low, high, last * Group, end, ref a, ref b);
            (start, end) = (first, last);
            low = _smallest[level];
            high = _largest[level];
        }
    }

    private static void Scan(ReadOnlySpan<double> low, ReadOnlySpan<double> high, int start, int end, ref double smallest, ref double largest)
    {
        for (int i = start; i < end; i++)
        {
            if (low[i] < smallest)
                smallest = low[i];
            if (high[i] > largest)
                largest = high[i];
        }
    }
}
