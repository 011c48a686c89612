using ScopeReader.Captures;
using ScopeReader.Levels;
using ScopeReader.Signals;

namespace ScopeReader.Coverage;

/// <summary>A made source with lines of -40, -55 and -70 dBc through a converter, drawn anew for each seed.</summary>
/// <remarks>The fundamental has 90 % of full scale; frequency, phases and start are drawn, levels are not.</remarks>
internal sealed record DbcSource
{
    public static readonly MeasuringChain Exact = new() { TimebaseReadsPpm = 0, TimebaseUncertaintyPpm = 0, GainTolerancePercent = 0, OffsetTolerance = 0, FlatnessDb = 0, Impedance = 50 };

    public int Bits { get; init; } = 8;

    /// <summary>Noise before the converter, steps.</summary>
    public double Noise { get; init; } = 0.5;

    public int Count { get; init; } = 100_000;

    public IReadOnlyList<double> LinesDbc { get; init; } = [-40, -55, -70];

    /// <summary>A line that is no harmonic; none.</summary>
    public double? SpurDbc { get; init; }

    /// <summary>Peak amplitude of the fundamental over full scale.</summary>
    public double Drive { get; init; } = 0.9;

    public MadeCase Draw(ulong seed)
    {
        const double interval = 1e-8;
        var draw = new NormalNoise(seed);
        double frequency = 455e3 * (1 + 0.01 * draw.Uniform(-1, 1)), start = draw.Uniform() / frequency;
        var converter = new Converter(Bits, -1, 1);
        var sine = new HarmonicSine { Frequency = frequency, Amplitude = Drive, Harmonics = [.. LinesDbc.Select((dbc, i) => new HarmonicLine(i + 2, dbc, draw.Uniform(0, 360)))] };
        double spurAt = frequency * (0.3 + draw.Uniform(0, 8)), spurPhase = draw.Uniform(), spur = SpurDbc is { } dbc ? Drive * Math.Pow(10, dbc / 20) : 0;
        // Well apart from any harmonic: what is closer than some cycles a record cannot be a line of its own.
        if (Math.Abs(spurAt / frequency - Math.Round(spurAt / frequency)) < 0.05)
            spurAt += 0.1 * frequency;
        PeriodicSignal wave = sine.Build();
        var recording = new Recording { Interval = interval, Count = Count, Delay = start, Noise = Noise * converter.Step, Seed = seed + 1_000_000, Converter = converter };
        Waveform taken = recording.Take(new WithSpur(wave, spurAt, spur, spurPhase));
        return new MadeCase(taken, new Plan { Chain = Exact, Levels = LevelSettings.Default }, Truth(sine, converter.Step, interval, spur));
    }

    private Dictionary<string, double> Truth(HarmonicSine sine, double step, double interval, double spur)
    {
        var truth = new Dictionary<string, double>(sine.Truth());
        double power = Drive * Drive / 2, noise = step * step * (Noise * Noise + 1.0 / 12), lines = LinesDbc.Sum(dbc => power * Math.Pow(10, dbc / 10)) + spur * spur / 2;
        truth["sinad"] = 10 * Math.Log10(power / (noise + lines));
        truth["enob"] = (truth["sinad"] - 1.7609125905568124) / 6.020599913279624;
        truth["sfdr"] = -Math.Max(SpurDbc ?? double.NegativeInfinity, LinesDbc.DefaultIfEmpty(double.NegativeInfinity).Max());
        if (double.IsInfinity(truth["sfdr"]))
            truth.Remove("sfdr");
        truth["noise-floor"] = 10 * Math.Log10(2 * noise * interval / power);
        return truth;
    }

    private sealed class WithSpur(PeriodicSignal wave, double frequency, double amplitude, double phase) : ISignal
    {
        public double At(double time) => wave.At(time) + (amplitude > 0 ? amplitude * Math.Cos(2 * Math.PI * (frequency * time + phase)) : 0);
    }
}
