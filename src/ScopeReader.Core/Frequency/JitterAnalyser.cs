using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Frequency;

/// <summary>Period jitter, cycle-to-cycle jitter, time-interval error and Allan deviation, above what the digitiser makes of itself.</summary>
/// <remarks>
/// The digitiser's part of an edge's timing is its noise over the slope, and what interpolation leaves. Where what was measured is
/// no more than 1.4 times that, the source is only known to be below it; above, the digitiser's part is taken off in squares.
/// </remarks>
public static class JitterAnalyser
{
    private const string Method = "crossings";
    private const int FewestPeriods = 10;

    // Of the variance of a variance: neighbouring periods share an edge (correlation -1/2; of differences -2/3 and 1/6).
    private const double AlikePeriods = 1.5, AlikeDifferences = 1.944;
    private const double AboveFloor = 1.4, FloorUncertainty = 0.1;

    /// <summary>Measures and writes down, or why not.</summary>
    /// <param name="job">The waveform and where readings go.</param>
    /// <param name="crossings">The periodic edges; null without a period.</param>
    public static void Measure(WaveformJob job, CrossingFrequency? crossings)
    {
        ArgumentNullException.ThrowIfNull(job);
        if (crossings is null || !job.Fitness.IsSteady && job.Fitness.Steadiness is { Kind: SteadinessKind.NotPeriodic })
        {
            job.Sheet.Refuse("no-steady-period", "no edges that keep a period, and jitter is their distance from one", Quantities.PeriodJitter, Quantities.CycleToCycleJitter, Quantities.TimeIntervalError, Quantities.AllanDeviation);
            return;
        }
        (double[] instants, int[] numbers, double origin) = Used(crossings);
        double period = crossings.Grid.Period, floor = crossings.TimingFloor;
        Jitter jitter = Jitter.Of(instants, numbers, period, origin);
        if (jitter.Pairs < FewestPeriods)
        {
            job.Sheet.Refuse("too-few-edges", string.Create(CultureInfo.InvariantCulture, $"{jitter.Periods} whole periods are too few to speak of jitter; capture {FewestPeriods + 2} or more"),
                Quantities.PeriodJitter, Quantities.CycleToCycleJitter, Quantities.TimeIntervalError, Quantities.AllanDeviation);
            return;
        }
        Add(job, Quantities.PeriodJitter, jitter.Period, Math.Sqrt(2) * floor, Math.Sqrt(AlikePeriods / (2.0 * (jitter.Periods - 1))), jitter.Periods, "standard deviation of the periods");
        Add(job, Quantities.CycleToCycleJitter, jitter.CycleToCycle, Math.Sqrt(6) * floor, Math.Sqrt(AlikeDifferences / (2.0 * jitter.Pairs)), jitter.Pairs, "rms difference of neighbouring periods");
        AddTimeIntervalError(job, jitter, floor);
        AllanReadings.Add(job, instants, numbers, origin, period, floor);
    }

    // The direction with more edges, strays left out.
    private static (double[] Instants, int[] Numbers, double Origin) Used(CrossingFrequency crossings)
    {
        EdgeTrain rising = crossings.Regression.Rising, falling = crossings.Regression.Falling, train = rising.Count >= falling.Count ? rising : falling;
        if (Array.TrueForAll(train.Used, used => used))
            return (train.Instants, train.Numbers, train.Origin);
        int[] kept = [.. Enumerable.Range(0, train.Count).Where(i => train.Used[i])];
        return ([.. kept.Select(i => train.Instants[i])], [.. kept.Select(i => train.Numbers[i])], train.Origin);
    }

    private static void Add(WaveformJob job, Quantity quantity, double measured, double floor, double relative, int count, string note)
    {
        double perSample = job.Waveform.Interval * job.Chain.TimeFactor;
        if (measured <= AboveFloor * floor)
        {
            job.Sheet.RefuseBelow("digitiser-floor", AtMost(job, measured * (1 + 2 * relative) * perSample, floor * perSample, job.Waveform.Axis.TimeUnit, count), measured * (1 + 2 * relative) * perSample, quantity);
            return;
        }
        (double value, List<BudgetTerm> terms) = AboveTheFloor(measured, floor, relative);
        value *= perSample;
        job.Sheet.Add(new Reading(quantity, value, job.Waveform.Axis.TimeUnit, job.Chain.ForTime(value, terms.Select(t => t.Times(perSample))), Method)
        {
            Count = count,
            Note = note + FloorNote(job, floor * perSample, job.Waveform.Axis.TimeUnit),
        });
    }

    /// <summary>What is left when the digitiser's part is taken off in squares, with its terms.</summary>
    /// <param name="measured">What was measured, above the floor.</param>
    /// <param name="floor">The digitiser's part.</param>
    /// <param name="relative">Relative standard uncertainty of what was measured.</param>
    internal static (double Value, List<BudgetTerm> Terms) AboveTheFloor(double measured, double floor, double relative)
    {
        double value = Math.Sqrt(measured * measured - floor * floor);
        return (value, [BudgetTerm.Normal("count", measured * relative, measured / value), BudgetTerm.Normal("digitiser", floor * FloorUncertainty, floor / value)]);
    }

    /// <summary>Why only a bound is known.</summary>
    internal static string AtMost(WaveformJob job, double atMost, double floor, string unit, int count) => string.Create(CultureInfo.InvariantCulture,
        $"at most {Engineering.Format(atMost, unit, 3)} (n = {count}): the digitiser's own noise alone gives {Engineering.Format(floor, unit, 3)}; {(job.Waveform.Unit == "V" ? "steeper edges, a smaller vertical range" : "steeper edges")} or a finer converter would show less");

    /// <summary>What was taken off.</summary>
    internal static string FloorNote(WaveformJob job, double floor, string unit) => floor > 0 ? $", the digitiser's own {Engineering.Format(floor, unit, 2)} taken off" : "";

    private static void AddTimeIntervalError(WaveformJob job, Jitter jitter, double floor)
    {
        // The range of n normal values is about 2√(2 ln n) of their sigma, and scatters by π/√(6 ln n)/√2 of it at either end.
        double extent = Math.Sqrt(2 * Math.Log(jitter.Edges)), own = 2 * extent * floor, perSample = job.Waveform.Interval * job.Chain.TimeFactor;
        if (jitter.PeakToPeak <= AboveFloor * own)
        {
            job.Sheet.RefuseBelow("digitiser-floor", AtMost(job, jitter.PeakToPeak * perSample, own * perSample, job.Waveform.Axis.TimeUnit, jitter.Edges), jitter.PeakToPeak * perSample, Quantities.TimeIntervalError);
            return;
        }
        double value = jitter.PeakToPeak * perSample;
        var terms = new List<BudgetTerm> { BudgetTerm.Normal("digitiser", Math.Sqrt(2) * floor, perSample) };
        job.Sheet.Add(new Reading(Quantities.TimeIntervalError, value, job.Waveform.Axis.TimeUnit, job.Chain.ForTime(value, terms), Method)
        {
            Count = jitter.Edges,
            Note = "largest less smallest distance of these edges from a steady period; it grows with their number" + (floor > 0 ? $", the digitiser's {Engineering.Format(floor * perSample, job.Waveform.Axis.TimeUnit, 2)} an edge in it" : ""),
        });
    }
}
