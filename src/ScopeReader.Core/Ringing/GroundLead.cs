namespace ScopeReader.Ringing;

/// <summary>The resonance of a probe's ground lead with its input capacitance.</summary>
public static class GroundLead
{
    /// <summary>Radius that a ground lead's wire is taken to have, m: common practice.</summary>
    public const double UsualRadius = 0.4e-3;

    private const double MagneticConstant = 4e-7 * Math.PI;

    /// <summary>Inductance of a straight round wire at high frequency, H: (μ0/2π) l (ln(2l/r) − 1).</summary>
    /// <remarks>Rosa 1908, Grover 1946 (from memory). The short form, for wires much longer than thick.</remarks>
    /// <param name="length">m.</param>
    /// <param name="radius">m.</param>
    public static double Inductance(double length, double radius) => MagneticConstant / (2 * Math.PI) * length * (Math.Log(2 * length / radius) - 1);

    /// <summary>Resonance of an inductance with a capacitance, Hz: 1/(2π√(LC)).</summary>
    public static double Resonance(double inductance, double capacitance) => 1 / (2 * Math.PI * Math.Sqrt(inductance * capacitance));

    /// <summary>Where a ground lead would ring with a probe's input capacitance, Hz; good to some tens of percent.</summary>
    public static double Estimate(double length, double capacitance) => Resonance(Inductance(length, UsualRadius), capacitance);
}
