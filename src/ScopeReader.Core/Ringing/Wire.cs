namespace ScopeReader.Ringing;

/// <summary>Inductance of round wires that are not magnetic, H.</summary>
/// <remarks>
/// Rosa 1908, Grover 1946 (from memory; the numbers agree with the Neumann integral). A straight wire's is a partial inductance:
/// it is the loop's only where the return path is far, and less where it is near. At high frequency the current keeps to the surface.
/// </remarks>
public static class Wire
{
    /// <summary>Radius that hook-up wire and component leads are taken to have, m.</summary>
    public const double UsualRadius = 0.25e-3;

    private const double MagneticConstant = 4e-7 * Math.PI, PerLength = MagneticConstant / (2 * Math.PI);

    /// <summary>A straight wire at high frequency, exact for a thin one: (μ0/2π)[l asinh(l/r) − √(l² + r²) + r].</summary>
    /// <param name="length">m.</param>
    /// <param name="radius">m.</param>
    public static double Straight(double length, double radius) =>
        PerLength * (length * Math.Asinh(length / radius) - double.Hypot(length, radius) + radius);

    /// <summary>A straight wire much longer than thick at high frequency: (μ0/2π) l (ln(2l/r) − 1).</summary>
    /// <param name="length">m.</param>
    /// <param name="radius">m.</param>
    public static double LongStraight(double length, double radius) => PerLength * length * (Math.Log(2 * length / radius) - 1);

    /// <summary>The same at low frequency, where the current fills the wire: (μ0/2π) l (ln(2l/r) − 3/4).</summary>
    /// <param name="length">m.</param>
    /// <param name="radius">m.</param>
    public static double LongStraightSlow(double length, double radius) => PerLength * length * (Math.Log(2 * length / radius) - 0.75);

    /// <summary>A circular loop at high frequency: μ0 R (ln(8R/a) − 2).</summary>
    /// <param name="loopRadius">R, m.</param>
    /// <param name="radius">a, the wire's, m.</param>
    public static double Loop(double loopRadius, double radius) => MagneticConstant * loopRadius * (Math.Log(8 * loopRadius / radius) - 2);

    /// <summary>Length of a straight wire of an inductance at high frequency, m.</summary>
    /// <param name="inductance">H, above 0.</param>
    /// <param name="radius">m.</param>
    public static double LengthOf(double inductance, double radius)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(inductance);
        double low = 0, high = radius;
        while (Straight(high, radius) < inductance)
            (low, high) = (high, 2 * high);
        for (int i = 0; i < 60; i++)
        {
            double middle = (low + high) / 2;
            (low, high) = Straight(middle, radius) < inductance ? (middle, high) : (low, middle);
        }
        return (low + high) / 2;
    }
}
