using ScopeReader.Numerics;

namespace ScopeReader.Ringing;

/// <summary>Where to look for an oscillation: the highest line of the levels' halves.</summary>
internal static class LevelSpectrum
{
    private const int Longest = 4096, Shortest = 16;

    // Fewer cycles than these in a half are the level's own course.
    private const int LateCycles = 3, EarlyCycles = 2;

    // Chance that white noise passes in one of a hundred thousand records; and the same for a single power over its median.
    private const double Chance = 1e-5, StandsOut = 18;

    /// <summary>Of the later halves, power by power: there most of the edges' own ringing has died away.</summary>
    /// <param name="samples">The record.</param>
    /// <param name="spans">Its levels.</param>
    /// <returns>Cycles per sample; null where no line stands out of white noise.</returns>
    public static double? Late(ReadOnlySpan<double> samples, IReadOnlyList<LevelSpan> spans)
    {
        if (HalfLength(spans) is not { } n)
            return null;
        var line = new Line(n);
        double[] window = Window.Hann.Values(n), values = new double[n];
        int count = 0;
        foreach (LevelSpan span in spans)
        {
            int end = (int)Math.Floor(span.Edge + span.From + span.Length), first = end - n;
            if (span.Length / 2 < n || first < 0 || end > samples.Length)
                continue;
            double mean = SampleSummary.Of(samples[first..end]).Mean;
            for (int i = 0; i < n; i++)
                values[i] = window[i] * (samples[first + i] - mean);
            line.Add(values);
            count++;
        }
        if (count == 0)
            return null;
        // A mean of so many exponential powers, by Wilson and Hilferty's cube; their median is lower than their mean by the same rule.
        double v = 1.0 / (9 * count), z = BoundedNormal.NormalQuantile(1 - Chance / n);
        return line.Highest(LateCycles, Math.Pow((1 - v + z * Math.Sqrt(v)) / (1 - v), 3));
    }

    /// <summary>Of what the earlier halves have in common: there ringing that dies at once still is.</summary>
    /// <param name="samples">The record.</param>
    /// <param name="spans">Its levels.</param>
    /// <returns>Cycles per sample; null where no line stands out of white noise.</returns>
    public static double? Early(ReadOnlySpan<double> samples, IReadOnlyList<LevelSpan> spans)
    {
        if (HalfLength(spans) is not { } n)
            return null;
        var line = new Line(n);
        foreach (bool high in (ReadOnlySpan<bool>)[false, true])
        {
            // Laid over each other to the nearest sample, which is close enough to find a line by.
            var sum = new double[n];
            foreach (LevelSpan span in spans)
            {
                int first = (int)Math.Round(span.Edge + span.From);
                if (span.IsHigh != high || span.Length / 2 < n || first + n > samples.Length)
                    continue;
                for (int i = 0; i < n; i++)
                    sum[i] += samples[first + i];
            }
            double mean = SampleSummary.Of(sum.AsSpan(n / 2)).Mean;
            for (int i = 0; i < n; i++)
                sum[i] = (sum[i] - mean) * (0.5 + 0.5 * Math.Cos(Math.PI * i / n));
            line.Add(sum);
        }
        return line.Highest(EarlyCycles, StandsOut);
    }

    // Half of what nine in ten levels have.
    private static int? HalfLength(IReadOnlyList<LevelSpan> spans)
    {
        double[] lengths = [.. spans.Select(s => s.Length / 2).Order()];
        int n = (int)Math.Min(Longest, lengths[lengths.Length / 10]);
        return n < Shortest ? null : n;
    }

    // Sums powers, twice as long with zeros so that a line between two bins is no lower.
    private sealed class Line(int length)
    {
        private readonly RealTransform _transform = new(2 * length);
        private readonly double[] _padded = new double[2 * length], _re = new double[length + 1], _im = new double[length + 1], _power = new double[length + 1];

        public void Add(double[] values)
        {
            values.CopyTo(_padded, 0);
            _transform.Forward(_padded, _re, _im);
            for (int k = 0; k < _power.Length; k++)
                _power[k] += _re[k] * _re[k] + _im[k] * _im[k];
        }

        public double? Highest(int fewestCycles, double overMedian)
        {
            int lowest = 2 * fewestCycles, best = lowest;
            if (lowest >= _power.Length - 2)
                return null;
            for (int k = lowest; k < _power.Length - 1; k++)
                best = _power[k] > _power[best] ? k : best;
            double[] sorted = [.. _power[lowest..]];
            Array.Sort(sorted);
            // The lowest line is the foot of what the level itself does.
            return best > lowest && _power[best] > overMedian * sorted[sorted.Length / 2] ? best / (2.0 * length) : null;
        }
    }
}
