using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace ScopeReader.Numerics;

/// <summary>Sums of samples times a tone, the instants t counted from the middle of the record.</summary>
/// <param name="Cosine">Σ y cos(2πft).</param>
/// <param name="Sine">Σ y sin(2πft).</param>
/// <param name="TimeCosine">Σ t y cos(2πft).</param>
/// <param name="TimeSine">Σ t y sin(2πft).</param>
/// <remarks>
/// One pass: blocks are multiplied with one table of the tone, and each block's sum is turned to its place by an exact phase,
/// so that no recurrence gathers rounding errors.
/// </remarks>
public readonly record struct ToneSums(double Cosine, double Sine, double TimeCosine, double TimeSine)
{
    private const int Block = 256, TonesAtOnce = 10;

    /// <summary>The sums over a record.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="frequency">Cycles per sample.</param>
    /// <param name="timed">False to leave the sums with t at zero, in half the time.</param>
    public static ToneSums Of(ReadOnlySpan<double> samples, double frequency, bool timed = true)
    {
        var cosine = new double[Block];
        var sine = new double[Block];
        var timeCosine = new double[Block];
        var timeSine = new double[Block];
        for (int j = 0; j < Block; j++)
        {
            (cosine[j], sine[j]) = Turn.Of(frequency, j);
            (timeCosine[j], timeSine[j]) = (j * cosine[j], j * sine[j]);
        }
        double middle = (samples.Length - 1) / 2.0;
        var total = default(ToneSums);
        for (int start = 0; start < samples.Length; start += Block)
        {
            ReadOnlySpan<double> block = samples.Slice(start, Math.Min(Block, samples.Length - start));
            double c = Dot(block, cosine), s = Dot(block, sine), tc = timed ? Dot(block, timeCosine) : 0, ts = timed ? Dot(block, timeSine) : 0;
            double t = start - middle;
            (double c0, double s0) = Turn.Of(frequency, t);
            double blockCosine = c0 * c - s0 * s, blockSine = s0 * c + c0 * s;
            total = new ToneSums(total.Cosine + blockCosine, total.Sine + blockSine, !timed ? 0 :
                total.TimeCosine + t * blockCosine + c0 * tc - s0 * ts, !timed ? 0 : total.TimeSine + t * blockSine + s0 * tc + c0 * ts);
        }
        return total;
    }

    /// <summary>The sums without t of several tones in one pass over the record.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="frequency">Cycles per sample of the first tone.</param>
    /// <param name="tones">How many: the multiples 1, 2, … of the frequency.</param>
    public static ToneSums[] OfMultiples(ReadOnlySpan<double> samples, double frequency, int tones)
    {
        var totals = new ToneSums[tones];
        // As many at a time as keep their tables in the first cache.
        for (int from = 0; from < tones; from += TonesAtOnce)
            Add(samples, frequency, from, totals.AsSpan(from, Math.Min(TonesAtOnce, tones - from)));
        return totals;
    }

    private static void Add(ReadOnlySpan<double> samples, double frequency, int from, Span<ToneSums> totals)
    {
        double[] cosine = new double[totals.Length * Block], sine = new double[totals.Length * Block];
        for (int tone = 0; tone < totals.Length; tone++)
            for (int j = 0; j < Block; j++)
                (cosine[tone * Block + j], sine[tone * Block + j]) = Turn.Of((from + tone + 1) * frequency, j);
        double middle = (samples.Length - 1) / 2.0;
        for (int start = 0; start < samples.Length; start += Block)
        {
            ReadOnlySpan<double> block = samples.Slice(start, Math.Min(Block, samples.Length - start));
            for (int tone = 0; tone < totals.Length; tone++)
            {
                double c = Dot(block, cosine.AsSpan(tone * Block, Block)), s = Dot(block, sine.AsSpan(tone * Block, Block));
                (double c0, double s0) = Turn.Of((from + tone + 1) * frequency, start - middle);
                totals[tone] = new ToneSums(totals[tone].Cosine + c0 * c - s0 * s, totals[tone].Sine + s0 * c + c0 * s, 0, 0);
            }
        }
    }

    // Four running sums whatever the processor has, so that the last bits do not depend on it.
    private static double Dot(ReadOnlySpan<double> a, ReadOnlySpan<double> b)
    {
        ref double x = ref MemoryMarshal.GetReference(a), y = ref MemoryMarshal.GetReference(b);
        Vector256<double> first = Vector256<double>.Zero, second = Vector256<double>.Zero;
        int i = 0;
        for (; i + 8 <= a.Length; i += 8)
        {
            first += Vector256.LoadUnsafe(ref x, (nuint)i) * Vector256.LoadUnsafe(ref y, (nuint)i);
            second += Vector256.LoadUnsafe(ref x, (nuint)(i + 4)) * Vector256.LoadUnsafe(ref y, (nuint)(i + 4));
        }
        double sum = Vector256.Sum(first + second);
        for (; i < a.Length; i++)
            sum += a[i] * b[i];
        return sum;
    }
}
