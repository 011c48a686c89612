namespace ScopeReader.Harmonics;

/// <summary>Total harmonic distortion from amplitudes.</summary>
public static class Distortion
{
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

    /// <summary>THD_R of a THD_F: to fundamental and harmonics together.</summary>
    public static double ToWhole(double toFundamental) => toFundamental / Math.Sqrt(1 + toFundamental * toFundamental);
}
