using ScopeReader.Readings;
using ScopeReader.Ringing;

namespace ScopeReader.Comparing;

/// <summary>A known capacitor across the node of the compared capture: from the two ringing frequencies come inductance and capacitance.</summary>
/// <param name="Farad">The capacitor, F, above 0.</param>
/// <param name="Tolerance">Its tolerance, ± of itself; null where nobody stated it.</param>
public sealed record AddedCapacitor(double Farad, double? Tolerance)
{
    private static readonly Quantity[] Wanted = [Quantities.RingingInductance, Quantities.RingingCapacitance, Quantities.DampingResistance];

    /// <summary>A comparison with what the capacitor tells in it.</summary>
    /// <param name="comparison">A comparison of two sides.</param>
    public Comparison Tell(Comparison comparison)
    {
        ArgumentNullException.ThrowIfNull(comparison);
        foreach (ChannelPair pair in ChannelPair.Of(comparison.Reference, comparison.Sides[0], out _))
        {
            ChannelMeasurement a = pair.Reference[0], b = pair.Compared[0];
            if (LoopReadings.Ringing.Of(a.Primary(Quantities.RingingFrequency), a.Primary(Quantities.RingingDampingRatio)) is not { } without
                || LoopReadings.Ringing.Of(b.Primary(Quantities.RingingFrequency), b.Primary(Quantities.RingingDampingRatio)) is not { } with)
                continue;
            double doubt = new Budget([.. without.Own(1), .. with.Own(1)]).ExpandedUncertainty;
            if (without.Frequency - with.Frequency <= doubt)
                return Refused(comparison, "ringing-not-lowered", $"the added capacitor has not lowered the ringing ({Engineering.Format(without.Frequency, "Hz", 4)} without, "
                    + $"{Engineering.Format(with.Frequency, "Hz", 4)} with it): put it across the node that rings, and name the capture without it first");
            LoopReadings loop = LoopReadings.Of(without, with, Farad, Tolerance);
            string[] doubts = with.Frequency / without.Frequency is var ratio and (< 0.5 or > 0.7)
                ? [$"the frequency fell to {Engineering.Format(100 * ratio, "%", 2)}; a capacitor that brings it to 50 to 70 % gives the least uncertainty"] : [];
            double? swing = a.Primary(Quantities.Amplitude) is { Unit: "V" } amplitude ? amplitude.Value : null;
            return comparison with
            {
                Readings = [.. new[] { loop.Inductance, loop.Capacitance, loop.Damping }.OfType<Reading>()],
                Findings = [.. comparison.Findings, .. LoopFindings.Of(loop, swing, a.Primary(Quantities.Frequency) is { Unit: "Hz" } f ? f.Value : null), .. doubts.Select(d => new Finding("added-capacitor", d))],
            };
        }
        return Refused(comparison, "no-ringing", "inductance and capacitance come from ringing in both captures, and one of them shows none in Hz");
    }

    private static Comparison Refused(Comparison comparison, string code, string reason) =>
        comparison with { NotMeasured = [.. Wanted.Select(q => new NotMeasured(q, code, reason))] };
}
