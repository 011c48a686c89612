using System.Globalization;
using ScopeReader.Edges;
using ScopeReader.Readings;

namespace ScopeReader.Ringing;

/// <summary>The kind of oscillation as a finding, and frequency and level of one that no edge starts.</summary>
internal static class KindAnalyser
{
    private static readonly Quantity[] All = [Quantities.OscillationFrequency, Quantities.OscillationLevel];

    /// <summary>Looks, and writes down what it is.</summary>
    /// <param name="job">The job.</param>
    /// <param name="transitions">All transitions, in order.</param>
    /// <param name="edges">The averaged edges.</param>
    /// <param name="ringing">What rings after them, the best first.</param>
    /// <returns>The kind; null where it cannot be told.</returns>
    public static RingingKind? Measure(WaveformJob job, IReadOnlyList<Transition> transitions, IReadOnlyList<MeasuredEdge> edges, IReadOnlyList<EdgeRinging> ringing)
    {
        if (transitions.Count < KindOfRinging.FewestEdges)
        {
            job.Sheet.Refuse("too-few-edges", string.Create(CultureInfo.InvariantCulture,
                $"whether an oscillation comes with the edges or is there by itself shows from {KindOfRinging.FewestEdges} edges on, and the record holds {transitions.Count}; take a longer record"), All);
            return null;
        }
        double? repetition = job.Sheet.Primary(Quantities.Frequency)?.Value * job.Waveform.Interval * job.Chain.TimeFactor;
        KindOfRinging? found = KindOfRinging.Of(job.Waveform.Samples, transitions, Duration(edges, true), Duration(edges, false),
            [.. ringing.Select(r => r.Fit.Curve.Frequency)], repetition);
        if (found is null)
        {
            job.Sheet.Refuse("levels-too-short", "between one edge and the next there are too few cycles to tell an oscillation that lasts from one that dies away; slow the edge rate down", All);
            return null;
        }
        if (found.Tone is { } tone)
            Report(job, tone);
        else
            job.Sheet.Refuse("no-oscillation", string.Create(CultureInfo.InvariantCulture, $"nothing oscillates by itself above the noise on the {found.Edges - 1} levels that were looked at"), All);
        job.Sheet.Add(KindFindings.Of(job, found, ringing));
        return found.Kind;
    }

    private static double Duration(IReadOnlyList<MeasuredEdge> edges, bool rising) =>
        edges.OrderByDescending(e => e.Edge.IsRising == rising).FirstOrDefault()?.Duration ?? 2;

    private static void Report(WaveformJob job, FoundTone tone)
    {
        double perSample = 1 / (job.Waveform.Interval * job.Chain.TimeFactor), hertz = tone.Frequency * perSample;
        string note = tone.Level == "both" ? "on both levels" : $"on the {tone.Level} level only";
        Budget ofFrequency = job.Chain.ForTime(hertz, EdgeTimes.Present(BudgetTerm.Normal("noise", tone.FrequencyUncertainty, perSample)));
        Budget ofLevel = job.Chain.ForLevelDifference(tone.Rms, EdgeTimes.Present(BudgetTerm.Normal("noise", tone.RmsUncertainty)));
        job.Sheet.Add(new Reading(Quantities.OscillationFrequency, hertz, job.Waveform.Axis.FrequencyUnit, ofFrequency, "level-windows") { Note = note });
        job.Sheet.Add(new Reading(Quantities.OscillationLevel, tone.Rms, job.Waveform.Unit, ofLevel, "level-windows") { Note = note });
    }
}
