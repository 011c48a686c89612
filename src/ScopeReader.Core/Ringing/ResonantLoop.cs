namespace ScopeReader.Ringing;

/// <summary>Closed forms of an inductance that rings with a capacitance. Frequencies are undamped ones, Hz.</summary>
public static class ResonantLoop
{
    /// <summary>Undamped frequency, Hz: 1/(2π√(LC)).</summary>
    public static double Frequency(double inductance, double capacitance) => 1 / (2 * Math.PI * Math.Sqrt(inductance * capacitance));

    /// <summary>Inductance, H, that rings at a frequency with a capacitance: 1/(4π²f²C).</summary>
    public static double Inductance(double frequency, double capacitance) => 1 / (4 * Math.PI * Math.PI * frequency * frequency * capacitance);

    /// <summary>Capacitance, F, from the frequencies without and with a capacitor added to it: C_add/((f1/f2)² − 1).</summary>
    /// <param name="without">f1.</param>
    /// <param name="with">f2, below f1.</param>
    /// <param name="added">C_add, F.</param>
    public static double Capacitance(double without, double with, double added)
    {
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(with, without);
        double ratio = without / with;
        return added / (ratio * ratio - 1);
    }

    /// <summary>Characteristic impedance, ohm: √(L/C).</summary>
    public static double Impedance(double inductance, double capacitance) => Math.Sqrt(inductance / capacitance);

    /// <summary>Resistance in series with the loop, ohm, that gives a damping ratio: 2ζ√(L/C); critical at 1.</summary>
    public static double SeriesResistance(double inductance, double capacitance, double dampingRatio) => 2 * dampingRatio * Impedance(inductance, capacitance);
}
