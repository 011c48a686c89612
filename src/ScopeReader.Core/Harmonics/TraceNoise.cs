using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>The noise of a spectrum trace near a place.</summary>
/// <param name="MeanDb">Level of its mean power.</param>
/// <param name="Averages">How many independent powers each point averages, by their spread: 1 scatters by 5.57 dB.</param>
internal readonly record struct TraceNoise(double MeanDb, double Averages)
{
    // The variance in dB of the mean of n exponential powers is (10/ln 10)² ψ'(n), and ψ'(n) is 1/(n - 1/2) within 4 % from n = 1.
    private const double SquareDb = 18.861169, MadToSigma = 1.4826;

    /// <summary>Noise of a set of points, lines among them left out as outliers.</summary>
    /// <param name="levels">dB; sorted in place.</param>
    public static TraceNoise Of(Span<double> levels)
    {
        levels.Sort();
        double median = levels[levels.Length / 2];
        double[] distances = new double[levels.Length];
        for (int i = 0; i < levels.Length; i++)
            distances[i] = Math.Abs(levels[i] - median);
        Array.Sort(distances);
        double sigma = MadToSigma * distances[distances.Length / 2], power = 0;
        int count = 0;
        foreach (double level in levels)
            if (level <= median + 4 * Math.Max(sigma, 0.25))
            {
                power += Decibels.PowerRatio(level - median);
                count++;
            }
        return new TraceNoise(median + Decibels.OfPowers(power / count), sigma > 0 ? SquareDb / (sigma * sigma) + 0.5 : 1e9);
    }

    /// <summary>The level that noise alone exceeds with probability 1 % at any of some points: the tail of a χ² (Laurent and Massart 2000, from memory), and 3 dB at least.</summary>
    public double Threshold(int points)
    {
        double x = Math.Log(100.0 * points) / Averages;
        return MeanDb + Math.Max(3, Decibels.OfPowers(1 + Math.Sqrt(2 * x) + x));
    }

    /// <summary>Standard uncertainty that this noise gives a line read together with it, dB of the line alone.</summary>
    /// <param name="lineDb">Level of the line alone.</param>
    public double Of(double lineDb)
    {
        double noise = Decibels.PowerRatio(MeanDb - lineDb);
        return Decibels.PerRelativeAmplitude / 2 * Math.Sqrt((2 * noise + noise * noise) / Averages);
    }
}
