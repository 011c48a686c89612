namespace ScopeReader.Ringing;

/// <summary>Whether phases gather about one direction: Rayleigh's test.</summary>
public static class PhaseCoherence
{
    /// <summary>Probability that phases without a direction gather as far as this.</summary>
    /// <remarks>p = exp(√(1 + 4n + 4(n² − R²)) − (1 + 2n)), R = n r (Zar; seen in stored code that quotes it).</remarks>
    /// <param name="count">n, how many phases.</param>
    /// <param name="resultant">r, length of the mean of the unit vectors, 0 to 1.</param>
    public static double Probability(int count, double resultant)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(count);
        double n = count, r = n * resultant;
        return Math.Min(1, Math.Exp(Math.Sqrt(1 + 4 * n + 4 * (n * n - r * r)) - (1 + 2 * n)));
    }
}
