using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>The noise of a spectrum trace near a place.</summary>
/// <param name="MeanDb">Level of its mean power.</param>
/// <param name="MeanLevelDb">Mean of its levels.</param>
/// <param name="Points">How many points it was found from.</param>
/// <param name="Averages">How many independent powers each point averages, by their spread: 1 scatters by 5.57 dB.</param>
internal readonly record struct TraceNoise(double MeanDb, double MeanLevelDb, int Points, double Averages)
{
    // The variance in dB of the mean of n exponential powers is (10/ln 10)² ψ'(n), and ψ'(n) is 1/(n - 1/2) within 4 % from n = 1.
    private const double SquareDb = 18.861169, MadToSigma = 1.4826;
    private const int Rounds = 4;

    /// <summary>Noise of a set of points, lines among them left out as outliers.</summary>
    /// <param name="levels">dB; sorted in place.</param>
    public static TraceNoise Of(Span<double> levels)
    {
        levels.Sort();
        // A band of signal may fill more than half of a trace: the start is where the levels lie closest, and what is far above does not count.
        (double median, double sigma) = Densest(levels);
        for (int i = 0; i < Rounds; i++)
        {
            int kept = levels.Length;
            while (kept > 1 && levels[kept - 1] > median + 4 * Math.Max(sigma, 0.25))
                kept--;
            (median, sigma) = Middle(levels[..kept]);
        }
        double power = 0, sum = 0;
        int count = 0;
        foreach (double level in levels)
            if (level <= median + 4 * Math.Max(sigma, 0.25))
            {
                power += Decibels.PowerRatio(level - median);
                sum += level;
                count++;
            }
        return new TraceNoise(median + Decibels.OfPowers(power / count), sum / count, count, sigma > 0 ? SquareDb / (sigma * sigma) + 0.5 : 1e9);
    }

    // Middle of the shortest quarter; a quarter of a normal distribution lies within 0.3186 of its standard deviations.
    private static (double Centre, double Sigma) Densest(ReadOnlySpan<double> sorted)
    {
        int quarter = Math.Max(1, sorted.Length / 4), best = 0;
        for (int i = 0; i + quarter < sorted.Length; i++)
            if (sorted[i + quarter] - sorted[i] < sorted[best + quarter] - sorted[best])
                best = i;
        int end = Math.Min(sorted.Length - 1, best + quarter);
        return ((sorted[best] + sorted[end]) / 2, (sorted[end] - sorted[best]) / (2 * 0.3186));
    }

    private static (double Median, double Sigma) Middle(ReadOnlySpan<double> sorted)
    {
        double median = sorted[sorted.Length / 2];
        double[] distances = new double[sorted.Length];
        for (int i = 0; i < sorted.Length; i++)
            distances[i] = Math.Abs(sorted[i] - median);
        Array.Sort(distances);
        return (median, MadToSigma * distances[distances.Length / 2]);
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
