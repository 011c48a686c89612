using ScopeReader.Edges;

namespace ScopeReader.Levels;

/// <summary>Picks samples from all over a record, without a beat against the wave.</summary>
internal static class Scattered
{
    private const int StretchLength = 200_000, StretchEdges = 40;

    /// <summary>A copy of at most <paramref name="count"/> samples, in their order: all of them where there are no more.</summary>
    public static double[] Take(ReadOnlySpan<double> samples, int count)
    {
        if (samples.Length <= count)
            return samples.ToArray();
        var taken = new double[count];
        for (int i = 0; i < count; i++)
            taken[i] = samples[Index(i, count, samples.Length)];
        return taken;
    }

    /// <summary>The middle of a long record where that holds edges enough to judge by, else the whole.</summary>
    public static ReadOnlySpan<double> Stretch(ReadOnlySpan<double> samples, double low, double high, double noise)
    {
        if (samples.Length <= StretchLength)
            return samples;
        ReadOnlySpan<double> middle = samples.Slice((samples.Length - StretchLength) / 2, StretchLength);
        return Transitions.Find(middle, low, high, noise).Count >= StretchEdges ? middle : samples;
    }

    /// <summary>Index of pick <paramref name="i"/> of <paramref name="count"/>: somewhere in its own stretch of the record, the same each time.</summary>
    public static int Index(int i, int count, int length)
    {
        double stretch = (double)length / count;
        // An even stride could fall into step with a periodic wave; multiples of the golden ratio spread evenly and never do.
        double within = i * 0.6180339887498949;
        return Math.Min(length - 1, (int)((i + within - Math.Floor(within)) * stretch));
    }
}
