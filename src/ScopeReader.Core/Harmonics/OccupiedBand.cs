namespace ScopeReader.Harmonics;

/// <summary>The band that holds a share of a signal's power, the rest being halved between both sides.</summary>
/// <remarks>For 99 % this is the occupied bandwidth of the Radio Regulations, β/2 = 0.5 %.</remarks>
/// <param name="Low">Hz.</param>
/// <param name="High">Hz.</param>
public readonly record struct OccupiedBand(double Low, double High)
{
    /// <summary>High less low, Hz.</summary>
    public double Width => High - Low;

    /// <summary>Finds it.</summary>
    /// <param name="start">Frequency of the first point, Hz.</param>
    /// <param name="spacing">From point to point, Hz.</param>
    /// <param name="powers">Shape [n]: power of each point in any unit, spread evenly over half a spacing on either side; noise may have been taken off.</param>
    /// <param name="share">Above 0 and below 1.</param>
    /// <returns>The band; null where the powers add up to nothing.</returns>
    public static OccupiedBand? Of(double start, double spacing, ReadOnlySpan<double> powers, double share = 0.99)
    {
        double total = 0;
        foreach (double p in powers)
            total += p;
        if (!(total > 0))
            return null;
        double outside = (1 - share) / 2 * total;
        return new OccupiedBand(start + (Passed(powers, outside, reversed: false) - 0.5) * spacing, start + (powers.Length - 0.5 - Passed(powers, outside, reversed: true)) * spacing);
    }

    // Points, counted from one end, in which a power is reached for the last time that it was not before.
    private static double Passed(ReadOnlySpan<double> powers, double outside, bool reversed)
    {
        double sum = 0;
        for (int i = 0; i < powers.Length; i++)
        {
            double p = powers[reversed ? powers.Length - 1 - i : i];
            if (sum + p >= outside && p > 0)
                return i + (outside - sum) / p;
            sum += p;
        }
        return powers.Length;
    }
}
