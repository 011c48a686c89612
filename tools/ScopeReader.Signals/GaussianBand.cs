using ScopeReader.Captures;

namespace ScopeReader.Signals;

/// <summary>A made spectrum trace of a band of noise whose density is Gaussian, on a floor of noise, through a Gaussian resolution filter.</summary>
public sealed record GaussianBand
{
    /// <summary>Middle of the band, Hz.</summary>
    public double Centre { get; init; } = 10e6;

    /// <summary>Standard deviation of the density, Hz.</summary>
    public double Sigma { get; init; } = 100e3;

    /// <summary>Power of the whole band.</summary>
    public double PowerDbm { get; init; } = -20;

    /// <summary>First frequency, Hz.</summary>
    public double Start { get; init; } = 9e6;

    /// <summary>Last frequency, Hz.</summary>
    public double Stop { get; init; } = 11e6;

    /// <summary>How many points.</summary>
    public int Count { get; init; } = 1001;

    /// <summary>−3 dB width of the filter, Hz.</summary>
    public double ResolutionBandwidth { get; init; } = 3e3;

    /// <summary>Density of the floor, dBm/Hz.</summary>
    public double FloorDbmPerHertz { get; init; } = -140;

    /// <summary>How many sweeps are averaged, in power.</summary>
    public int Sweeps { get; init; } = 100;

    /// <summary>Seed of the noise.</summary>
    public ulong Seed { get; init; } = 1;

    /// <summary>Sweeps it.</summary>
    public SpectrumTrace Take(TraceAveraging averaging = TraceAveraging.Power)
    {
        var noise = new NormalNoise(Seed);
        // Power response exp(-4 ln 2 (f/B)²): a noise bandwidth of √(π/(4 ln 2)) B and a standard deviation of B/√(8 ln 2).
        double bandwidth = Math.Sqrt(Math.PI / (4 * Math.Log(2))) * ResolutionBandwidth, seen = double.Hypot(Sigma, ResolutionBandwidth / Math.Sqrt(8 * Math.Log(2)));
        double[] frequencies = new double[Count], levels = new double[Count];
        for (int i = 0; i < Count; i++)
        {
            frequencies[i] = Start + i * (Stop - Start) / (Count - 1);
            double x = (frequencies[i] - Centre) / seen, mean = bandwidth * (Math.Pow(10, PowerDbm / 10) * Math.Exp(-x * x / 2) / (seen * Math.Sqrt(2 * Math.PI)) + Math.Pow(10, FloorDbmPerHertz / 10));
            double power = 0;
            for (int k = 0; k < Sweeps; k++)
            {
                double a = noise.Normal(), b = noise.Normal();
                power += (a * a + b * b) / 2 / Sweeps;
            }
            levels[i] = 10 * Math.Log10(mean * power);
        }
        return new SpectrumTrace("made", "dBm", frequencies, levels, ResolutionBandwidth) { Averaging = averaging };
    }
}
