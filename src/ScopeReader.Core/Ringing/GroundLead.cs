namespace ScopeReader.Ringing;

/// <summary>The resonance of a probe's ground lead with its input capacitance.</summary>
public static class GroundLead
{
    /// <summary>Radius that a ground lead's wire is taken to have, m: common practice.</summary>
    public const double UsualRadius = 0.4e-3;

    /// <summary>Where a ground lead would ring with a probe's input capacitance, Hz; good to some tens of percent.</summary>
    /// <param name="length">m.</param>
    /// <param name="capacitance">F.</param>
    public static double Estimate(double length, double capacitance) => ResonantLoop.Frequency(Wire.LongStraight(length, UsualRadius), capacitance);
}
