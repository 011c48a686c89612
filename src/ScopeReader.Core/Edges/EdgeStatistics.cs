using System.Globalization;
using ScopeReader.Numerics;
using ScopeReader.Readings;

namespace ScopeReader.Edges;

/// <summary>The edges of one polarity one by one: mean, scatter, shortest and longest.</summary>
/// <param name="Mean">Mean duration between the reference levels, samples.</param>
/// <param name="Scatter">Standard deviation, samples.</param>
/// <param name="Shortest">The shortest.</param>
/// <param name="Longest">The longest.</param>
/// <param name="Count">How many were whole; two or more.</param>
internal sealed record EdgeStatistics(double Mean, double Scatter, double Shortest, double Longest, int Count)
{
    // Below this a straight line between samples scatters a duration by itself; a scatter from few edges is no news.
    private const double FewestSamples = 4, NotableScatter = 2;
    private const int FewestEdges = 10;

    /// <summary>Measures every edge; null with fewer than two.</summary>
    public static EdgeStatistics? Of(ReadOnlySpan<double> samples, IEnumerable<Transition> edges, double lower, double upper)
    {
        var durations = new List<double>();
        foreach (Transition edge in edges)
            if (SingleEdge.Duration(samples, edge, lower, upper) is { } duration)
                durations.Add(duration);
        if (durations.Count < 2)
            return null;
        SampleSummary summary = SampleSummary.Of(durations.ToArray());
        return new EdgeStatistics(summary.Mean, summary.StandardDeviation, durations.Min(), durations.Max(), durations.Count);
    }

    /// <summary>Writes the reading down, for comparison with the averaged edge's, and a finding where the edges differ by more than noise makes them.</summary>
    /// <param name="job">The job.</param>
    /// <param name="edge">The averaged edge, resolved.</param>
    public void Report(WaveformJob job, MeasuredEdge edge)
    {
        bool rising = edge.Edge.IsRising;
        double toTime = job.Waveform.Interval * job.Chain.TimeFactor, value = Mean * toTime;
        // The averaged edge tells how far off this method is, to its own uncertainty.
        double averaged = job.Sheet.Primary(rising ? Quantities.RiseTime : Quantities.FallTime)?.Budget.Repeatability ?? 0;
        string unit = job.Waveform.Axis.TimeUnit, shortest = Describe(Shortest), longest = Describe(Longest), scatter = Describe(Scatter, 2);
        job.Sheet.Add(new Reading(rising ? Quantities.RiseTime : Quantities.FallTime, value, unit, job.Chain.ForTime(value, EdgeTimes.Present(
            BudgetTerm.Normal("scatter", Scatter / Math.Sqrt(Count) * toTime, 1, Count - 1),
            // Noise makes the nearest passages of the levels too near, and lines between samples bend.
            BudgetTerm.Rectangular("interpolation", (Math.Abs(Mean - edge.Duration) * toTime + 2 * averaged) / Budget.Coverage))), "single-edges")
        {
            IsPrimary = false,
            Count = Count,
            Note = $"shortest {shortest}, longest {longest}, standard deviation {scatter}",
        });
        if (edge is not { Low: { } low, High: { } high } || Count < FewestEdges || edge.Duration < FewestSamples)
            return;
        // Two crossings, each with the noise of a straight line between two samples: 2/3 of the variance on average.
        double explained = Math.Sqrt(2.0 / 3) * edge.Edge.Noise * double.Hypot(1 / low.Slope, 1 / high.Slope);
        if (Scatter > NotableScatter * (explained + InterpolationError.LinearAtMiddle(edge.Duration)))
            job.Sheet.Add(new Finding("edges-differ", string.Create(CultureInfo.InvariantCulture,
                $"{(rising ? "rising" : "falling")} edges differ from each other: {shortest} to {longest}, standard deviation {scatter} over {Count} edges, where noise explains {Describe(explained, 2)}. Look for a supply or a threshold that moves with the data."), rising ? "rise" : "fall"));

        string Describe(double samples, int digits = 3) => Engineering.Format(samples * toTime, unit, digits);
    }
}
