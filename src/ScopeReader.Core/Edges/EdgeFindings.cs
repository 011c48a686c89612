using System.Globalization;
using ScopeReader.Numerics;
using ScopeReader.Readings;

namespace ScopeReader.Edges;

/// <summary>What an edge's figures say beside the readings.</summary>
internal static class EdgeFindings
{
    /// <summary>Share of the measured duration above which the chain is worth a word.</summary>
    private const double NotableShare = 0.3;

    // 10 to 90 % over 20 to 80 %: a ramp has 1.33, a Gaussian 1.52, a single pole 1.58.
    private const double LowestRatio = 1.3, HighestRatio = 1.7;

    /// <summary>Says how much of the duration may be the chain's own.</summary>
    public static void Chain(WaveformJob job, MeasuredEdge edge)
    {
        if (!edge.IsResolved || !job.Waveform.Axis.IsTimed || ChainBandwidth.Duration(job.Plan.Chain) is not { } chain)
            return;
        // The bandwidth's figure is for 10 to 90 %: compare like with like, as a Gaussian edge has it.
        double sigmas = BoundedNormal.NormalQuantile(edge.High!.Level) - BoundedNormal.NormalQuantile(edge.Low!.Level);
        double measured = edge.Duration * job.Waveform.Interval * job.Chain.TimeFactor;
        double own = chain * sigmas / GaussianEdge.DurationOverSigma, share = own / measured;
        if (share < NotableShare)
            return;
        string name = edge.Edge.IsRising ? "rise time" : "fall time", ownText = Engineering.Format(own, "s", 2);
        job.Sheet.Add(new Finding("chain-bandwidth", share < 1
            ? string.Create(CultureInfo.InvariantCulture, $"the {name} of {Engineering.Format(measured, "s", 3)} holds up to {ownText} of the measuring chain's own (its stated bandwidths); "
                + $"the edge itself may take as little as {Engineering.Format(Math.Sqrt(1 - share * share) * measured, "s", 2)}. Use a chain of more bandwidth to see it.")
            : $"the {name} of {Engineering.Format(measured, "s", 3)} is what the measuring chain alone would show ({ownText} from its stated bandwidths): the edge itself is faster than this chain can tell.",
            edge.Edge.IsRising ? "rise" : "fall"));
    }

    /// <summary>Names pulses that turn back before they reach the other state.</summary>
    public static void Runts(WaveformJob job, IReadOnlyList<Runt> runts)
    {
        if (runts.Count == 0)
            return;
        Runt first = runts[0];
        double time = job.Waveform.Axis.Start + first.Index * job.Waveform.Interval;
        string place = string.Create(CultureInfo.InvariantCulture,
            $"{Engineering.Format(time, job.Waveform.Axis.TimeUnit, 4)}, where the wave leaves the {(first.FromHigh ? "high" : "low")} state and turns back after {100 * first.Reach:0} % of amplitude");
        job.Sheet.Add(new Finding("runts", (runts.Count == 1 ? $"a runt at {place}. " : string.Create(CultureInfo.InvariantCulture, $"{runts.Count} runts, the first at {place}. "))
            + "It counts as no edge. Look for two drivers at once, a pulse too short for its load, or a reflection.", string.Create(CultureInfo.InvariantCulture, $"{runts.Count}")));
    }

    /// <summary>Says that the edge's course is not simple.</summary>
    public static void Shape(WaveformJob job, MeasuredEdge edge)
    {
        if (edge.Between(10, 90) / edge.Between(20, 80) is not { } ratio || ratio is >= LowestRatio and <= HighestRatio)
            return;
        job.Sheet.Add(new Finding("edge-shape", string.Create(CultureInfo.InvariantCulture,
            $"the {(edge.Edge.IsRising ? "rising" : "falling")} edge takes {ratio:0.00} times as long from 10 to 90 % as from 20 to 80 %, where a plain edge takes 1.33 to 1.58 times: ")
            + "it has a step, a plateau or a long tail; look for a reflection or a second driver.", edge.Edge.IsRising ? "rise" : "fall"));
    }
}
