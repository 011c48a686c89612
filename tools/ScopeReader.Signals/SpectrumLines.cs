using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader.Signals;

/// <summary>A made spectrum trace: lines and noise through a Gaussian resolution filter.</summary>
/// <remarks>
/// Each point dwells longer than the filter remembers, so noise is independent from point to point. Line and noise add as
/// phasors; sweeps are averaged in power. The Gaussian filter is −3.0103 dB at half of the resolution bandwidth.
/// </remarks>
public sealed record SpectrumLines
{
    /// <summary>The lines; the first is the fundamental.</summary>
    public IReadOnlyList<SpectrumLine> Lines { get; init; } = [];

    /// <summary>First frequency, Hz.</summary>
    public double Start { get; init; }

    /// <summary>Last frequency, Hz.</summary>
    public double Stop { get; init; } = 5e6;

    /// <summary>How many points.</summary>
    public int Count { get; init; } = 1001;

    /// <summary>−3 dB width of the filter, Hz.</summary>
    public double ResolutionBandwidth { get; init; } = 10e3;

    /// <summary>Mean noise power in the resolution bandwidth; null for none.</summary>
    public double? NoiseDbm { get; init; }

    /// <summary>How many sweeps are averaged, in power.</summary>
    public int Sweeps { get; init; } = 1;

    /// <summary>Indicated minus true frequency, ppm.</summary>
    public double TimebaseReadsPpm { get; init; }

    /// <summary>Step of the levels, dB; 0 for none.</summary>
    public double LevelStepDb { get; init; }

    /// <summary>Seed of the noise.</summary>
    public ulong Seed { get; init; } = 1;

    /// <summary>Sweeps it.</summary>
    public SpectrumTrace Take(string name = "made")
    {
        var noise = new NormalNoise(Seed);
        double[] frequencies = new double[Count], levels = new double[Count];
        for (int i = 0; i < Count; i++)
        {
            frequencies[i] = Start + i * (Stop - Start) / (Count - 1);
            levels[i] = Level(frequencies[i] / (1 + TimebaseReadsPpm * 1e-6), noise);
            if (LevelStepDb > 0)
                levels[i] = LevelStepDb * Math.Round(levels[i] / LevelStepDb);
        }
        return new SpectrumTrace(name, "dBm", frequencies, levels, ResolutionBandwidth);
    }

    /// <summary>What is known of it, by quantity identifier.</summary>
    public IReadOnlyDictionary<string, double> Truth()
    {
        SpectrumLine fundamental = Lines[0];
        var truth = new Dictionary<string, double> { ["peak-frequency"] = fundamental.Frequency, ["peak-power"] = fundamental.PowerDbm };
        foreach (SpectrumLine line in Lines.Skip(1))
        {
            int number = (int)Math.Round(line.Frequency / fundamental.Frequency);
            if (number >= 2 && Math.Abs(line.Frequency / fundamental.Frequency - number) < 1e-9)
                truth[Quantities.Harmonic(number).Id] = line.PowerDbm - fundamental.PowerDbm;
        }
        return truth;
    }

    private double Level(double frequency, NormalNoise noise)
    {
        // Watt over milliwatt: amplitudes are roots of it. Lines far apart share no point that matters, so their phases don't either.
        double signal = 0;
        foreach (SpectrumLine line in Lines)
        {
            double x = (frequency - line.Frequency) / (ResolutionBandwidth / 2);
            signal += Math.Pow(10, line.PowerDbm / 20) * Math.Exp(-Math.Log(2) / 2 * x * x);
        }
        double spread = NoiseDbm is { } dbm ? Math.Sqrt(Math.Pow(10, dbm / 10) / 2) : 0, power = 0;
        for (int k = 0; k < Sweeps; k++)
        {
            double real = signal + spread * noise.Normal(), imaginary = spread * noise.Normal();
            power += (real * real + imaginary * imaginary) / Sweeps;
        }
        return 10 * Math.Log10(Math.Max(power, 1e-30));
    }
}
