using ScopeReader.Numerics;

namespace ScopeReader.Edges;

/// <summary>The edge of a Gaussian response: the model that interpolation is judged on.</summary>
internal static class GaussianEdge
{
    /// <summary>10 to 90 % over the standard deviation of the edge: 2 Φ⁻¹(0.9).</summary>
    public const double DurationOverSigma = 2.5631031310892007;

    /// <summary>The step at a time after it passed a level.</summary>
    /// <param name="time">Samples.</param>
    /// <param name="sigma">Standard deviation of the edge, samples.</param>
    /// <param name="quantile">Φ⁻¹ of the level.</param>
    public static double At(double time, double sigma, double quantile) => BoundedNormal.NormalCumulative(time / sigma + quantile);

    /// <summary>Slope where it passes the level, per sample.</summary>
    public static double Slope(double sigma, double quantile) => Math.Exp(-0.5 * quantile * quantile) / (Math.Sqrt(2 * Math.PI) * sigma);
}
