using ScopeReader.Captures;

namespace ScopeReader.Bench.Plots;

/// <summary>What a plot needs to know of a channel: values, and where each one lies.</summary>
internal abstract class PlotSource
{
    private readonly Extremes _extremes;

    private protected PlotSource(ReadOnlySpan<double> values, string xUnit, string yUnit)
    {
        (_extremes, Count, XUnit, YUnit) = (new Extremes(values), values.Length, xUnit, yUnit);
        (Lowest, Highest) = _extremes.Of(values, 0, values.Length);
    }

    /// <summary>The source for a channel.</summary>
    public static PlotSource Of(Channel channel) => channel switch
    {
        Waveform waveform => new WaveformSource(waveform),
        SpectrumTrace trace => new TraceSource(trace),
        _ => throw new ArgumentException($"no plot for {channel.GetType().Name}", nameof(channel)),
    };

    /// <summary>How many values there are.</summary>
    public int Count { get; }

    /// <summary>Unit along the record: s, sample or Hz.</summary>
    public string XUnit { get; }

    /// <summary>Unit of the values.</summary>
    public string YUnit { get; }

    /// <summary>The smallest value.</summary>
    public double Lowest { get; }

    /// <summary>The largest value.</summary>
    public double Highest { get; }

    /// <summary>Where the record starts.</summary>
    public double Start => At(0);

    /// <summary>Where it ends.</summary>
    public double End => At(Count - 1);

    /// <summary>The values.</summary>
    public abstract ReadOnlySpan<double> Values { get; }

    /// <summary>Where a value lies.</summary>
    public abstract double At(int index);

    /// <summary>The index of a place, with the part between two values; below 0 or above the last outside the record.</summary>
    public abstract double IndexOf(double x);

    /// <summary>Smallest and largest of a stretch.</summary>
    public (double Smallest, double Largest) Between(int start, int end) => _extremes.Of(Values, start, end);

    private sealed class WaveformSource(Waveform waveform)
        : PlotSource(waveform.Samples, waveform.Axis.TimeUnit, waveform.Unit)
    {
        public override ReadOnlySpan<double> Values => waveform.Samples;

        public override double At(int index) => waveform.Axis.Start + index * waveform.Interval;

        public override double IndexOf(double x) => (x - waveform.Axis.Start) / waveform.Interval;
    }

    private sealed class TraceSource(SpectrumTrace trace) : PlotSource(trace.Levels, "Hz", trace.Unit)
    {
        public override ReadOnlySpan<double> Values => trace.Levels;

        public override double At(int index) => trace.Frequencies[index];

        public override double IndexOf(double x)
        {
            ReadOnlySpan<double> f = trace.Frequencies;
            int i = f.BinarySearch(x);
            if (i >= 0)
                return i;
            // Outside, the end spacing goes on.
            int after = Math.Clamp(~i, 1, f.Length - 1);
            return after - 1 + (x - f[after - 1]) / (f[after] - f[after - 1]);
        }
    }
}
