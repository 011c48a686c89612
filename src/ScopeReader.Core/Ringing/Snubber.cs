namespace ScopeReader.Ringing;

/// <summary>A resistor and a capacitor in series across a capacitance that rings with an inductance.</summary>
/// <remarks>
/// With the snubber's capacitor n times the ringing capacitance the loop has three poles; their smallest damping ratio is largest,
/// (√(1 + n) − 1)/2, at R = √(L/C)·(1 + n)^(3/4)/n. Derived from the loop's equation; at n = 8 the three poles meet on the real axis.
/// </remarks>
/// <param name="Resistance">Ohm.</param>
/// <param name="Capacitance">F.</param>
/// <param name="DampingRatio">Of the pole pair.</param>
public sealed record Snubber(double Resistance, double Capacitance, double DampingRatio)
{
    /// <summary>The best one for a ratio of capacitances.</summary>
    /// <param name="inductance">Of the loop, H.</param>
    /// <param name="capacitance">Of the node, F.</param>
    /// <param name="ratio">n, above 0 and at most 8.</param>
    public static Snubber Of(double inductance, double capacitance, double ratio)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(ratio);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(ratio, 8);
        double resistance = ResonantLoop.Impedance(inductance, capacitance) * Math.Pow(1 + ratio, 0.75) / ratio;
        return new Snubber(resistance, ratio * capacitance, (Math.Sqrt(1 + ratio) - 1) / 2);
    }

    /// <summary>Heat in the resistor, W: the capacitor is charged and discharged once a period, C V² f.</summary>
    /// <param name="swing">Step, V.</param>
    /// <param name="frequency">Repetition, Hz.</param>
    public double Loss(double swing, double frequency) => Capacitance * swing * swing * frequency;
}
