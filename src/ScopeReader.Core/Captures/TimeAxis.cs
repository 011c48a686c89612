namespace ScopeReader.Captures;

/// <summary>Where a channel's axis was found.</summary>
public enum AxisSource
{
    /// <summary>Nowhere: readings are per sample.</summary>
    None,

    /// <summary>A column of the file.</summary>
    Column,

    /// <summary>The text before the numbers.</summary>
    Preamble,

    /// <summary>The person: an option or the plan.</summary>
    Option,
}

/// <summary>When equally spaced samples were taken.</summary>
public sealed record TimeAxis
{
    /// <summary>An axis in seconds.</summary>
    /// <param name="start">Instant of the first sample, s.</param>
    /// <param name="interval">Sample interval, s, above zero.</param>
    /// <param name="source">Where it was found.</param>
    /// <param name="intervalLow">The shortest interval that the file's rounded times allow, s; <paramref name="interval"/> where they are exact.</param>
    /// <param name="intervalHigh">The longest, s.</param>
    /// <exception cref="ArgumentException">A value is not finite, or the interval is not inside its range.</exception>
    public TimeAxis(double start, double interval, AxisSource source, double? intervalLow = null, double? intervalHigh = null)
    {
        double low = intervalLow ?? interval, high = intervalHigh ?? interval;
        if (!double.IsFinite(start) || !double.IsFinite(interval) || interval <= 0 || !(low > 0 && low <= interval && interval <= high) || !double.IsFinite(high))
            throw new ArgumentException($"not an axis: start {start}, interval {interval} in [{low}, {high}]");
        (Start, Interval, Source, IntervalLow, IntervalHigh) = (start, interval, source, low, high);
    }

    private TimeAxis() => (Interval, IntervalLow, IntervalHigh) = (1, 1, 1);

    /// <summary>No interval is known: times are in samples and frequencies in 1/sample.</summary>
    public static TimeAxis PerSample { get; } = new();

    /// <summary>Instant of the first sample, s (or 0, per sample).</summary>
    public double Start { get; }

    /// <summary>Sample interval, s (or 1, per sample).</summary>
    public double Interval { get; }

    /// <summary>Where the axis was found; <see cref="AxisSource.None"/> means per sample.</summary>
    public AxisSource Source { get; }

    /// <summary>Shortest interval that the file allows, s.</summary>
    public double IntervalLow { get; }

    /// <summary>Longest interval that the file allows, s.</summary>
    public double IntervalHigh { get; }

    /// <summary>True where times are in seconds.</summary>
    public bool IsTimed => Source != AxisSource.None;

    /// <summary>Half the range of the interval over the interval: a bound on the relative error that rounded times leave.</summary>
    public double RelativeRounding => (IntervalHigh - IntervalLow) / 2 / Interval;

    /// <summary>"s", or "sample".</summary>
    public string TimeUnit => IsTimed ? "s" : "sample";

    /// <summary>"Hz", or "1/sample".</summary>
    public string FrequencyUnit => IsTimed ? "Hz" : "1/sample";
}
