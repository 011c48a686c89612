using MathNet.Numerics;

namespace ScopeReader.Harmonics;

/// <summary>Filters of spectrum analysers: noise bandwidth and shape, over the -3 dB width.</summary>
/// <remarks>
/// Power responses: Gaussian exp(-4 ln 2 (f/B)²); n synchronously tuned poles (1 + x²)^(-n), whose noise bandwidth is the integral
/// √π Γ(n - 1/2)/Γ(n). -3 dB stands for half of the power, -6 dB for a quarter.
/// </remarks>
public static class ResolutionFilter
{
    private const double HalfPowerDb = 3.010299956639812;

    /// <summary>Noise bandwidth of a Gaussian filter over its -3 dB width: √(π/(4 ln 2)).</summary>
    public static double GaussianNoiseBandwidth { get; } = Math.Sqrt(Math.PI / (4 * Math.Log(2)));

    /// <summary>Noise bandwidth of synchronously tuned poles over their -3 dB width.</summary>
    /// <param name="poles">1 or more.</param>
    public static double SynchronousNoiseBandwidth(int poles) =>
        Math.Sqrt(Math.PI) * SpecialFunctions.Gamma(poles - 0.5) / SpecialFunctions.Gamma(poles) / (2 * Math.Sqrt(Math.Pow(2, 1.0 / poles) - 1));

    /// <summary>Width of a Gaussian filter some dB down over its -3 dB width.</summary>
    /// <param name="down">dB, above 0.</param>
    public static double GaussianWidth(double down) => Math.Sqrt(down / HalfPowerDb);

    /// <summary>Width of synchronously tuned poles some dB down over their -3 dB width.</summary>
    /// <param name="poles">1 or more.</param>
    /// <param name="down">dB, above 0.</param>
    public static double SynchronousWidth(int poles, double down) => Math.Sqrt((Math.Pow(10, down / 10 / poles) - 1) / (Math.Pow(2, 1.0 / poles) - 1));
}
