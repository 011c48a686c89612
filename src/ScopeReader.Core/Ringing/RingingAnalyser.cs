using System.Globalization;
using ScopeReader.Edges;
using ScopeReader.Readings;

namespace ScopeReader.Ringing;

/// <summary>Frequency, damping and amplitude of the ringing after the edges, by a damped-sinusoid fit to the averaged edge.</summary>
/// <remarks>
/// There is ringing where a damped sinusoid explains the averaged edge far better than a level, a slope or an exponential
/// does, from two starts, and stands out of the noise. Uncertainties: the fit's covariance, scaled by its own residuals; the
/// change with a later start where noise does not explain it; the states for the amplitude. After both polarities, the
/// rising edge's fit is primary.
/// </remarks>
public static class RingingAnalyser
{
    private static readonly Quantity[] All =
        [Quantities.RingingFrequency, Quantities.RingingDampingRatio, Quantities.RingingQ, Quantities.RingingDecayTime, Quantities.RingingAmplitude, .. LoopAnalyser.All];

    /// <summary>Measures the ringing after the edges, and what oscillates without them.</summary>
    /// <param name="job">The job.</param>
    /// <param name="edges">The averaged edges, as <see cref="EdgeAnalyser"/> gives them.</param>
    /// <param name="transitions">All transitions, in order of time.</param>
    public static void Measure(WaveformJob job, IReadOnlyList<MeasuredEdge> edges, IReadOnlyList<Transition> transitions)
    {
        ArgumentNullException.ThrowIfNull(job);
        ArgumentNullException.ThrowIfNull(edges);
        ArgumentNullException.ThrowIfNull(transitions);
        var ringing = new List<(MeasuredEdge Edge, EdgeRinging Ringing)>();
        foreach (MeasuredEdge edge in edges)
        {
            job.Cancellation.ThrowIfCancellationRequested();
            if (EdgeRinging.Find(edge) is { } found)
                ringing.Add((edge, found));
        }
        RingingKind? kind = KindAnalyser.Measure(job, transitions, edges, [.. ringing.Select(r => r.Ringing)]);
        if (kind is RingingKind.FreeRunning or RingingKind.Noise)
            job.Sheet.Refuse("not-edge-excited", "what oscillates after the edges is not started by them", All);
        else if (edges.Count == 0)
            job.Sheet.Refuse("no-edge", "there is no edge that could have set anything ringing", All);
        else if (ringing.Count == 0)
            job.Sheet.Refuse("no-ringing", string.Create(CultureInfo.InvariantCulture,
                $"no ringing above {100 * edges.Min(EdgeRinging.Floor):0.####} % of amplitude after the edges"), All);
        else
            for (int i = 0; i < ringing.Count; i++)
                Report(job, ringing[i].Edge, ringing[i].Ringing, isPrimary: i == 0);
        if (kind is not (RingingKind.FreeRunning or RingingKind.Noise) && ringing.Count > 0)
        {
            RingingFindings.Ringing(job, ringing[0].Edge);
            LoopAnalyser.Measure(job);
        }
    }

    private static void Report(WaveformJob job, MeasuredEdge edge, EdgeRinging ringing, bool isPrimary)
    {
        double toTime = job.Waveform.Interval * job.Chain.TimeFactor;
        var (frequency, uf) = ringing.Read(EdgeRinging.Of.Frequency);
        var (decay, ua) = ringing.Read(EdgeRinging.Of.Decay);
        var (ratio, uz) = ringing.Read(EdgeRinging.Of.DampingRatio);
        var (amplitude, ur) = ringing.Read(EdgeRinging.Of.Amplitude);
        double zetaShift = ratio * (ringing.DecayShift / decay + ringing.FrequencyShift / frequency);

        double hertz = frequency / toTime, time = toTime / decay;
        Add(Quantities.RingingFrequency, hertz, job.Waveform.Axis.FrequencyUnit, job.Chain.ForTime(hertz, Own(uf, ringing.FrequencyShift, 1 / toTime)));
        Add(Quantities.RingingDampingRatio, ratio, "1", new Budget(Own(uz, zetaShift, 1)));
        double perRatio = -1 / (2 * ratio * ratio);
        Add(Quantities.RingingQ, SecondOrder.Quality(ratio), "1", new Budget(Own(uz, zetaShift, perRatio)));
        Add(Quantities.RingingDecayTime, time, job.Waveform.Axis.TimeUnit, job.Chain.ForTime(time, Own(ua, ringing.DecayShift, -time / decay)));
        Add(Quantities.RingingAmplitude, 100 * amplitude, "%", new Budget([
            .. Own(ur, ringing.AmplitudeShift, 100),
            .. EdgeTimes.Present(
                // Each state moves the step that the amplitude is a share of, and the instant that it is carried back to.
                BudgetTerm.Normal(edge.Edge.IsRising ? "high-level" : "low-level", edge.AfterUncertainty, 100 * amplitude * (1 + decay / 2 / edge.Middle.Slope)),
                BudgetTerm.Normal(edge.Edge.IsRising ? "low-level" : "high-level", edge.BeforeUncertainty, 100 * amplitude * (1 - decay / 2 / edge.Middle.Slope)),
                BudgetTerm.Normal("50 % instant", edge.Middle.Noise, 100 * amplitude * decay)),
        ]));

        for (int mode = 1; mode < ringing.Fit.Modes.Count; mode++)
            Beside(mode);

        // What rings beside the largest: for comparison, so that no limit judges it.
        void Beside(int mode)
        {
            string method = string.Create(CultureInfo.InvariantCulture, $"{(edge.Edge.IsRising ? "rising" : "falling")}-edge-fit-mode-{mode + 1}");
            var (f, u) = ringing.Read(EdgeRinging.Of.Frequency, mode);
            Note(Quantities.RingingFrequency, f / toTime, job.Waveform.Axis.FrequencyUnit, job.Chain.ForTime(f / toTime, Own(u, 0, 1 / toTime)));
            var (z, uOfRatio) = ringing.Read(EdgeRinging.Of.DampingRatio, mode);
            Note(Quantities.RingingDampingRatio, z, "1", new Budget(Own(uOfRatio, 0, 1)));
            var (r, uOfAmplitude) = ringing.Read(EdgeRinging.Of.Amplitude, mode);
            Note(Quantities.RingingAmplitude, 100 * r, "%", new Budget(Own(uOfAmplitude, 0, 100)));

            void Note(Quantity quantity, double value, string unit, Budget budget) =>
                job.Sheet.Add(new Reading(quantity, value, unit, budget, method) { IsPrimary = false, Count = edge.Edge.Edges, Note = "rings beside the largest" });
        }

        IEnumerable<BudgetTerm> Own(double u, double shift, double sensitivity) => EdgeTimes.Present(
            BudgetTerm.Normal("fit", u, sensitivity, ringing.Fit.DegreesOfFreedom),
            BudgetTerm.Rectangular("start", shift, sensitivity));

        void Add(Quantity quantity, double value, string unit, Budget budget) =>
            job.Sheet.Add(new Reading(quantity, value, unit, budget, edge.Edge.IsRising ? "rising-edge-fit" : "falling-edge-fit")
            {
                IsPrimary = isPrimary,
                Count = edge.Edge.Edges,
                Note = string.Create(CultureInfo.InvariantCulture,
                    $"fitted from {Engineering.Format(ringing.Start * toTime, job.Waveform.Axis.TimeUnit, 3)} after the 50 % instant, {edge.Edge.Edges} {(edge.Edge.Edges == 1 ? "edge" : "edges averaged")}"),
            });
    }
}
