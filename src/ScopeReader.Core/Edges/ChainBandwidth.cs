using ScopeReader.Captures;

namespace ScopeReader.Edges;

/// <summary>What a measuring chain of a stated bandwidth makes of an ideal step: 10 to 90 % duration is K over bandwidth.</summary>
public static class ChainBandwidth
{
    /// <summary>K of a single pole: ln 9/(2π).</summary>
    public static double SinglePole { get; } = Math.Log(9) / (2 * Math.PI);

    /// <summary>K of a Gaussian response: Φ⁻¹(0.9)·√(ln 2)/π.</summary>
    public static double Gaussian { get; } = GaussianEdge.DurationOverSigma * Math.Sqrt(Math.Log(2)) / (2 * Math.PI);

    /// <summary>K of a maximally flat response of four poles (Butterworth): steep roll-off, 11 % of overshoot.</summary>
    public static double Flat { get; } = 0.38712994723645735;

    /// <summary>K for a stated shape; gentle roll-offs lie between 0.34 and 0.35, which is also what an unknown one is taken for.</summary>
    public static double Factor(ChainResponse response) => response switch
    {
        ChainResponse.Gaussian => Gaussian,
        ChainResponse.Flat => Flat,
        _ => 0.35,
    };

    /// <summary>10 to 90 % duration that the chain alone would show, s; null where no bandwidth is stated.</summary>
    /// <remarks>Probe and instrument combine as the root of the sum of squares: exact for Gaussian responses.</remarks>
    public static double? Duration(MeasuringChain chain)
    {
        ArgumentNullException.ThrowIfNull(chain);
        if (chain.InputBandwidth is null && chain.ProbeBandwidth is null)
            return null;
        double k = Factor(chain.Response);
        return Combine(chain.InputBandwidth is { } input ? k / input : 0, chain.ProbeBandwidth is { } probe ? k / probe : 0);
    }

    /// <summary>What is left of a measured duration without the chain's: the root of the difference of squares.</summary>
    /// <param name="measured">Measured duration, at least <paramref name="chain"/>.</param>
    /// <param name="chain">The chain's own.</param>
    public static double Corrected(double measured, double chain)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(measured, chain);
        return Math.Sqrt((measured - chain) * (measured + chain));
    }

    /// <summary>Duration of two Gaussian stages in a row: the root of the sum of squares.</summary>
    public static double Combine(double first, double second) => double.Hypot(first, second);
}
