using System.Numerics;
using System.Runtime.InteropServices;

namespace ScopeReader.Files;

/// <summary>The extremes of samples, and how many samples lie on them.</summary>
/// <param name="Minimum">The smallest.</param>
/// <param name="Maximum">The largest.</param>
/// <param name="AtMinimum">How many are the smallest.</param>
/// <param name="AtMaximum">How many are the largest.</param>
internal readonly record struct SampleRange(double Minimum, double Maximum, int AtMinimum, int AtMaximum)
{
    // A stretch stays in the nearest cache while it is counted; a chunk is worth a core.
    private const int Stretch = 2048, Chunk = 1 << 19;

    private static readonly SampleRange s_none = new(double.PositiveInfinity, double.NegativeInfinity, 0, 0);

    /// <summary>The extremes of samples, in one pass over the cores; the same for any number of them.</summary>
    /// <param name="samples">Shape [n], none of them NaN.</param>
    public static SampleRange Of(ReadOnlyMemory<double> samples)
    {
        int chunks = (samples.Length + Chunk - 1) / Chunk;
        if (chunks <= 1)
            return OfChunk(samples.Span);
        var found = new SampleRange[chunks];
        Parallel.For(0, chunks, k => found[k] = OfChunk(samples.Span.Slice(k * Chunk, Math.Min(Chunk, samples.Length - k * Chunk))));
        return found.Aggregate(s_none, (all, part) => all.And(part));
    }

    private static SampleRange OfChunk(ReadOnlySpan<double> samples)
    {
        SampleRange all = s_none;
        for (; !samples.IsEmpty; samples = samples[Math.Min(Stretch, samples.Length)..])
        {
            ReadOnlySpan<double> stretch = samples[..Math.Min(Stretch, samples.Length)];
            (double minimum, double maximum) = Ends(stretch);
            all = all.And(new SampleRange(minimum, maximum, minimum <= all.Minimum ? CountOf(stretch, minimum) : 0, maximum >= all.Maximum ? CountOf(stretch, maximum) : 0));
        }
        return all;
    }

    /// <summary>How many of the values are this one, to the bit.</summary>
    public static int CountOf(ReadOnlySpan<double> values, double value) => MemoryMarshal.Cast<double, long>(values).Count(BitConverter.DoubleToInt64Bits(value));

    private SampleRange And(SampleRange other) => new(
        Math.Min(Minimum, other.Minimum),
        Math.Max(Maximum, other.Maximum),
        (Minimum <= other.Minimum ? AtMinimum : 0) + (other.Minimum <= Minimum ? other.AtMinimum : 0),
        (Maximum >= other.Maximum ? AtMaximum : 0) + (other.Maximum >= Maximum ? other.AtMaximum : 0));

    private static (double Minimum, double Maximum) Ends(ReadOnlySpan<double> values)
    {
        double minimum = double.PositiveInfinity, maximum = double.NegativeInfinity;
        ReadOnlySpan<Vector<double>> wide = MemoryMarshal.Cast<double, Vector<double>>(values);
        if (wide.Length > 0)
        {
            Vector<double> low = wide[0], high = wide[0];
            foreach (Vector<double> v in wide)
                (low, high) = (Vector.Min(low, v), Vector.Max(high, v));
            for (int i = 0; i < Vector<double>.Count; i++)
                (minimum, maximum) = (Math.Min(minimum, low[i]), Math.Max(maximum, high[i]));
        }
        foreach (double v in values[(wide.Length * Vector<double>.Count)..])
            (minimum, maximum) = (Math.Min(minimum, v), Math.Max(maximum, v));
        return (minimum, maximum);
    }
}
