using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Ringing;

/// <summary>Inductance and damping resistance of what rings, where the plan states the node's capacitance.</summary>
internal static class LoopAnalyser
{
    /// <summary>What it measures, or says why not.</summary>
    public static IReadOnlyList<Quantity> All { get; } = [Quantities.RingingInductance, Quantities.RingingCapacitance, Quantities.DampingResistance];

    /// <summary>Measures from the primary readings of the ringing.</summary>
    public static void Measure(WaveformJob job)
    {
        ReadingSheet sheet = job.Sheet;
        if (LoopReadings.Ringing.Of(sheet.Primary(Quantities.RingingFrequency), sheet.Primary(Quantities.RingingDampingRatio)) is not { } ringing
            || !job.Plan.Conditions.TryGetValue(PlanKeys.NodeCapacitance, out Condition? stated) || stated is not { Unit: "F", Value: > 0 })
        {
            sheet.Refuse("capacitance-unknown", "a frequency alone gives no inductance: state the node's capacitance as node-capacitance in [conditions], "
                + "or capture again with a known capacitor across the node and compare the two with --added", [.. All]);
            return;
        }
        double? tolerance = job.Plan.Conditions.TryGetValue(PlanKeys.NodeCapacitance + PlanKeys.Tolerance, out Condition? known) && known.Unit == "%" ? known.Value / 100 : null;
        LoopReadings loop = LoopReadings.Of(ringing, stated.Value, tolerance);
        sheet.Add(loop.Inductance);
        sheet.Refuse("capacitance-stated", "the plan states the node's capacitance; compare with --added measures it", Quantities.RingingCapacitance);
        if (loop.Damping is { } damping)
            sheet.Add(damping);
        else
            sheet.Refuse("damped", "the ringing is damped to a ratio of 0.5 or more as it is", Quantities.DampingResistance);
        foreach (Finding finding in LoopFindings.Of(loop, sheet.Primary(Quantities.Amplitude) is { Unit: "V" } a ? a.Value : null, sheet.Primary(Quantities.Frequency) is { Unit: "Hz" } f ? f.Value : null))
            sheet.Add(finding);
    }
}
