namespace ScopeReader.Harmonics;

/// <summary>Total harmonic distortion from amplitudes.</summary>
public static class Distortion
{
    /// <summary>Change of SINAD with a bit, dB: 20 log 2.</summary>
    internal const double DbPerBit = 6.020599913279624;

    // 10 log 1.5: a full-scale sine over a step's rounding error.
    private const double IdealDb = 1.7609125905568124;

    /// <summary>THD_F: root sum of squares of the harmonics over the fundamental.</summary>
    /// <param name="amplitudes">A_1, A_2 … in one unit; A_1 above 0.</param>
    /// <returns>A ratio.</returns>
    public static double ToFundamental(ReadOnlySpan<double> amplitudes)
    {
        double sum = 0;
        foreach (double a in amplitudes[1..])
            sum += a * a;
        return Math.Sqrt(sum) / amplitudes[0];
    }

    /// <summary>Effective bits of a ratio of signal to noise and distortion: (SINAD - 1.7609 dB)/6.0206 dB (IEEE Std 1057 and 1241, from memory).</summary>
    /// <param name="sinadDb">SINAD, dB.</param>
    public static double EffectiveBits(double sinadDb) => (sinadDb - IdealDb) / DbPerBit;

    /// <summary>THD_R of a THD_F: to fundamental and harmonics together.</summary>
    public static double ToWhole(double toFundamental) => toFundamental / Math.Sqrt(1 + toFundamental * toFundamental);
}
