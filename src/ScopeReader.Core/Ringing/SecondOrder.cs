namespace ScopeReader.Ringing;

/// <summary>Closed forms of the second-order response ω_n²/(s² + 2ζω_n s + ω_n²), 0 &lt; ζ &lt; 1.</summary>
/// <remarks>Textbook results; α is the decay rate ζω_n in 1/s, f the damped frequency in Hz.</remarks>
public static class SecondOrder
{
    /// <summary>Overshoot of its step response, fraction of the step: e^(−πζ/√(1−ζ²)).</summary>
    public static double Overshoot(double dampingRatio) => Math.Exp(-Math.PI * dampingRatio / Damped(dampingRatio));

    /// <summary>The damping ratio that an overshoot shows, where the driving edge is much faster than the response.</summary>
    /// <param name="overshoot">Fraction of the step, above 0 and below 1.</param>
    public static double DampingRatioOf(double overshoot)
    {
        double log = Math.Log(overshoot);
        return -log / double.Hypot(Math.PI, log);
    }

    /// <summary>Time of the first peak of the step response, s: π/(ω_n√(1−ζ²)).</summary>
    public static double PeakTime(double dampingRatio, double undampedAngular) => Math.PI / (undampedAngular * Damped(dampingRatio));

    /// <summary>Logarithm of the ratio of successive peaks: 2πζ/√(1−ζ²).</summary>
    public static double LogarithmicDecrement(double dampingRatio) => 2 * Math.PI * dampingRatio / Damped(dampingRatio);

    /// <summary>Quality factor: 1/(2ζ).</summary>
    public static double Quality(double dampingRatio) => 1 / (2 * dampingRatio);

    /// <summary>Cycles in which a lightly damped oscillation falls to 1/e: Q/π.</summary>
    public static double CyclesToDecay(double quality) => quality / Math.PI;

    /// <summary>Time after which the envelope of the step response stays within a fraction of the step, s.</summary>
    /// <param name="dampingRatio">ζ.</param>
    /// <param name="undampedAngular">ω_n, rad/s.</param>
    /// <param name="band">The fraction.</param>
    public static double SettlingEnvelope(double dampingRatio, double undampedAngular, double band) =>
        -Math.Log(band * Damped(dampingRatio)) / (dampingRatio * undampedAngular);

    /// <summary>Undamped frequency, Hz, which is what inductance and capacitance set: √(f² + (α/2π)²).</summary>
    public static double UndampedFrequency(double frequency, double decayRate) => double.Hypot(frequency, decayRate / (2 * Math.PI));

    /// <summary>Damping ratio of an oscillation at a frequency that decays at a rate: α/√(α² + (2πf)²).</summary>
    public static double DampingRatio(double frequency, double decayRate) => decayRate / double.Hypot(decayRate, 2 * Math.PI * frequency);

    private static double Damped(double dampingRatio) => Math.Sqrt((1 - dampingRatio) * (1 + dampingRatio));
}
