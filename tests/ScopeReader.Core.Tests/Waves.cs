using ScopeReader.Captures;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Tests;

/// <summary>Short ways to make a waveform and measure it.</summary>
internal static class Waves
{
    /// <summary>A chain without errors: what is left is the capture's own part.</summary>
    public static readonly MeasuringChain Exact = new() { TimebaseTolerancePpm = 0, GainTolerancePercent = 0, OffsetTolerance = 0, FlatnessDb = 0 };

    public static Waveform Of(double[] samples, double interval = 1e-8) => new("made", "V", new TimeAxis(0, interval, AxisSource.Column), samples);

    public static Waveform Of(int count, Func<int, double> value, double interval = 1e-8) => Of([.. Enumerable.Range(0, count).Select(value)], interval);

    public static ChannelMeasurement Measure(Waveform waveform, Plan? plan = null) =>
        Analysis.Measure(new Capture("made.csv", "", [waveform], []), plan ?? new Plan { Chain = Exact }).Channels[0];

    public static Reading Reading(this ChannelMeasurement channel, Quantity quantity) =>
        channel.Readings.Single(r => r.Quantity == quantity && r.IsPrimary);

    public static string Reason(this ChannelMeasurement channel, Quantity quantity) => channel.NotMeasured.Single(n => n.Quantity == quantity).Reason;

    /// <summary>A 455 kHz square wave at so many samples per cycle.</summary>
    public static Waveform Square(double samplesPerCycle, int count, double noise = 0, SquareWave? wave = null, ulong seed = 1, Converter? converter = null)
    {
        SquareWave made = wave ?? new SquareWave();
        return new Recording { Interval = 1 / made.Frequency / samplesPerCycle, Count = count, Noise = noise, Seed = seed, Converter = converter, Delay = 0.3 / made.Frequency }.Take(made.Signal);
    }
}
