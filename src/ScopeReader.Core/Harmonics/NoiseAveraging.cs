namespace ScopeReader.Harmonics;

/// <summary>How far averages of noise lie below its mean power, by what is averaged; a tone is read right by all of them.</summary>
/// <remarks>The power of noise through a narrow filter is spread exponentially, its envelope as Rayleigh's distribution.</remarks>
public static class NoiseAveraging
{
    /// <summary>Averages of dB read low by (10/ln 10)·γ, γ Euler's constant.</summary>
    public static double OfLevels { get; } = 10 / Math.Log(10) * 0.5772156649015329;

    /// <summary>Averages of voltage read low by 10 log(4/π).</summary>
    public static double OfVoltages { get; } = 10 * Math.Log10(4 / Math.PI);
}
