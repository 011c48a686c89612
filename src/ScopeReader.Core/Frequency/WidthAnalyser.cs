using System.Globalization;
using ScopeReader.Edges;
using ScopeReader.Readings;

namespace ScopeReader.Frequency;

/// <summary>High and low width and duty factor, between the 50 % instants.</summary>
/// <remarks>
/// An error of the mid level moves rising and falling instants apart by itself times (1/slope + 1/slope); it leaves the
/// period alone. A sine's mid level is its mean.
/// </remarks>
public static class WidthAnalyser
{
    private const string Method = "crossings";

    // With fewer samples a period the two edges' interpolation errors are as large as what is measured.
    private const double FewestSamples = 4;

    /// <summary>Measures and writes down, or why not.</summary>
    /// <param name="job">The waveform and where readings go.</param>
    /// <param name="transitions">Its transitions, in order.</param>
    /// <param name="crossings">The periodic edges; null without a period.</param>
    /// <param name="midUncertainty">Standard uncertainty of the mid level, in the channel's unit.</param>
    public static void Measure(WaveformJob job, IReadOnlyList<Transition> transitions, CrossingFrequency? crossings, double midUncertainty)
    {
        ArgumentNullException.ThrowIfNull(job);
        ArgumentNullException.ThrowIfNull(transitions);
        if (crossings is { Grid.Period: < FewestSamples })
        {
            job.Sheet.Refuse("too-few-samples", "fewer than four samples a period leave the instants of the edges open; sample faster", Quantities.DutyFactor, Quantities.HighWidth, Quantities.LowWidth);
            return;
        }
        if (crossings is { Grid: { RisingOrigin: { } rising, FallingOrigin: { } falling } grid, RisingSlope: > 0, FallingSlope: > 0 })
        {
            double period = grid.Period, high = falling - rising - Math.Floor((falling - rising) / period) * period;
            List<BudgetTerm> terms = Terms(crossings, midUncertainty);
            Add(job, Quantities.HighWidth, high, terms, crossings.Edges.Rising, null);
            Add(job, Quantities.LowWidth, period - high, [.. terms, .. PeriodTerms(crossings)], crossings.Edges.Falling, null);
            // A ratio of two times of one record: the timebase cancels.
            var percent = terms.Select(t => t.Times(100 / period)).ToList();
            job.Sheet.Add(new Reading(Quantities.DutyFactor, 100 * high / period, "%", new Budget(percent), Method) { Count = crossings.Estimate.Count });
            return;
        }
        job.Sheet.Refuse("no-steady-period", "no steady period to relate the high time to", Quantities.DutyFactor);
        Refuse(job, transitions, isHigh: true, Quantities.HighWidth);
        Refuse(job, transitions, isHigh: false, Quantities.LowWidth);
    }

    private static List<BudgetTerm> Terms(CrossingFrequency crossings, double midUncertainty)
    {
        var terms = new List<BudgetTerm>
        {
            BudgetTerm.Normal("noise", crossings.WidthNoise),
            BudgetTerm.Normal("levels", midUncertainty, 1 / crossings.RisingSlope + 1 / crossings.FallingSlope),
        };
        if (crossings.CommensurateMultiple > 0)
            // Both directions keep their own place between samples.
            terms.AddRange([BudgetTerm.Rectangular("interpolation", crossings.WidthBound), BudgetTerm.Rectangular("interpolation", crossings.WidthBound)]);
        return terms;
    }

    private static IEnumerable<BudgetTerm> PeriodTerms(CrossingFrequency crossings) =>
        crossings.Estimate.Terms.Select(t => t.Times(crossings.Grid.Period * crossings.Grid.Period));

    private static void Add(WaveformJob job, Quantity quantity, double samples, IEnumerable<BudgetTerm> terms, int count, string? note)
    {
        double perSample = job.Waveform.Interval * job.Chain.TimeFactor, value = samples * perSample;
        job.Sheet.Add(new Reading(quantity, value, job.Waveform.Axis.TimeUnit, job.Chain.ForTime(value, terms.Select(t => t.Times(perSample))), Method)
        {
            Count = count,
            Note = note,
        });
    }

    private static void Refuse(WaveformJob job, IReadOnlyList<Transition> transitions, bool isHigh, Quantity quantity)
    {
        string state = isHigh ? "high" : "low";
        if (transitions.Count < 2)
            job.Sheet.Refuse("too-few-edges", string.Create(CultureInfo.InvariantCulture,
                $"the record holds {transitions.Count} edge{(transitions.Count == 1 ? "" : "s")}, and a {state} width needs both ends of it"), quantity);
        else
            job.Sheet.Refuse("no-steady-period", $"no steady period over which to average the {state} width", quantity);
    }
}
