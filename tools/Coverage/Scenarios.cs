using ScopeReader.Captures;
using ScopeReader.Signals;

namespace ScopeReader.Coverage;

/// <summary>The made captures that stated uncertainties are held against.</summary>
/// <remarks>
/// Unless its name says otherwise a scenario's chain is known exactly (the timebase's error is stated, the other bounds are
/// zero), so that the capture's own part of an uncertainty stands alone. Every seed draws its own frequency, start phase,
/// timebase error, edges and ringing: an error that is the same for all of them shows as bias, one that depends on them as spread.
/// </remarks>
internal static class Scenarios
{
    private const double Nominal = 455e3, Interval = 8e-9;
    private const int Long = 100_000;

    public static IReadOnlyList<Scenario> All { get; } =
    [
        new("square", "ringing square wave, 455 kHz, 364 cycles, noise 40 dB below the swing", s => Square(s, new())),
        new("repeated", "one ringing square wave, taken again and again: phase, timebase and noise alone differ", s => Square(s, new() { IsOneWave = true })),
        new("square-12", "the same through a 12-bit converter", s => Square(s, new() { Bits = 12 })),
        new("square-8", "the same through an 8-bit converter", s => Square(s, new() { Bits = 8 })),
        new("coarse", "8-bit converter, no noise at all", s => Square(s, new() { Bits = 8, Noise = 0 })),
        new("noisy", "noise 26 dB below the swing", s => Square(s, new() { Noise = 0.05 })),
        new("fast", "edges of three samples, no ringing", s => Square(s, new() { Bits = 12, RiseTime = (22e-9, 26e-9), Rings = false })),
        new("plain", "edges of 40 to 60 ns, no ringing", s => Square(s, new() { Bits = 12, Rings = false })),
        new("duty-20", "ringing square wave, 20 % duty factor", s => Square(s, new() { Bits = 12, Duty = (0.19, 0.21) })),
        new("few", "ten cycles of the ringing square wave", s => Square(s, new() { Bits = 12, Count = 2_750 })),
        new("edge", "one or two edges of it", s => Square(s, new() { Bits = 12, Count = 230 })),
        new("rounded", "times written with four digits", s => Square(s, new() { Bits = 12, Count = 10_000, TimeDigits = 4 })),
        new("tolerance", "data-sheet bounds: timebase ±25 ppm, gain ±1 %, offset ±10 mV", s => Square(s, new() { Bits = 12, Bounds = true })),
        new("sine", "sine, 12-bit converter, noise 40 dB below it", s => Sine(s, [], 0.01)),
        new("sine-few", "ten cycles of the sine", s => Sine(s, [], 0.01, 2_750)),
        new("harmonics", "sine with harmonics of -40, -55 and -70 dBc, noise 60 dB below it", s => Sine(s, [(2, -40), (3, -55), (4, -70)], 0.001)),
        new("spectrum", "spectrum trace of a line and two harmonics", Spectrum),
    ];

    private sealed record Kind
    {
        public int? Bits { get; init; }
        public double Noise { get; init; } = 0.01;
        public (double Low, double High) RiseTime { get; init; } = (40e-9, 60e-9);
        public (double Low, double High) Duty { get; init; } = (0.48, 0.52);
        public bool Rings { get; init; } = true;
        public int Count { get; init; } = Long;
        public int? TimeDigits { get; init; }
        public bool Bounds { get; init; }
        public bool IsOneWave { get; init; }
    }

    private static MadeCase Square(ulong seed, Kind kind)
    {
        var draw = new NormalNoise(kind.IsOneWave ? 1 : seed);
        double low = draw.Uniform(-0.1, 0.1), swing = draw.Uniform(3, 3.6);
        var wave = new SquareWave
        {
            Frequency = Nominal * (1 + 1e-6 * draw.Uniform(-60, 60)),
            Low = low,
            High = low + swing,
            DutyFactor = draw.Uniform(kind.Duty.Low, kind.Duty.High),
            RiseTime = draw.Uniform(kind.RiseTime.Low, kind.RiseTime.High),
            FallTime = draw.Uniform(kind.RiseTime.Low, kind.RiseTime.High),
            Resonance = kind.Rings ? new Resonance(draw.Uniform(6e6, 8e6), draw.Uniform(0.10, 0.15), draw.Uniform(0.3, 0.4)) : null,
        };
        // The converter's range is 1.5 to 1.7 swings; where the states lie between its codes is left to chance.
        double range = swing * draw.Uniform(1.5, 1.7), bottom = low - range * draw.Uniform(0.18, 0.22);
        return Recorded(wave.Signal, wave.Truth(), kind.IsOneWave ? new NormalNoise(seed) : draw, new Recording
        {
            Interval = Interval,
            Count = kind.Count,
            Noise = kind.Noise * swing,
            Converter = kind.Bits is { } bits ? new Converter(bits, bottom, bottom + range) : null,
            TimeDigits = kind.TimeDigits,
            // Where the rounded times fall decides how far their interval is from the true one.
            Start = kind.TimeDigits is null ? 0 : -Interval * kind.Count * draw.Uniform(),
        }, kind.Bounds);
    }

