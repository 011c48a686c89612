using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader.Edges;

/// <summary>The edge's own duration: the measured one with the chain's taken out as a difference of squares.</summary>
/// <remarks>
/// Exact for Gaussian responses (Elmore 1948, from memory). Where the chain may overshoot, where its bandwidth is a catalogue's least,
/// or where the two durations are too close, the corrected value can be farther off than the measured one: it is refused, and where
/// that is sound the bounds are given.
/// </remarks>
internal static class ChainCorrection
{
    // What is closer to the chain's own is magnified too far; fewer samples show sampling and not bandwidth; a chain or an edge
    // that overshoots by more is not Gaussian enough: 25 % of overshoot makes the corrected value 24 % low.
    private const double LeastOverChain = 1.4, LeastSamples = 3, MostOvershootPercent = 5;

    // Linear ramp, single pole, Gaussian: how far the difference of squares is off where the edge takes twice the chain's time
    // or more, and where it takes as long.
    private const double ShapeWhenSlow = 0.05, ShapeWhenEqual = 0.16;

    /// <summary>Writes the reading, or why there is none, down.</summary>
    /// <param name="job">The job.</param>
    /// <param name="edge">The averaged edge, resolved; its duration and overshoot are on the sheet already.</param>
    public static void Read(WaveformJob job, MeasuredEdge edge)
    {
        bool rising = edge.Edge.IsRising;
        Quantity quantity = rising ? Quantities.RiseTimeCorrected : Quantities.FallTimeCorrected;
        if (job.Sheet.Primary(rising ? Quantities.RiseTime : Quantities.FallTime) is not { } time)
            return;
        if (!job.Waveform.Axis.IsTimed || ChainBandwidth.Duration(job.Plan.Chain) is not { } chain)
        {
            job.Sheet.Refuse("chain-unknown", "what the chain adds is unknown: add input-bandwidth, bandwidth-basis and response to [chain]", quantity);
            return;
        }
        string own = Engineering.Format(chain, "s", 2), measured = Engineering.Format(time.Value, "s", 3);
        if (job.Plan.Levels is not { ReferenceLowPercent: 10, ReferenceHighPercent: 90 })
            job.Sheet.Refuse("reference-levels", "a bandwidth gives the chain's duration from 10 to 90 %; the plan has other reference levels", quantity);
        else if (edge.Duration < LeastSamples)
            job.Sheet.Refuse("too-few-samples", "the edge takes fewer than three sample intervals: the sampling bounds it, not the bandwidth; sample faster", quantity);
        else if (time.Value < LeastOverChain * chain)
            job.Sheet.RefuseBelow("not-resolved", $"the {measured} measured are too close to the chain's own {own} to be taken apart: the edge itself takes at most what was measured", time.Value + time.Budget.ExpandedUncertainty, quantity);
        else if (job.Plan.Chain.Response != ChainResponse.Gaussian)
            job.Sheet.RefuseBelow("response", job.Plan.Chain.Response == ChainResponse.Flat
                ? "a flat response overshoots and shortens edges: taking its duration out makes the result worse"
                : "the chain's response is not stated, and one that overshoots makes a corrected value worse than the measured one; add response = \"gaussian\" to [chain] if it rolls off gently",
                time.Value + time.Budget.ExpandedUncertainty, quantity);
        else if (Overshoot(job, rising) > MostOvershootPercent)
            job.Sheet.Refuse("overshoot", string.Create(CultureInfo.InvariantCulture, $"the edge overshoots by {Overshoot(job, rising):0.#} %: durations of what rings do not add as squares"), quantity);
        else if (job.Plan.Chain.BandwidthBasis == BandwidthBasis.Catalogue)
            Bound(job, quantity, time, chain);
        else
            Add(job, quantity, time, chain);
    }

    // A catalogue's bandwidth is a least: the chain may add nothing, and at most what that bandwidth gives.
    private static void Bound(WaveformJob job, Quantity quantity, Reading time, double chain)
    {
        double least = ChainBandwidth.Corrected(time.Value, chain);
        job.Sheet.RefuseBelow("catalogue-bandwidth", $"a catalogue bandwidth is a least: the edge itself takes at most the {Engineering.Format(time.Value, "s", 3)} measured and at least "
            + $"{Engineering.Format(least, "s", 3)}; measure the bandwidth and say bandwidth-basis = \"measured\" for a value", time.Value + time.Budget.ExpandedUncertainty, quantity);
    }

    private static void Add(WaveformJob job, Quantity quantity, Reading time, double chain)
    {
        double own = ChainBandwidth.Corrected(time.Value, chain), magnified = time.Value / own;
        double shape = ShapeWhenEqual + (ShapeWhenSlow - ShapeWhenEqual) * Math.Clamp(own / chain - 1, 0, 1);
        var budget = new Budget([.. time.Budget.Terms.Select(t => t.Times(magnified)), BudgetTerm.Rectangular("shape", shape * own)], time.Budget.Missing);
        job.Sheet.Add(new Reading(quantity, own, time.Unit, budget, "difference-of-squares")
        {
            Count = time.Count,
            Note = $"a gaussian response of {Engineering.Format(chain, "s", 3)} taken out, its measured bandwidth taken as exact; uncorrected {Engineering.Format(time.Value, "s", 3)}",
        });
    }

    private static double Overshoot(WaveformJob job, bool rising) => job.Sheet.Primary(rising ? Quantities.RiseOvershoot : Quantities.FallOvershoot)?.Value ?? 0;
}
