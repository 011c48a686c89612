namespace ScopeReader.Numerics;

/// <summary>Allan deviation of phases that are taken at equal intervals.</summary>
/// <remarks>
/// NIST SP 1065 (Riley 2008): σ²(τ) = ⟨(x[i+2m] - 2x[i+m] + x[i])²⟩/(2τ²), τ = m·τ0; overlapping with every i, else with every
/// m-th. Frequency data y make phases x[i+1] = x[i] + y[i]·τ0.
/// </remarks>
public static class AllanDeviation
{
    /// <summary>The deviation, of the frequency.</summary>
    /// <param name="phases">x, shape [n], in the unit of the interval.</param>
    /// <param name="interval">τ0.</param>
    /// <param name="averaged">m, 1 or more, with 2m below n.</param>
    /// <param name="overlapping">Every start that there is, else one in m.</param>
    public static double Of(ReadOnlySpan<double> phases, double interval, int averaged, bool overlapping = true)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(averaged, 1);
        ArgumentOutOfRangeException.ThrowIfLessThan(phases.Length, 2 * averaged + 1, nameof(phases));
        double squares = 0, tau = averaged * interval;
        int count = 0;
        for (int i = 0; i + 2 * averaged < phases.Length; i += overlapping ? 1 : averaged)
        {
            double second = phases[i + 2 * averaged] - 2 * phases[i + averaged] + phases[i];
            squares += second * second;
            count++;
        }
        return Math.Sqrt(squares / (2 * count)) / tau;
    }

    /// <summary>Equivalent degrees of freedom of the overlapping estimate under white frequency noise, the fewer of the usual kinds.</summary>
    /// <param name="points">n.</param>
    /// <param name="averaged">m.</param>
    /// <remarks>SP 1065, table of simple approximations (from memory): (3(n - 1)/2m - 2(n - 2)/n)·4m²/(4m² + 5).</remarks>
    public static double DegreesOfFreedom(int points, int averaged)
    {
        double n = points, m = averaged;
        return Math.Max(1, (3 * (n - 1) / (2 * m) - 2 * (n - 2) / n) * 4 * m * m / (4 * m * m + 5));
    }
}
