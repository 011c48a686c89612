using System.Globalization;
using ScopeReader.Frequency;
using ScopeReader.Readings;

namespace ScopeReader.Edges;

/// <summary>Edges shorter than two sample intervals: whether many of them, folded on the period, show what none shows by itself.</summary>
internal static class EquivalentTime
{
    // Below the first an edge has a single sample on its slope in most of its passages, and its own two samples do not say where
    // it lies; below the second not even many edges were tried.
    private const double OwnSamples = 1.8, FewestSamples = 0.9;

    private const int FewestEdges = 500;

    /// <summary>True where an edge has too few samples for its own place to be read off them.</summary>
    /// <param name="duration">10 to 90 %, samples.</param>
    public static bool IsNeeded(double duration) => duration < OwnSamples;

    /// <summary>True where the edges' places between samples are many and even.</summary>
    /// <param name="grid">The regression grid; null where there is none.</param>
    /// <param name="edges">Edges in the record, both polarities.</param>
    /// <param name="samples">Length of the record.</param>
    public static bool Suffices(PeriodGrid? grid, int edges, int samples) =>
        grid is not null && edges >= FewestEdges && EdgeInterpolation.CommensurateMultiple(grid.Period, samples / grid.Period) == 0;

    /// <summary>Why the edge cannot be measured; null where it can.</summary>
    /// <param name="job">The job.</param>
    /// <param name="duration">10 to 90 % as the averaged edge has it, samples.</param>
    /// <param name="grid">The regression grid.</param>
    /// <param name="edges">Edges in the record, both polarities.</param>
    public static EdgeProblem? Problem(WaveformJob job, double duration, PeriodGrid? grid, int edges)
    {
        if (!IsNeeded(duration) || (duration >= FewestSamples && Suffices(grid, edges, job.Waveform.Count)))
            return null;
        string atMost = Engineering.Format(2 * job.Waveform.Interval, job.Waveform.Axis.TimeUnit, job.Waveform.Axis.IsTimed ? 3 : 2);
        double faster = Math.Ceiling(2 / Math.Max(duration, 0.5));
        string rate = job.Waveform.Axis.IsTimed ? $"at {Engineering.Given(faster / job.Waveform.Interval, "Hz", 3)} or faster" : string.Create(CultureInfo.InvariantCulture, $"{faster} times as fast");
        return new EdgeProblem("too-few-samples", string.Create(CultureInfo.InvariantCulture,
            $"the edge takes fewer than two sample intervals, at most {atMost}: its course shows in no sample; sample {rate}, or take {FewestEdges} edges or more at a rate that is no multiple of the wave's"));
    }

    /// <summary>Says what a duration under two sample intervals rests on.</summary>
    public static void Tell(WaveformJob job, MeasuredEdge edge)
    {
        if (IsNeeded(edge.Duration))
            job.Sheet.Add(new Finding("equivalent-time", string.Create(CultureInfo.InvariantCulture,
                $"the {(edge.Edge.IsRising ? "rise" : "fall")} time of {Engineering.Format(edge.Duration * job.Waveform.Interval, job.Waveform.Axis.TimeUnit, 2)} is shorter than two sample intervals. It comes from {edge.Edge.Edges} edges folded on the period, "
                + $"and holds if they are alike and come evenly: jitter would lengthen it, and what only some edges do would not show."), edge.Edge.IsRising ? "rise" : "fall"));
    }
}
