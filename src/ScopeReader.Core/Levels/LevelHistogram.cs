namespace ScopeReader.Levels;

/// <summary>How often each level occurs.</summary>
/// <remarks>
/// Bins are whole numbers of quantisation steps, centred on the codes, where there is a step: others beat with the codes
/// and pull the mode. All of it is linear in the samples, with no sort.
/// </remarks>
internal sealed class LevelHistogram
{
    private const int MostBins = 8192, MostCounted = 1 << 20, Stretches = 64;

    private readonly int[] _counts;
    private readonly double _origin, _width;

    /// <param name="samples">Shape [n].</param>
    /// <param name="minimum">Smallest sample.</param>
    /// <param name="maximum">Largest sample, above the smallest.</param>
    /// <param name="step">Quantisation step, 0 for none.</param>
    public LevelHistogram(ReadOnlySpan<double> samples, double minimum, double maximum, double step)
    {
        double range = maximum - minimum;
        _width = step > 0 ? step * Math.Ceiling(Math.Max(1, range / step) / (MostBins - 2)) : range / (MostBins - 1);
        _origin = minimum - _width / 2;
        _counts = new int[(int)Math.Floor(range / _width + 0.5) + 1];
        double perBin = 1 / _width;
        // Of a long record stretches from all over it: levels are looked for here, and not yet measured.
        int stretches = samples.Length > MostCounted ? Stretches : 1, length = samples.Length > MostCounted ? MostCounted / Stretches : samples.Length;
        for (int s = 0; s < stretches; s++)
            foreach (double value in samples.Slice(stretches == 1 ? 0 : (int)((long)s * (samples.Length - length) / (stretches - 1)), length))
                _counts[Math.Clamp((int)((value - _origin) * perBin), 0, _counts.Length - 1)]++;
        Counted = (long)stretches * length;
    }

    /// <summary>How many samples were counted.</summary>
    public long Counted { get; }

    /// <summary>Number of bins.</summary>
    public int Bins => _counts.Length;

    /// <summary>The level in the middle of a bin.</summary>
    public double Level(double bin) => _origin + (bin + 0.5) * _width;

    /// <summary>Samples in the bins whose middles lie from one level to another.</summary>
    public long Between(double low, double high)
    {
        int first = Math.Max(0, (int)Math.Ceiling((low - _origin) / _width - 0.5)), last = Math.Min(Bins - 1, (int)Math.Floor((high - _origin) / _width - 0.5));
        return first > last ? 0 : Count(first, last);
    }

    /// <summary>The two sides of the wave: the bin that parts them lies half-way between their medians.</summary>
    /// <param name="first">First bin that counts.</param>
    /// <param name="last">Last bin that counts, above the first.</param>
    public int Divide(int first, int last)
    {
        int middle = (first + last) / 2;
        for (int i = 0; i < 20; i++)
        {
            int next = (int)Math.Floor((Median(first, middle) + Median(middle + 1, last)) / 2);
            next = Math.Clamp(next, first, last - 1);
            if (next == middle)
                break;
            middle = next;
        }
        return middle;
    }

    /// <summary>Mean level of the shortest run of bins that holds half of the samples in [first, last].</summary>
    /// <remarks>The shorth, IEEE Std 181-2011 and NIST TN 2036 (from memory), to the width of a bin.</remarks>
    public double Shorth(int first, int last)
    {
        long half = Count(first, last) / 2 + 1, inside = 0;
        int start = first, bestStart = first, bestEnd = last;
        long most = 0;
        for (int end = first; end <= last; end++)
        {
            inside += _counts[end];
            while (inside - _counts[start] >= half)
                inside -= _counts[start++];
            int length = end - start, best = bestEnd - bestStart;
            // Of equally short runs the fuller one: it holds the peak.
            if (inside >= half && (length < best || (length == best && inside > most)))
                (bestStart, bestEnd, most) = (start, end, inside);
        }
        double sum = 0;
        long count = 0;
        for (int i = bestStart; i <= bestEnd; i++)
            (sum, count) = (sum + (double)i * _counts[i], count + _counts[i]);
        return Level(count > 0 ? sum / count : (first + last) / 2.0);
    }

    /// <summary>Median distance of the samples in [first, last] from a level.</summary>
    public double MedianDistance(int first, int last, double level)
    {
        long half = (Count(first, last) + 1) / 2, inside = 0;
        int centre = Math.Clamp(Bin(level), first, last);
        for (int d = 0; d <= last - first; d++)
        {
            if (centre - d >= first)
                inside += _counts[centre - d];
            if (d > 0 && centre + d <= last)
                inside += _counts[centre + d];
            if (inside >= half)
                return d * _width;
        }
        return 0;
    }

    /// <summary>The bins that are left when a share of the samples is taken off either end.</summary>
    public (int First, int Last) Within(double share)
    {
        long all = Count(0, Bins - 1), most = (long)(share * all);
        int first = 0, last = Bins - 1;
        for (long outside = _counts[first]; outside <= most && first < last; outside += _counts[first])
            first++;
        for (long outside = _counts[last]; outside <= most && last > first; outside += _counts[last])
            last--;
        return (first, last);
    }

    private int Bin(double level) => (int)Math.Clamp(Math.Floor((level - _origin) / _width), -1, Bins);

    private long Count(int first, int last)
    {
        long count = 0;
        for (int i = first; i <= last; i++)
            count += _counts[i];
        return count;
    }

    private double Median(int first, int last)
    {
        long half = (Count(first, last) + 1) / 2, inside = 0;
        for (int i = first; i <= last; i++)
        {
            inside += _counts[i];
            if (inside >= half && inside > 0)
                return i;
        }
        return (first + last) / 2.0;
    }
}
