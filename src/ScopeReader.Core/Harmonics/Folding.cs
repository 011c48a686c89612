namespace ScopeReader.Harmonics;

/// <summary>Where sampling shows frequencies above half of the sample rate.</summary>
public static class Folding
{
    /// <summary>The frequency that samples show.</summary>
    /// <param name="frequency">True frequency, 0 or more.</param>
    /// <param name="sampleRate">In the same unit, above 0.</param>
    /// <returns>0 to half of the sample rate: |f - fs·round(f/fs)|.</returns>
    public static double Apparent(double frequency, double sampleRate) =>
        Math.Abs(frequency - sampleRate * Math.Round(frequency / sampleRate));

    /// <summary>The lowest other harmonic that cannot be told from one in a record: they show within two cycles a record of each other.</summary>
    /// <param name="frequency">The fundamental's, cycles per sample.</param>
    /// <param name="count">Number of samples.</param>
    /// <param name="order">The harmonic.</param>
    /// <param name="highest">Harmonics up to here are looked at.</param>
    /// <returns>
    /// Its order; 0 for a constant, which a harmonic near a multiple of the sample rate shows as; its own at half of the sample rate,
    /// where only one of its two phases shows; null where there is none.
    /// </returns>
    public static int? Collision(double frequency, int count, int order, int highest)
    {
        double place = Apparent(order * frequency, 1), near = 2.0 / count;
        if (place < near)
            return 0;
        if (2 * (0.5 - place) < near)
            return order;
        for (int other = 1; other <= highest; other++)
            if (other != order && Math.Abs(Apparent(other * frequency, 1) - place) < near)
                return other;
        return null;
    }

    /// <summary>Which harmonic above half of the sample rate a line may be.</summary>
    /// <param name="line">Where it shows, cycles per sample.</param>
    /// <param name="tolerance">How far off it may be, besides what the fundamental's uncertainty makes of it.</param>
    /// <param name="frequency">The fundamental's, cycles per sample.</param>
    /// <param name="uncertainty">Standard uncertainty of that.</param>
    /// <param name="from">The lowest order that is looked at.</param>
    /// <param name="to">The highest.</param>
    /// <returns>The lowest order that fits, or null.</returns>
    public static int? Order(double line, double tolerance, double frequency, double uncertainty, int from, int to)
    {
        for (int order = Math.Max(from, (int)(0.5 / frequency) + 1); order <= to; order++)
            if (Math.Abs(Apparent(order * frequency, 1) - line) < tolerance + 3 * order * uncertainty)
                return order;
        return null;
    }
}
