using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Ringing;

/// <summary>The kind of oscillation in words, with the figures that tell it from the others.</summary>
internal static class KindFindings
{
    private const string Bench = "Look for gain with feedback: supply decoupling, wiring at the output, a stage without its load; change one at a time, and the probe's ground first.";

    /// <summary>The finding.</summary>
    public static Finding Of(WaveformJob job, KindOfRinging found, IReadOnlyList<EdgeRinging> ringing)
    {
        string text = found.Kind switch
        {
            RingingKind.EdgeExcited => $"ringing starts at each edge and dies away: it is not an oscillation of its own. {Edges(found)}",
            RingingKind.FreeRunning => $"{Oscillation(job, found)}: no edge starts it, and it goes on between them. {Locked(found)} {Bench}",
            RingingKind.Both => $"ringing starts at each edge and dies away, and {Oscillation(job, found)} beside it. {Edges(found)} {Locked(found)} {Bench}",
            RingingKind.Noise => "what oscillates on the levels is noise of a narrow band: it neither starts with the edges nor keeps its phase. Look for a source that a resonance picks out: a switching supply, a neighbour, a receiver's own noise.",
            _ => string.Create(CultureInfo.InvariantCulture, $"nothing oscillates above the noise over {found.Edges} edges, neither started by them nor by itself"),
        };
        return new Finding("ringing-kind", text, Word(found.Kind)) { Level = found.Tone?.Level, Locked = found.IsLocked };
    }

    /// <summary>The kind as programs read it.</summary>
    public static string Word(RingingKind kind) => kind switch
    {
        RingingKind.EdgeExcited => "edge-excited",
        RingingKind.FreeRunning => "free-running",
        RingingKind.Both => "both",
        RingingKind.Noise => "noise",
        _ => "none",
    };

    private static string Edges(KindOfRinging found)
    {
        if (found.Rings is not { Edges: > 0 } band)
            return string.Create(CultureInfo.InvariantCulture, $"{found.Edges} edges were looked at.");
        double chance = PhaseCoherence.Probability(band.Edges, Math.Min(1, band.Resultant));
        string likely = chance < 1e-6 ? "under one in a million" : string.Create(CultureInfo.InvariantCulture, $"{chance:G1}");
        return string.Create(CultureInfo.InvariantCulture,
            $"After {band.Edges} edges its phase is the same (resultant {band.Resultant:0.00}, by chance {likely}), and before the next edge its envelope is down to {100 * band.LateToEarly:0.#} %.");
    }

    private static string Oscillation(WaveformJob job, KindOfRinging found)
    {
        ReadingSheet sheet = job.Sheet;
        string where = found.Tone!.Level == "both" ? "on both levels" : $"on the {found.Tone.Level} level only";
        return $"it oscillates by itself at {Engineering.Format(sheet.Primary(Quantities.OscillationFrequency)!.Value, job.Waveform.Axis.FrequencyUnit, 4)}, "
            + $"{Engineering.Format(sheet.Primary(Quantities.OscillationLevel)!.Value, job.Waveform.Unit, 2)} rms, {where}";
    }

    private static string Locked(KindOfRinging found) => found switch
    {
        { Tone.Restarts: true } => "It starts anew on each level, in no fixed phase.",
        { IsLocked: true } => "It is a multiple of the edge rate, as far as this record can tell: change the edge rate, and see whether it follows.",
        _ => "It is not locked to the edge rate.",
    };
}
