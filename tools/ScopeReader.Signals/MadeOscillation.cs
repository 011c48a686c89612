using ScopeReader.Captures;

namespace ScopeReader.Signals;

/// <summary>Two-state waves with an oscillation of a known kind on them.</summary>
/// <remarks>
/// Twenty-one to forty edges, 12 to 40 cycles of the ring between them, 8 to 20 samples a cycle, Q 5 to 30; amplitude 0.1 to 0.3 of
/// the swing at the edge. Tones lie within 20 % of the ring and the noise band within 10 %; every other tone is an exact multiple
/// of the edge rate.
/// </remarks>
public static class MadeOscillation
{
    /// <summary>The kinds, as the finding names them.</summary>
    public static IReadOnlyList<string> Kinds { get; } = ["none", "edge-excited", "free-running", "both", "noise"];

    /// <summary>Makes one.</summary>
    /// <param name="kind">Its number in <see cref="Kinds"/>.</param>
    /// <param name="decibels">Power of the oscillation at the edge over that of the white noise, per sample.</param>
    /// <param name="seed">Seed of everything that is drawn.</param>
    /// <returns>The wave, 1 ns a sample, and whether a tone is a multiple of the edge rate.</returns>
    public static (Waveform Wave, bool IsMultiple) Make(int kind, double decibels, ulong seed)
    {
        var draw = new NormalNoise(seed * 8191 + (ulong)kind);
        double perCycle = draw.Uniform(8, 20), ring = 1 / perCycle, cycles = draw.Uniform(12, 40), q = draw.Uniform(5, 30), amplitude = draw.Uniform(0.1, 0.3);
        double repetition = 1 / (2 * cycles * perCycle), rise = perCycle * draw.Uniform(0.3, 0.45);
        int count = (int)(draw.Uniform(10.5, 20) / repetition);
        var resonance = new Resonance(ring, 1 / (2 * q));
        bool rings = kind is 1 or 3, sings = kind is 2 or 3, isMultiple = seed % 2 == 0;
        double share = amplitude / resonance.Ringing(rise / SquareWave.RiseTimeOverSigma).Magnitude;
        var wave = new SquareWave
        {
            Frequency = repetition,
            DutyFactor = draw.Uniform(0.45, 0.55),
            RiseTime = rise,
            Resonance = rings ? resonance with { Share = Math.Min(1, share) } : null,
        };
        double noise = amplitude / Math.Sqrt(2) / Math.Pow(10, decibels / 20);
        double[] samples = new Recording { Interval = 1, Count = count, Delay = draw.Uniform() / repetition, Noise = noise, Seed = (ulong)(1e15 * draw.Uniform()) }.Samples(wave.Signal);
        double tone = ring * (1 + draw.Uniform(-0.2, 0.2)), phase = draw.Uniform();
        tone = isMultiple ? Math.Round(tone / repetition) * repetition : tone;
        if (sings)
            for (int i = 0; i < count; i++)
                samples[i] += amplitude * Math.Cos(2 * Math.PI * (tone * i + phase));
        if (kind == 4)
            AddBand(samples, ring * (1 + draw.Uniform(-0.1, 0.1)), q, amplitude / Math.Sqrt(2), draw);
        return (new Waveform("made", "V", new TimeAxis(0, 1e-9, AxisSource.Column), samples), isMultiple);
    }

    // White noise through two poles of that frequency and Q, of a stated rms.
    private static void AddBand(double[] samples, double frequency, double q, double rms, NormalNoise draw)
    {
        double radius = Math.Exp(-Math.PI * frequency / q), a = 2 * radius * Math.Cos(2 * Math.PI * frequency), b = -radius * radius, before = 0, last = 0, squares = 0;
        var band = new double[samples.Length];
        int warm = (int)(10 * q / frequency);
        for (int i = -warm; i < samples.Length; i++)
        {
            (before, last) = (last, a * last + b * before + draw.Normal());
            if (i < 0)
                continue;
            band[i] = last;
            squares += last * last;
        }
        double scale = rms / Math.Sqrt(squares / samples.Length);
        for (int i = 0; i < samples.Length; i++)
            samples[i] += scale * band[i];
    }
}
