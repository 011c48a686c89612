using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Ringing;

/// <summary>What the inductance and capacitance that ring mean on the bench: how much wire, and which parts would damp it.</summary>
internal static class LoopFindings
{
    // Three times the node's capacitance is what bench practice starts from; it reaches the same damping as the resistor.
    private const double SnubberRatio = 3;

    /// <summary>The findings.</summary>
    /// <param name="loop">The readings.</param>
    /// <param name="swing">Step between the states, V; null where it is not in volts.</param>
    /// <param name="frequency">Repetition frequency, Hz; null for a single edge.</param>
    public static IEnumerable<Finding> Of(LoopReadings loop, double? swing, double? frequency)
    {
        double l = loop.Inductance.Value, c = loop.Farad, length = Wire.LengthOf(l, Wire.UsualRadius);
        yield return new Finding("ringing-loop",
            $"what rings is {Engineering.Format(l, "H", 2)} with {Engineering.Format(c, "F", 2)}: the inductance of {Engineering.Format(length, "m", 2)} of wire 0.5 mm thick with its return far away "
            + "(Rosa, Grover). Look for a loop of that length: ground lead, jumper, supply and return.");

        Snubber snubber = Snubber.Of(l, c, SnubberRatio);
        string series = loop.Damping is { } r
            ? string.Create(CultureInfo.InvariantCulture, $"{Engineering.Format(r.Value, "ohm", 2)} more in series at the driver bring the damping ratio from {loop.DampingRatio:0.00} to {LoopReadings.Target:0.0}")
            : string.Create(CultureInfo.InvariantCulture, $"with a damping ratio of {loop.DampingRatio:0.00} it needs no more resistance");
        string loss = swing is { } v && frequency is { } f
            ? $"; it turns {Engineering.Format(snubber.Loss(v, f), "W", 2)} (C V² f) into heat, so rate the resistor for twice that"
            : "; its loss is C V² f";
        yield return new Finding("ringing-cure", string.Create(CultureInfo.InvariantCulture,
            $"{series}. Or a snubber across the node, {Engineering.Format(snubber.Resistance, "ohm", 2)} in series with {Engineering.Format(snubber.Capacitance, "F", 2)}: damping ratio {snubber.DampingRatio:0.0} where the loop has no other{loss}. Shortening the loop comes before either."));
    }
}
