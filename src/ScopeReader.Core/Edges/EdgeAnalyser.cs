using System.Globalization;
using ScopeReader.Frequency;
using ScopeReader.Levels;
using ScopeReader.Readings;

namespace ScopeReader.Edges;

/// <summary>Rise and fall time, slew rate, overshoot, undershoot, preshoot and settling of a two-state waveform.</summary>
/// <remarks>Everything is read off the averaged edge of one polarity; see <see cref="AveragedEdge"/> and the readers' own remarks.</remarks>
public static class EdgeAnalyser
{
    private static readonly Quantity[] Rising = [Quantities.RiseTime, Quantities.RiseTimeCorrected, Quantities.RiseSlew, Quantities.RiseOvershoot, Quantities.RiseUndershoot, Quantities.RisePreshoot, Quantities.RiseSettling];
    private static readonly Quantity[] Falling = [Quantities.FallTime, Quantities.FallTimeCorrected, Quantities.FallSlew, Quantities.FallOvershoot, Quantities.FallUndershoot, Quantities.FallPreshoot, Quantities.FallSettling];

    /// <summary>Measures the edges of both polarities.</summary>
    /// <param name="job">The job.</param>
    /// <param name="levels">The state levels; null where the waveform has no two states.</param>
    /// <param name="codeStep">The converter's step in the channel's unit; 0 where none shows.</param>
    /// <param name="transitions">The qualified transitions, in order of time.</param>
    /// <param name="grid">The regression grid; null where the waveform is not periodic.</param>
    /// <returns>The averaged edges that could be made out, the rising one first, for what is measured on them next.</returns>
    public static IReadOnlyList<MeasuredEdge> Measure(WaveformJob job, StateLevels? levels, double codeStep, IReadOnlyList<Transition> transitions, PeriodGrid? grid)
    {
        ArgumentNullException.ThrowIfNull(job);
        ArgumentNullException.ThrowIfNull(transitions);
        if (levels is null)
        {
            job.Sheet.Refuse("not-two-state", "the wave does not rest at two levels, so it has no edges", [.. Rising, .. Falling]);
            return [];
        }
        EdgeFindings.Runts(job, Runt.Find(job.Waveform.Samples, levels.Low, levels.High, levels.Noise, transitions));
        double? rise = Crude(job, levels, transitions, rising: true), fall = Crude(job, levels, transitions, rising: false);
        MeasuredEdge? rising = Resolve(job, levels, codeStep, transitions, grid, true, rise, fall ?? rise ?? 0);
        MeasuredEdge? falling = Resolve(job, levels, codeStep, transitions, grid, false, fall, rise ?? fall ?? 0);

        double? riseSettling = rising is null ? null : EdgeSettling.Read(job, rising, Note(rising));
        double? fallSettling = falling is null ? null : EdgeSettling.Read(job, falling, Note(falling));
        Statistics(job, levels, transitions, rising);
        Statistics(job, levels, transitions, falling);
        if (rising is not null)
            EdgeAberrations.Read(job, rising, HasSettled(job, transitions, rising, fallSettling), Note(rising));
        if (falling is not null)
            EdgeAberrations.Read(job, falling, HasSettled(job, transitions, falling, riseSettling), Note(falling));
        MeasuredEdge[] edges = [.. new[] { rising, falling }.OfType<MeasuredEdge>()];
        // After the overshoot, which decides whether the chain may be taken out.
        foreach (MeasuredEdge edge in edges)
            ChainCorrection.Read(job, edge);
        return edges;
    }

    // The scale that cells and windows are set by; never so small that there would be no cell.
    private static double? Crude(WaveformJob job, StateLevels levels, IReadOnlyList<Transition> transitions, bool rising) =>
        SingleEdge.Median(job.Waveform.Samples, [.. transitions.Where(t => t.IsRising == rising)], levels.Low, levels.High) is { } duration ? Math.Max(0.05, duration) : null;

    private static void Statistics(WaveformJob job, StateLevels levels, IReadOnlyList<Transition> transitions, MeasuredEdge? edge)
    {
        if (edge is { IsResolved: true })
            EdgeStatistics.Of(job.Waveform.Samples, transitions.Where(t => t.IsRising == edge.Edge.IsRising),
                levels.At(job.Plan.Levels.ReferenceLowPercent / 100), levels.At(job.Plan.Levels.ReferenceHighPercent / 100))?.Report(job, edge);
    }

    private static MeasuredEdge? Resolve(WaveformJob job, StateLevels levels, double codeStep, IReadOnlyList<Transition> transitions, PeriodGrid? grid,
        bool rising, double? duration, double otherDuration)
    {
        job.Cancellation.ThrowIfCancellationRequested();
        Quantity[] all = rising ? Rising : Falling;
        if (!transitions.Any(t => t.IsRising == rising))
        {
            job.Sheet.Refuse("no-edge", $"the record holds no {(rising ? "rising" : "falling")} edge", all);
            return null;
        }
        EdgeProblem? problem = new("edge-incomplete", "the record does not hold a whole edge; move the trigger or take a longer record");
        MeasuredEdge? edge = null;
        // The second pass has the averaged edge's own duration for its scale, where one sample in many edges misled the first.
        for (int pass = 0; pass < 2 && duration is not null; pass++)
        {
            if (EdgeFolding.Fold(job.Waveform.Samples, levels, codeStep, transitions, grid, rising, duration.Value, otherDuration) is not { } folded)
                break;
            edge = EdgeResolver.Resolve(folded, levels, job.Plan.Levels, samples => Describe(job, samples), out problem);
            if (edge is not { IsResolved: true } || edge.Duration > 0.7 * duration)
                break;
            duration = edge.Duration;
        }
        if (edge is { IsResolved: true } && EquivalentTime.Problem(job, edge.Duration, grid, transitions.Count) is { } tooFast)
            (problem, edge) = (tooFast, null);
        if (problem is not null)
            job.Sheet.Refuse(problem.Code, problem.Reason, edge is null ? all : all[..3]);
        if (edge is null)
            return null;
        EdgeTimes.Read(job, edge, levels.Amplitude, string.Create(CultureInfo.InvariantCulture,
            $"{job.Plan.Levels.ReferenceLowPercent:0.##} to {job.Plan.Levels.ReferenceHighPercent:0.##} %, {Note(edge)}"));
        if (edge.IsResolved)
            EquivalentTime.Tell(job, edge);
        EdgeFindings.Chain(job, edge);
        EdgeFindings.Shape(job, edge);
        return edge;
    }

    // Whether the edges of the other polarity have settled where the region before this edge begins.
    private static bool HasSettled(WaveformJob job, IReadOnlyList<Transition> transitions, MeasuredEdge edge, double? otherSettling)
    {
        double gap = double.PositiveInfinity;
        for (int k = 1; k < transitions.Count; k++)
            if (transitions[k].IsRising == edge.Edge.IsRising)
                gap = Math.Min(gap, transitions[k].Instant - transitions[k - 1].Instant);
        return double.IsPositiveInfinity(gap) || otherSettling < gap - (job.Plan.Levels.OvershootRegion + 1) * edge.Duration;
    }

    private static string Describe(WaveformJob job, double samples) =>
        Engineering.Format(samples * job.Waveform.Interval, job.Waveform.Axis.TimeUnit, job.Waveform.Axis.IsTimed ? 3 : 2);

    private static string Note(MeasuredEdge edge) => edge.Edge.Edges == 1 ? "one edge" : string.Create(CultureInfo.InvariantCulture, $"{edge.Edge.Edges} edges averaged");
}