    private static MadeCase Sine(ulong seed, (int Number, double Dbc)[] harmonics, double noise, int count = Long)
    {
        var draw = new NormalNoise(seed);
        double amplitude = draw.Uniform(0.8, 1.2), offset = draw.Uniform(-0.1, 0.1);
        var sine = new HarmonicSine
        {
            Frequency = Nominal * (1 + 1e-6 * draw.Uniform(-60, 60)),
            Amplitude = amplitude,
            Offset = offset,
            Harmonics = [.. harmonics.Select(h => new HarmonicLine(h.Number, h.Dbc + draw.Uniform(-1, 1), draw.Uniform(0, 360)))],
        };
        return Recorded(sine.Build(), sine.Truth(), draw, new Recording
        {
            Interval = Interval,
            Count = count,
            // "40 dB below" compares rms with rms.
            Noise = noise * amplitude / Math.Sqrt(2),
            Converter = new Converter(12, -1.6, 1.6),
        }, bounds: false);
    }

    private static MadeCase Recorded(PeriodicSignal signal, IReadOnlyDictionary<string, double> truth, NormalNoise draw, Recording recording, bool bounds)
    {
        double timebase = draw.Uniform(-25, 25), gain = 1, offset = 0;
        var chain = new MeasuringChain
        {
            TimebaseReadsPpm = timebase,
            TimebaseUncertaintyPpm = 0,
            GainTolerancePercent = 0,
            OffsetTolerance = 0,
            FlatnessDb = 0,
            Impedance = 50,
        };
        if (bounds)
        {
            (gain, offset) = (1 + draw.Uniform(-0.01, 0.01), draw.Uniform(-0.01, 0.01));
            chain = chain with { TimebaseReadsPpm = null, TimebaseUncertaintyPpm = null, TimebaseTolerancePpm = 25, GainTolerancePercent = 1, OffsetTolerance = 0.01 };
        }
        Waveform taken = (recording with { Delay = draw.Uniform() / signal.Frequency, TimebaseReadsPpm = timebase, Seed = (ulong)(1e15 * draw.Uniform()) }).Take(signal);
        if (bounds)
            taken = new Waveform(taken.Name, taken.Unit, taken.Axis, [.. taken.Samples.ToArray().Select(v => gain * v + offset)]);
        return new MadeCase(taken, new Plan { Nominal = Nominal, Chain = chain }, new Dictionary<string, double>(truth)
        {
            ["frequency-error"] = (signal.Frequency / Nominal - 1) * 1e6,
            ["fundamental-power"] = truth["fundamental-level"] + 10 * Math.Log10(1000 / 50.0),
        });
    }

    private static MadeCase Spectrum(ulong seed)
    {
        var draw = new NormalNoise(seed);
        double frequency = Nominal * (1 + 1e-6 * draw.Uniform(-60, 60)), power = draw.Uniform(-15, -5);
        var lines = new SpectrumLines
        {
            Lines = [new(frequency, power), new(2 * frequency, power + draw.Uniform(-42, -38)), new(3 * frequency, power + draw.Uniform(-52, -48))],
            Start = 100e3,
            Stop = 2.1e6,
            Count = 2001,
            ResolutionBandwidth = 5e3,
            NoiseDbm = -85,
            Sweeps = 10,
            LevelStepDb = 0.01,
            Seed = (ulong)(1e15 * draw.Uniform()),
        };
        var chain = new MeasuringChain { TimebaseReadsPpm = 0, TimebaseUncertaintyPpm = 0, GainTolerancePercent = 0, FlatnessDb = 0 };
        return new MadeCase(lines.Take(), new Plan { Nominal = Nominal, Chain = chain }, new Dictionary<string, double>(lines.Truth())
        {
            ["frequency-error"] = (frequency / Nominal - 1) * 1e6,
        });
    }
}
