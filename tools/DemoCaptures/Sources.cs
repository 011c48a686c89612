using System.Globalization;
using System.Text;
using ScopeReader.Captures;
using ScopeReader.Signals;

namespace ScopeReader.DemoCaptures;

/// <summary>The 455 kHz source: at its buffered output, at the oscillator's own pin, and on a spectrum analyser.</summary>
internal static class Sources
{
    private const double Nominal = 455e3;
    private const decimal Start = -20e-6m, Interval = 10e-9m;
    private const int Count = 20_000;

    // The resonator: motional and shunt capacitance, and the load that its two 220 pF capacitors are in series.
    private const double Motional = 12e-12, Shunt = 250e-12, LoadEach = 220e-12, Probe = 12e-12;

    /// <summary>The buffered output: a square wave with a little ringing.</summary>
    public static byte[] Buffered(double errorPpm, ulong seed)
    {
        var wave = new SquareWave
        {
            Frequency = Nominal * (1 + errorPpm * 1e-6),
            Low = 0.06,
            High = 3.27,
            DutyFactor = 0.497,
            RiseTime = 46e-9,
            FallTime = 41e-9,
            Resonance = new Resonance(7.3e6, 0.14, 0.22),
        };
        Recording recording = Bench.EightBit(Start, Interval, Count, -0.96, 0.02, seed);
        return Table.Timed("Time (s),Probe A (V)", Start, Interval, 2, recording.Samples(wave.Signal));
    }

    /// <summary>The oscillator's own pin: a sine that the probe's capacitance pulls.</summary>
    public static byte[] AtThePin(double errorPpm, ulong seed)
    {
        // Frequency with load C_L over series resonance: 1 + C1/(2 (C0 + C_L)), the textbook form of a resonator's load pulling.
        double pulled = Pulling(Probe) / Pulling(0);
        var sine = new HarmonicSine
        {
            Frequency = Nominal * (1 + errorPpm * 1e-6) * pulled,
            Amplitude = 1.1,
            Offset = 1.62,
            Harmonics = [new(2, -34, 70), new(3, -43, 200), new(4, -58, 15)],
        };
        Recording recording = Bench.EightBit(Start, Interval, Count, -0.96, 0.02, seed);
        return Table.Timed("Time (s),Probe A (V)", Start, Interval, 2, recording.Samples(sine.Build()));
    }

    private static double Pulling(double probe) =>
        1 + Motional / (2 * (Shunt + LoadEach * (LoadEach + probe) / (LoadEach + LoadEach + probe)));

    /// <summary>The filtered output on a spectrum analyser.</summary>
    public static byte[] Spectrum()
    {
        double frequency = Nominal * (1 - 4e-6), power = -6.3;
        SpectrumTrace trace = new SpectrumLines
        {
            Lines =
            [
                new(frequency, power), new(2 * frequency, power - 41.2), new(3 * frequency, power - 28.6),
                new(4 * frequency, power - 52.5), new(5 * frequency, power - 37.9),
            ],
            Start = 100e3,
            Stop = 2.6e6,
            Count = 2501,
            ResolutionBandwidth = 5e3,
            NoiseDbm = -88,
            Sweeps = 8,
            LevelStepDb = 0.01,
            TimebaseReadsPpm = 1.5,
            Seed = 75,
        }.Take();
        var text = new StringBuilder("Frequency (Hz),Level (dBm)\n");
        for (int i = 0; i < trace.Count; i++)
            text.Append(CultureInfo.InvariantCulture, $"{trace.Frequencies[i]:F0},").Append(Table.Fixed(trace.Levels[i], 2)).Append('\n');
        return Encoding.UTF8.GetBytes(text.ToString());
    }
}
