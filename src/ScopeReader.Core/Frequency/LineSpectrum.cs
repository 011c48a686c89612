using ScopeReader.Numerics;

namespace ScopeReader.Frequency;

/// <summary>A Hann magnitude spectrum, mean removed, and the search for the wave's fundamental in it.</summary>
internal sealed class LineSpectrum
{
    // A wave's period is longer than the strongest line's where lines between its harmonics hold a hundredth of its power.
    private const double ShareBetween = 0.01;
    // Over the median of noise: a hundred places are looked at, and noise must pass at none of them in a thousand records.
    private const double StandsOut = 40;
    private const int LowestBin = 2, LongestOrder = 8, CombReach = 4;

    private readonly double[] _magnitudes;

    public LineSpectrum(ReadOnlySpan<double> samples)
    {
        double mean = 0;
        foreach (double v in samples)
            mean += v;
        mean /= samples.Length;
        double[] windowed = Window.Hann.Values(samples.Length);
        for (int i = 0; i < windowed.Length; i++)
        {
            WindowPower += windowed[i] * windowed[i];
            windowed[i] *= samples[i] - mean;
        }
        var transform = new RealTransform(samples.Length);
        double[] re = new double[transform.Bins], im = new double[transform.Bins];
        transform.Forward(windowed, re, im);
        for (int k = 0; k < re.Length; k++)
            re[k] = Math.Sqrt(re[k] * re[k] + im[k] * im[k]);
        _magnitudes = re;
    }

    /// <summary>Sum of the squared window: noise power of a bin over that of a sample.</summary>
    public double WindowPower { get; }

    public double Magnitude(int bin) => _magnitudes[bin];

    /// <summary>The largest bin that has neighbours on both sides, or null where it is no more than noise makes.</summary>
    public int? Strongest()
    {
        int largest = LowestBin;
        for (int k = LowestBin; k < _magnitudes.Length - 1; k++)
            if (_magnitudes[k] > _magnitudes[largest])
                largest = k;
        // The largest of M exponential powers is ln M times their mean, and above ln M + 7 in one record of a thousand.
        double limit = (Math.Log(_magnitudes.Length) + 7) / Math.Log(2);
        double power = _magnitudes[largest] * _magnitudes[largest];
        return power > 0 && power > limit * MedianPower(0, _magnitudes.Length) ? largest : null;
    }

    /// <summary>Which harmonic of the wave a line is: 1 where it is the fundamental.</summary>
    /// <param name="bin">The strongest bin.</param>
    public int OrderOf(int bin)
    {
        double place = Interpolated(bin), power = _magnitudes[bin] * _magnitudes[bin], most = 0;
        Span<double> between = stackalloc double[LongestOrder + 1];
        for (int order = 2; order <= LongestOrder && place / order >= CombReach; order++)
        {
            for (int j = 1; j < 4 * order; j++)
                if (j % order != 0)
                    between[order] += LinePower(place * j / order);
            most = Math.Max(most, between[order]);
        }
        if (most < ShareBetween * power)
            return 1;
        // The longest period finds every line; so does each multiple of the true one: the shortest that finds nearly all.
        for (int order = 2; order <= LongestOrder; order++)
            if (between[order] > 0.9 * most)
                return order;
        return 1;
    }

    private double Interpolated(int bin)
    {
        int side = _magnitudes[bin + 1] >= _magnitudes[bin - 1] ? 1 : -1;
        double alpha = _magnitudes[bin + side] / _magnitudes[bin];
        return bin + side * (2 * alpha - 1) / (1 + alpha);
    }

    // Power of a line, if there is one at that place: a local peak well above its surroundings.
    private double LinePower(double place)
    {
        int k = (int)Math.Round(place);
        if (k < LowestBin || k > _magnitudes.Length - 3)
            return 0;
        int peak = k;
        for (int i = k - 1; i <= k + 1; i++)
            if (_magnitudes[i] > _magnitudes[peak])
                peak = i;
        bool isPeak = _magnitudes[peak] >= _magnitudes[peak - 1] && _magnitudes[peak] >= _magnitudes[peak + 1];
        double power = _magnitudes[peak] * _magnitudes[peak];
        return isPeak && power > StandsOut * MedianPower(peak - 32, peak + 33) ? power : 0;
    }

    private double MedianPower(int from, int to)
    {
        double[] part = _magnitudes[Math.Max(LowestBin, from)..Math.Min(_magnitudes.Length, to)];
        Array.Sort(part);
        double median = part.Length == 0 ? 0 : part[part.Length / 2];
        return median * median;
    }
}
