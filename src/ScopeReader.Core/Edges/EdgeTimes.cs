using ScopeReader.Readings;

namespace ScopeReader.Edges;

/// <summary>Transition duration and slew rate of an averaged edge.</summary>
/// <remarks>
/// Transition duration: IEEE Std 181-2011 (term; clause not quoted). Terms: noise and rounding of the two crossings; the two
/// state levels, which move both crossings; what gaps between the samples can hide; what was taken off for edges laid over
/// each other imperfectly, as a bound of half of it.
/// </remarks>
internal static class EdgeTimes
{
    /// <summary>Writes the readings of a resolved edge down.</summary>
    public static void Read(WaveformJob job, MeasuredEdge edge, double amplitude, string note)
    {
        if (edge is not { Low: { } low, High: { } high })
            return;
        bool rising = edge.Edge.IsRising;
        double toTime = job.Waveform.Interval * job.Chain.TimeFactor, duration = edge.Duration * toTime;

        // A state raised by δ raises the reference level x by (1 − x) δ or x δ, and moves its instant by that over the slope.
        double byBefore = (1 - high.Level) / high.Slope - (1 - low.Level) / low.Slope;
        double byAfter = high.Level / high.Slope - low.Level / low.Slope;
        var (before, after) = rising ? ("low-level", "high-level") : ("high-level", "low-level");
        BudgetTerm[] shared =
        [
            BudgetTerm.Normal("noise", double.Hypot(low.Noise, high.Noise) * toTime),
            BudgetTerm.Normal("quantisation", double.Hypot(low.Rounding, high.Rounding) * toTime),
            BudgetTerm.Rectangular("interpolation", edge.Interpolation * toTime),
            BudgetTerm.Rectangular("jitter", edge.Broadening / 2 * toTime),
        ];
        var time = new Reading(rising ? Quantities.RiseTime : Quantities.FallTime, duration, job.Waveform.Axis.TimeUnit,
            job.Chain.ForTime(duration, [.. Present(shared),
                .. Present(BudgetTerm.Normal(before, edge.BeforeUncertainty, byBefore * toTime), BudgetTerm.Normal(after, edge.AfterUncertainty, byAfter * toTime))]),
            "averaged-edge")
        { Count = edge.Edge.Edges, Note = note };
        job.Sheet.Add(time);

        // The step between the reference levels grows with the amplitude, which the state levels move too.
        double step = (high.Level - low.Level) * amplitude, slew = (rising ? step : -step) / duration, perTime = -slew / duration;
        job.Sheet.Add(new Reading(rising ? Quantities.RiseSlew : Quantities.FallSlew, slew, $"{job.Waveform.Unit}/{job.Waveform.Axis.TimeUnit}",
            job.Chain.ForSlew(slew, [.. Present(shared).Select(t => t.Times(perTime)),
                .. Present(BudgetTerm.Normal(before, edge.BeforeUncertainty, perTime * byBefore * toTime - slew),
                    BudgetTerm.Normal(after, edge.AfterUncertainty, perTime * byAfter * toTime + slew))]),
            "averaged-edge")
        { Count = edge.Edge.Edges, Note = note });
    }

    /// <summary>The terms that contribute something.</summary>
    public static IEnumerable<BudgetTerm> Present(params IEnumerable<BudgetTerm> terms) => terms.Where(t => t.Contribution > 0);
}
