using MathNet.Numerics;

namespace ScopeReader.Signals;

/// <summary>One step with a Gaussian edge through a single pole: a slow edge into a capacitor, as a driver of finite speed gives it.</summary>
/// <remarks>Convolution of a Gaussian step of standard deviation s with the pole: Φ(t/s) − e^(−t/τ + s²/2τ²) Φ(t/s − s/τ).</remarks>
public sealed record SinglePoleEdge : ISignal
{
    /// <summary>Level before the edge, V.</summary>
    public double Low { get; init; }

    /// <summary>Settled level after it, V.</summary>
    public double High { get; init; } = 1;

    /// <summary>Time constant τ, s.</summary>
    public double TimeConstant { get; init; } = 500e-9;

    /// <summary>Standard deviation of the edge that goes in, s.</summary>
    public double EdgeSigma { get; init; } = 10e-9;

    /// <inheritdoc/>
    public double At(double time)
    {
        double s = EdgeSigma, r = s / TimeConstant;
        // Long before the edge the exponential overflows where the distribution function has long vanished.
        double lag = time < -12 * s ? 0 : Math.Exp(-time / TimeConstant + r * r / 2) * Phi(time / s - r);
        return Low + (High - Low) * (Phi(time / s) - lag);
    }

    private static double Phi(double z) => 0.5 * SpecialFunctions.Erfc(-z / Math.Sqrt(2));
}
