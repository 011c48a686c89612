using ScopeReader.Captures;
using ScopeReader.Levels;
using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>A spectrum trace on a scale in dB, and the lines in it.</summary>
internal sealed partial class TraceLevels
{
    // A little more than a filter's width apart, points still add up to the power within a few hundredths.
    private const double MostSpacing = 1.1;

    private const double Silence = -400;
    private const int NoiseReach = 100, FewestForNoise = 16;

    private readonly double[] _frequencies, _levels;
    private readonly double _step;

    private TraceLevels(double[] frequencies, double[] levels, string unit, double step) =>
        (_frequencies, _levels, Unit, _step) = (frequencies, levels, unit, step);

    /// <summary>dBm or dBV.</summary>
    public string Unit { get; }

    /// <summary>Last point's frequency, Hz.</summary>
    public double Stop => _frequencies[^1];

    /// <summary>First point's frequency, Hz.</summary>
    public double Start => _frequencies[0];

    /// <summary>Mean spacing of the points, Hz.</summary>
    public double Spacing => (Stop - Start) / (_frequencies.Length - 1);

    /// <summary>The trace on its scale, or null where its unit is none of a level.</summary>
    public static TraceLevels? Of(SpectrumTrace trace)
    {
        double[] levels = trace.Levels.ToArray();
        (string unit, Func<double, double>? convert) = trace.Unit switch
        {
            "dBm" or "dBV" => (trace.Unit, null),
            "dBµV" => ("dBV", Decibels.DbvOfDbuv),
            "V" => ("dBV", Decibels.OfAmplitudes),
            "W" => ("dBm", Decibels.DbmOfWatts),
            _ => ("", (Func<double, double>?)null),
        };
        if (unit.Length == 0)
            return null;
        double step = trace.Unit[0] == 'd' ? QuantisationStep.Find(levels) : 0;
        if (convert is not null)
            for (int i = 0; i < levels.Length; i++)
                levels[i] = levels[i] <= 0 && trace.Unit[0] != 'd' ? Silence : convert(levels[i]);
        return new TraceLevels(trace.Frequencies.ToArray(), levels, unit, step);
    }

    /// <summary>Index after the start-of-span feed-through: the foot of a peak at the very first points.</summary>
    public int AfterFeedThrough()
    {
        int top = 0;
        for (int i = 1; i <= Math.Min(3, _levels.Length - 1); i++)
            if (_levels[i] > _levels[top])
                top = i;
        if (top == Math.Min(3, _levels.Length - 1) || _levels[top] < Noise(top).Threshold(_levels.Length))
            return 1;
        int foot = top;
        while (foot + 1 < _levels.Length && _levels[foot + 1] <= _levels[foot])
            foot++;
        return foot + 1;
    }

    /// <summary>Index of the highest point of a part of the trace.</summary>
    public int Highest(int from, int to)
    {
        int best = from;
        for (int i = from; i <= to; i++)
            if (_levels[i] > _levels[best])
                best = i;
        return best;
    }

    /// <summary>Number of points.</summary>
    public int Count => _levels.Length;

    /// <summary>Level of a point, dB.</summary>
    public double Level(int index) => _levels[index];

    /// <summary>Frequency of a point, Hz.</summary>
    public double Frequency(int index) => _frequencies[index];

    /// <summary>Index of the point nearest a frequency, Hz.</summary>
    public int Nearest(double frequency)
    {
        int i = Array.BinarySearch(_frequencies, frequency);
        if (i >= 0)
            return i;
        i = Math.Clamp(~i, 1, _frequencies.Length - 1);
        return frequency - _frequencies[i - 1] < _frequencies[i] - frequency ? i - 1 : i;
    }

    /// <summary>Noise around a point, the line on it left out.</summary>
    public TraceNoise Noise(int index)
    {
        // Down the line on both sides, then as far again: that is skirt, not noise.
        int left = index, right = index;
        while (left > 0 && _levels[left - 1] < _levels[left])
            left--;
        while (right < _levels.Length - 1 && _levels[right + 1] < _levels[right])
            right++;
        int reach = Math.Max(NoiseReach, _levels.Length / 20);
        var around = new List<double>(2 * reach);
        for (int i = Math.Max(0, left - reach); i < Math.Min(_levels.Length, right + reach); i++)
            if (i < left - (index - left) || i > right + (right - index))
                around.Add(_levels[i]);
        return TraceNoise.Of(around.Count >= FewestForNoise ? around.ToArray() : (double[])_levels.Clone());
    }

    /// <summary>Why powers of the points do not add up; null where they do, or nobody knows the filter.</summary>
    /// <param name="resolutionBandwidth">Hz; null where unknown.</param>
    public string? TooCoarse(double? resolutionBandwidth) => resolutionBandwidth is { } filter && Spacing > MostSpacing * filter
        ? HarmonicAnalyser.Text($"points lie {Engineering.Format(Spacing, "Hz", 3)} apart and the resolution bandwidth is {Engineering.Format(filter, "Hz", 3)}: power falls between them; take more points or a narrower span")
        : null;

    /// <summary>Levels of the points, dB.</summary>
    public ReadOnlySpan<double> Levels => _levels;

    /// <summary>Noise of the whole trace, lines left out.</summary>
    /// <param name="from">Index after the start-of-span feed-through.</param>
    public TraceNoise Floor(int from) => TraceNoise.Of(_levels.AsSpan(Math.Min(from, _levels.Length - 3)).ToArray());
}
