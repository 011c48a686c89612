namespace ScopeReader.Frequency;

/// <summary>What the error of crossings read off straight lines between samples does to a period; see <see cref="ScopeReader.Edges.InterpolationError"/>.</summary>
public static class EdgeInterpolation
{
    /// <summary>Fewer wraps of the crossings through the sample interval than this do not average the error.</summary>
    public const double FewestWraps = 5;

    private const int HighestHarmonic = 4;

    /// <summary>Largest error of a band-limited fit on a Gaussian edge, samples: what the edge holds beyond half the sample rate is folded.</summary>
    /// <param name="duration">10 to 90 % duration of the edge, samples.</param>
    /// <remarks>
    /// The edge's spectrum is e^(-aν²)/(2πν), a = 2π²s², s = d/2.5631. Its part beyond ν = 1/2, both signs, is e^(-a/4)/(πa/2) at most,
    /// and over the slope 1/(s√(2π)) that is a time. Against long windowed-sinc interpolation: 0.098 for 0.069 (d = 1), 0.0052 for 0.0044 (2), 8e-5 for 6e-5 (3).
    /// </remarks>
    public static double LargestAliasing(double duration)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(duration);
        double s = duration / 2.5631, a = 2 * Math.PI * Math.PI * s * s;
        return a > 0 ? Math.Min(0.5, s * Math.Sqrt(2 * Math.PI) * Math.Exp(-a / 4) / (Math.PI * a / 2)) : 0.5;
    }

    /// <summary>Bound of the relative error that it can leave in a period by regression over <paramref name="samples"/> samples: 3 e/N.</summary>
    /// <param name="error">Largest error of one crossing, samples.</param>
    /// <param name="samples">Length of the record, samples.</param>
    public static double RelativeBound(double error, double samples) => 3 * error / samples;

    /// <summary>
    /// The lowest multiple of the period, up to four, that is so near a whole number of samples that the crossings do not
    /// wrap through the sample interval often enough; 0 where there is none.
    /// </summary>
    /// <param name="period">The period, samples.</param>
    /// <param name="cycles">Cycles in the record.</param>
    public static int CommensurateMultiple(double period, double cycles)
    {
        for (int m = 1; m <= HighestHarmonic; m++)
            if (Wraps(period, cycles, m) < FewestWraps)
                return m;
        return 0;
    }

    /// <summary>How many times the crossings wrap through the sample interval, at a multiple of the period.</summary>
    internal static double Wraps(double period, double cycles, int multiple) =>
        cycles * Math.Abs(multiple * period - Math.Round(multiple * period));
}
