using ScopeReader.Captures;

namespace ScopeReader.Signals;

/// <summary>How a signal is sampled: the made instrument.</summary>
public sealed record Recording
{
    /// <summary>Sample interval as the instrument states it, s.</summary>
    public double Interval { get; init; } = 8e-9;

    /// <summary>How many samples.</summary>
    public int Count { get; init; } = 100_000;

    /// <summary>Instant of the first sample as the instrument states it, s; the trigger is at 0.</summary>
    public double Start { get; init; }

    /// <summary>Instant of the signal at the trigger, true seconds: moves the start phase without moving the axis.</summary>
    public double Delay { get; init; }

    /// <summary>Indicated minus true frequency, ppm: a timebase that reads high is positive.</summary>
    public double TimebaseReadsPpm { get; init; }

    /// <summary>White noise, V rms, before the converter.</summary>
    public double Noise { get; init; }

    /// <summary>Seed of the noise.</summary>
    public ulong Seed { get; init; } = 1;

    /// <summary>The converter; null for none.</summary>
    public Converter? Converter { get; init; }

    /// <summary>Significant digits that the times are written with; null where the file states the interval exactly.</summary>
    public int? TimeDigits { get; init; }

    /// <summary>Samples a signal.</summary>
    /// <param name="signal">The signal.</param>
    /// <param name="name">Name of the channel.</param>
    /// <param name="unit">Unit of its values.</param>
    public Waveform Take(ISignal signal, string name = "made", string unit = "V") => new(name, unit, Axis(), Samples(signal));

    /// <summary>The samples alone.</summary>
    public double[] Samples(ISignal signal)
    {
        ArgumentNullException.ThrowIfNull(signal);
        var noise = new NormalNoise(Seed);
        // An instrument whose clock is slow takes its samples further apart than it states, and shows frequencies high.
        double stretch = 1 + TimebaseReadsPpm * 1e-6;
        var samples = new double[Count];
        for (int i = 0; i < samples.Length; i++)
        {
            double value = signal.At(Delay + (Start + i * Interval) * stretch) + (Noise > 0 ? Noise * noise.Normal() : 0);
            samples[i] = Converter?.Convert(value) ?? value;
        }
        return samples;
    }

    private TimeAxis Axis()
    {
        if (TimeDigits is not { } digits)
            return new TimeAxis(Start, Interval, AxisSource.Column);
        var (low, high) = RoundedTimes.IntervalRange(Start, Interval, Count, digits);
        return new TimeAxis(Start, Math.Clamp((low + high) / 2, low, high), AxisSource.Column, low, high);
    }
}
