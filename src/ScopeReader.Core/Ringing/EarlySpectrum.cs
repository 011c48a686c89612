using ScopeReader.Numerics;

namespace ScopeReader.Ringing;

/// <summary>The spectrum of what the levels have in common just after their edges, where ringing that dies at once is still there.</summary>
internal static class EarlySpectrum
{
    private const int Longest = 4096, Shortest = 16, FewestCycles = 2;

    // Over the mean of an exponential power: one in a million lines is as high by chance, and some dozens are looked at.
    private const double StandsOut = 18;

    /// <summary>Frequency of the highest line, cycles per sample; null where none stands out.</summary>
    /// <param name="samples">The record.</param>
    /// <param name="spans">Its levels.</param>
    public static double? Highest(ReadOnlySpan<double> samples, IReadOnlyList<LevelSpan> spans)
    {
        double[] lengths = [.. spans.Select(s => s.Length / 2).Order()];
        int n = (int)Math.Min(Longest, lengths[lengths.Length / 10]);
        if (n < Shortest)
            return null;
        var transform = new RealTransform(2 * n);
        double[] re = new double[transform.Bins], im = new double[transform.Bins], power = new double[transform.Bins];
        foreach (bool high in (ReadOnlySpan<bool>)[false, true])
        {
            // Laid over each other to the nearest sample, which is close enough to find a line by.
            var sum = new double[2 * n];
            foreach (LevelSpan span in spans)
            {
                int first = (int)Math.Round(span.Edge + span.From);
                if (span.IsHigh != high || span.Length / 2 < n || first + n > samples.Length)
                    continue;
                for (int i = 0; i < n; i++)
                    sum[i] += samples[first + i];
            }
            double mean = SampleSummary.Of(sum.AsSpan(n / 2, n / 2)).Mean;
            for (int i = 0; i < n; i++)
                sum[i] = (sum[i] - mean) * (0.5 + 0.5 * Math.Cos(Math.PI * i / n));
            transform.Forward(sum, re, im);
            for (int k = 0; k < power.Length; k++)
                power[k] += re[k] * re[k] + im[k] * im[k];
        }
        int lowest = 2 * FewestCycles, best = lowest;
        if (lowest >= power.Length - 2)
            return null;
        for (int k = lowest; k < power.Length - 1; k++)
            best = power[k] > power[best] ? k : best;
        double[] sorted = [.. power[lowest..]];
        Array.Sort(sorted);
        return best > lowest && power[best] > StandsOut * sorted[sorted.Length / 2] ? best / (2.0 * n) : null;
    }
}
