using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Edges;

/// <summary>Overshoot, undershoot and preshoot of an averaged edge, % of amplitude.</summary>
/// <remarks>
/// Regions after IEEE Std 181-2011 (clause not quoted): so many transition durations after the first instant inside the
/// boundary of the state after the edge, and before the last instant inside that of the state before it. The boundaries are
/// those of the settling band. An excursion below twice what noise, rounding, the state level and the samples' distance would show by themselves
/// is not resolved.
/// </remarks>
internal static class EdgeAberrations
{
    private const double ResolvedOverFloor = 2, LiftedByNoise = 3;

    /// <summary>Writes the readings, or why there are none, down.</summary>
    /// <param name="job">The job.</param>
    /// <param name="edge">The edge.</param>
    /// <param name="previousSettled">False where the edge before had not settled when the region of preshoot began.</param>
    /// <param name="note">How many edges.</param>
    public static void Read(WaveformJob job, MeasuredEdge edge, bool previousSettled, string note)
    {
        bool rising = edge.Edge.IsRising;
        Quantity overshoot = rising ? Quantities.RiseOvershoot : Quantities.FallOvershoot;
        Quantity undershoot = rising ? Quantities.RiseUndershoot : Quantities.FallUndershoot;
        Quantity preshoot = rising ? Quantities.RisePreshoot : Quantities.FallPreshoot;
        double band = job.Plan.Levels.SettlingBandPercent / 100, region = job.Plan.Levels.OvershootRegion * edge.Duration;
        ReadOnlySpan<double> times = edge.Edge.Times;

        if (EdgeCrossing.Find(edge.Edge, 1 - band, 0, forward: true, edge.Duration) is not { } enters)
            job.Sheet.Refuse("state-not-reached", "the edge does not come near its new state before the next edge", overshoot, undershoot);
        else
        {
            double end = Math.Min(enters.Instant + region, times[^1]);
            bool isCut = end < enters.Instant + region;
            Report(job, edge, overshoot, Extremum.Find(edge.Edge, enters.Instant, end, highest: true, edge.Duration, 1), 1, isCut, note);
            Extremum? lowest = EdgeCrossing.Find(edge.Edge, 1, enters.Instant, forward: true, edge.Duration) is { } reaches && reaches.Instant < end
                ? Extremum.Find(edge.Edge, reaches.Instant, end, highest: false, edge.Duration, 1)
                : Extremum.Find(edge.Edge, end - edge.Duration, end, highest: false, edge.Duration, 1) is { } tail ? tail with { Value = 1 } : null;
            Report(job, edge, undershoot, lowest, 1, isCut, note);
        }

        if (!previousSettled)
            job.Sheet.Refuse("previous-edge", "the edge before has not settled yet where preshoot is looked for", preshoot);
        else if (EdgeCrossing.Find(edge.Edge, band, 0, forward: false, edge.Duration) is { } leaves && leaves.Instant - times[0] > edge.Duration)
            Report(job, edge, preshoot, Extremum.Find(edge.Edge, Math.Max(leaves.Instant - region, times[0]), leaves.Instant, highest: false, edge.Duration, 0), 0, isCut: false, note);
        else
            job.Sheet.Refuse("edge-incomplete", "the record holds too little before the edge; move the trigger", preshoot);
    }

    private static void Report(WaveformJob job, MeasuredEdge edge, Quantity quantity, Extremum? extremum, double state, bool isCut, string note)
    {
        if (isCut && extremum is { Slope: not 0 })
        {
            job.Sheet.Refuse("edge-incomplete", "the record or the next edge cuts the excursion off; take a longer record or a slower repetition", quantity);
            return;
        }
        if (extremum is null)
        {
            job.Sheet.Refuse("too-few-samples", "too few samples show the course of the wave there; sample faster", quantity);
            return;
        }
        // Beyond the new state, short of it, or away from it before the edge: the sign tells which side counts.
        bool isOvershoot = quantity == Quantities.RiseOvershoot || quantity == Quantities.FallOvershoot;
        double percent = 100 * (isOvershoot ? extremum.Value - state : state - extremum.Value);
        double byStates = 100 * edge.StateUncertainty(extremum.Value);
        // A kink bends a cubic into an excursion that is not there: its own curvature gives that away.
        double floor = double.Hypot(double.Hypot(100 * extremum.Floor, byStates), 100 * extremum.Bend);
        if (percent < ResolvedOverFloor * floor || percent <= 0)
        {
            double least = Math.Max(ResolvedOverFloor * floor, 1e-4);
            job.Sheet.RefuseBelow("not-resolved", $"no excursion above {Engineering.Given(least, "%", 2)} of amplitude, the least that this capture can show", least, quantity);
            return;
        }
        // What noise lifts over the threshold reads high: near it the true value may lie as far below as noise lifts.
        double lifted = Math.Max(0, ResolvedOverFloor * floor + LiftedByNoise * double.Hypot(100 * double.Hypot(extremum.Noise, extremum.Rounding), byStates) - percent);
        BudgetTerm[] terms =
        [
            BudgetTerm.Rectangular("selection", lifted),
            BudgetTerm.Normal("noise", 100 * extremum.Noise),
            BudgetTerm.Normal("quantisation", 100 * extremum.Rounding),
            BudgetTerm.Normal(edge.Edge.IsRising ? "high-level" : "low-level", 100 * edge.AfterUncertainty, extremum.Value),
            BudgetTerm.Normal(edge.Edge.IsRising ? "low-level" : "high-level", 100 * edge.BeforeUncertainty, 1 - extremum.Value),
            BudgetTerm.Rectangular("interpolation", 100 * extremum.Bend),
            // At the end of the region its length matters, and that is so many transition durations.
            BudgetTerm.Normal("region", 100 * Math.Abs(extremum.Slope) * job.Plan.Levels.OvershootRegion * DurationUncertainty(edge)),
        ];
        string region = string.Create(CultureInfo.InvariantCulture, $"within {job.Plan.Levels.OvershootRegion:0.##} transition durations, {note}");
        job.Sheet.Add(new Reading(quantity, percent, quantity.Unit, new Budget(EdgeTimes.Present(terms)), "averaged-edge")
        {
            Count = edge.Edge.Edges,
            Note = extremum.Slope == 0 ? region : region + "; still growing at the end of that region",
        });
    }

    private static double DurationUncertainty(MeasuredEdge edge) => edge is { Low: { } low, High: { } high }
        ? Math.Sqrt(low.Noise * low.Noise + high.Noise * high.Noise + low.Rounding * low.Rounding + high.Rounding * high.Rounding + edge.Interpolation * edge.Interpolation / 3)
        : edge.Duration / 2;
}
