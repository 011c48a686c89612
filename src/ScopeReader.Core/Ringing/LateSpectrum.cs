using ScopeReader.Numerics;

namespace ScopeReader.Ringing;

/// <summary>The mean spectrum of the later halves of the levels, where most of the edges' own ringing has died away.</summary>
internal static class LateSpectrum
{
    private const int Longest = 4096, Shortest = 16, FewestCycles = 3;

    // Chance that white noise passes in one of a hundred thousand records.
    private const double Chance = 1e-5;

    /// <summary>Frequency of the highest line, cycles per sample; null where none stands out of white noise.</summary>
    /// <param name="samples">The record.</param>
    /// <param name="spans">Its levels.</param>
    public static double? Highest(ReadOnlySpan<double> samples, IReadOnlyList<LevelSpan> spans)
    {
        double[] lengths = [.. spans.Select(s => s.Length / 2).Order()];
        int n = (int)Math.Min(Longest, lengths[lengths.Length / 10]);
        if (n < Shortest)
            return null;
        // Twice as long with zeros, so that a line between two bins is no lower.
        var transform = new RealTransform(2 * n);
        double[] window = Window.Hann.Values(n), padded = new double[2 * n], re = new double[transform.Bins], im = new double[transform.Bins], power = new double[transform.Bins];
        int count = 0;
        foreach (LevelSpan span in spans)
        {
            int end = (int)Math.Floor(span.Edge + span.From + span.Length), first = end - n;
            if (span.Length / 2 < n || first < 0 || end > samples.Length)
                continue;
            double mean = SampleSummary.Of(samples[first..end]).Mean;
            for (int i = 0; i < n; i++)
                padded[i] = window[i] * (samples[first + i] - mean);
            transform.Forward(padded, re, im);
            for (int k = 0; k < power.Length; k++)
                power[k] += re[k] * re[k] + im[k] * im[k];
            count++;
        }
        int lowest = 2 * FewestCycles;
        if (count == 0 || lowest >= power.Length - 2)
            return null;
        int best = lowest;
        for (int k = lowest; k < power.Length - 1; k++)
            best = power[k] > power[best] ? k : best;
        double[] sorted = [.. power[lowest..]];
        Array.Sort(sorted);
        // A mean of so many exponential powers, by Wilson and Hilferty's cube; their median is lower than their mean by the same rule.
        double v = 1.0 / (9 * count), z = BoundedNormal.NormalQuantile(1 - Chance / sorted.Length);
        double limit = Math.Pow((1 - v + z * Math.Sqrt(v)) / (1 - v), 3);
        return power[best] > limit * sorted[sorted.Length / 2] ? best / (2.0 * n) : null;
    }
}
