using System.Globalization;
using ScopeReader.Edges;
using ScopeReader.Readings;

namespace ScopeReader.Ringing;

/// <summary>What the ringing's figures say, and what to try next.</summary>
internal static class RingingFindings
{
    /// <summary>Relative distance within which a ground-lead estimate is a match: common practice, ±40 %.</summary>
    private const double Near = 0.4;

    /// <summary>Writes the finding down from the primary readings.</summary>
    public static void Ringing(WaveformJob job, MeasuredEdge edge)
    {
        ReadingSheet sheet = job.Sheet;
        double frequency = sheet.Primary(Quantities.RingingFrequency)!.Value, decay = sheet.Primary(Quantities.RingingDecayTime)!.Value;
        double amplitude = sheet.Primary(Quantities.RingingAmplitude)!.Value, cycles = frequency * decay;
        string direction = edge.Edge.IsRising ? "rising" : "falling", place = edge.Edge.Edges > 1 ? $"each {direction} edge" : $"the {direction} edge";
        string text = string.Create(CultureInfo.InvariantCulture,
            $"it rings at {Engineering.Format(frequency, job.Waveform.Axis.FrequencyUnit, 3)} after {place}: {amplitude:0.##} % of amplitude at the edge, down to 1/e in {cycles:0.0#} cycles.");
        sheet.Add(new Finding("ringing", $"{text} {Lead(job, frequency)} {Next}"));
    }

    private const string Next =
        "If it stays where it is with the shortest ground, it is the board's: try a resistor in series at the driver, or a resistor and capacitor in series across the node.";

    private static string Lead(WaveformJob job, double frequency)
    {
        if (!job.Waveform.Axis.IsTimed || job.Plan.Chain is not { GroundLead: { } length, ProbeCapacitance: { } capacitance })
            return "Shorten the probe's ground lead first: ringing that moves up is the probe's own.";
        double estimate = GroundLead.Estimate(length, capacitance);
        string about = $"{Engineering.Format(estimate, "Hz", 2)}, which a ground lead of {Engineering.Format(length, "m", 3)} and {Engineering.Format(capacitance, "F", 3)} make";
        return Math.Abs(frequency / estimate - 1) <= Near
            ? $"That is near {about}: suspect the probe first, and shorten its ground lead; ringing that moves up is the probe's own."
            : $"That is far from {about}: the ground lead is not the likely cause.";
    }
}
