using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Levels;
using ScopeReader.Readings;

namespace ScopeReader.Frequency;

/// <summary>Frequency by every method that suits the wave, period, and the deviation from nominal.</summary>
public static class FrequencyAnalyser
{
    private const double Million = 1e6;

    /// <summary>Measures the frequency and writes it down, or why not.</summary>
    /// <param name="job">The waveform and where readings go.</param>
    /// <param name="shape">What the first look gave.</param>
    /// <param name="crossings">What the edges gave; null where they gave nothing.</param>
    /// <param name="edges">How many transitions there are.</param>
    /// <param name="steadiness">Whether the record is one steady wave, also where that is why there is no frequency.</param>
    /// <returns>The primary frequency; null where there is none.</returns>
    public static MeasuredFrequency? Measure(WaveformJob job, WaveShape shape, CrossingFrequency? crossings, int edges, out Steadiness steadiness)
    {
        ArgumentNullException.ThrowIfNull(job);
        ArgumentNullException.ThrowIfNull(shape);
        FrequencyMethods found = FrequencyMethods.Of(job.Waveform.Memory, shape, crossings, edges);
        steadiness = found.Steadiness;
        if (found.Primary is not { } primary)
        {
            (string code, string reason) = WhyNot(shape, edges);
            job.Sheet.Refuse(code, reason, Quantities.Frequency, Quantities.Period, Quantities.FrequencyError, Quantities.FrequencyDrift);
            return null;
        }
        if (SteadinessFindings.WhyNone(job, found.Steadiness) is { } none)
        {
            job.Sheet.Refuse(SteadinessFindings.Code, none, Quantities.Frequency, Quantities.Period, Quantities.FrequencyError, Quantities.FrequencyDrift);
            return null;
        }
        Add(job, primary, isPrimary: true, found.Why);
        foreach (FrequencyEstimate other in found.Others)
        {
            Add(job, other, isPrimary: false, note: null);
            FrequencyFindings.Compare(job, primary, other);
        }
        SteadinessFindings.Write(job, found.Steadiness);
        AddPeriod(job, primary);
        AddError(job, primary);
        AddDrift(job, found.Steadiness);
        FrequencyFindings.Record(job, primary, crossings);
        return new MeasuredFrequency(primary, found.Steadiness, crossings?.Grid);
    }

    /// <summary>An estimate with the chain's correction and terms.</summary>
    internal static (double Value, Budget Budget) OnChain(WaveformJob job, FrequencyEstimate estimate)
    {
        double perSample = job.Chain.FrequencyFactor / job.Waveform.Interval, value = estimate.CyclesPerSample * perSample;
        return (value, job.Chain.ForTime(value, estimate.Terms.Select(t => t.Times(perSample))));
    }

    private static void Add(WaveformJob job, FrequencyEstimate estimate, bool isPrimary, string? note)
    {
        (double value, Budget budget) = OnChain(job, estimate);
        job.Sheet.Add(new Reading(Quantities.Frequency, value, job.Waveform.Axis.FrequencyUnit, budget, estimate.Method)
        {
            IsPrimary = isPrimary,
            Count = estimate.Count,
            Note = note,
        });
    }

    private static void AddPeriod(WaveformJob job, FrequencyEstimate estimate)
    {
        (double value, Budget budget) = OnChain(job, estimate);
        double period = 1 / value;
        job.Sheet.Add(new Reading(Quantities.Period, period, job.Waveform.Axis.TimeUnit, budget.Times(period * period), estimate.Method) { Count = estimate.Count });
    }

    private static void AddError(WaveformJob job, FrequencyEstimate estimate)
    {
        TimeAxis axis = job.Waveform.Axis;
        if (job.Plan.Nominal is not { } nominal)
        {
            job.Sheet.Refuse("no-nominal", "no nominal frequency to compare with; add nominal to the plan, or give --nominal", Quantities.FrequencyError);
            return;
        }
        if (!axis.IsTimed)
        {
            job.Sheet.Refuse("no-interval", "the file states no sample interval; give it with --interval or --rate", Quantities.FrequencyError);
            return;
        }
        (double value, Budget budget) = OnChain(job, estimate);
        job.Sheet.Add(new Reading(Quantities.FrequencyError, PartsPerMillion(value, nominal), "ppm", budget.Times(Million / nominal), estimate.Method)
        {
            Count = estimate.Count,
            Note = $"against a nominal {(nominal / 1000).ToString("0.#########", CultureInfo.InvariantCulture)} kHz",
        });
    }

    // The timebase's own drift is in it, and nothing of its constant error.
    private static void AddDrift(WaveformJob job, Steadiness steadiness)
    {
        if (!job.Waveform.Axis.IsTimed)
            job.Sheet.Refuse("no-interval", "the file states no sample interval; give it with --interval or --rate", Quantities.FrequencyDrift);
        else if (steadiness.Curvature is not { } curvature)
            job.Sheet.Refuse("too-few-cycles", "too few cycles to lay the later ones beside the earlier; capture sixteen or more", Quantities.FrequencyDrift);
        else
            job.Sheet.Add(new Reading(Quantities.FrequencyDrift, curvature.Rate * Million / job.Waveform.Interval, "ppm/s",
                new Budget([BudgetTerm.Normal("noise", curvature.Uncertainty * Million / job.Waveform.Interval, degreesOfFreedom: curvature.DegreesOfFreedom)]), "phase-of-parts")
            {
                Note = "over the record, the timebase's own in it",
            });
    }

    /// <summary>Deviation from nominal in millionths.</summary>
    /// <param name="frequency">Hz.</param>
    /// <param name="nominal">Hz, above 0.</param>
    public static double PartsPerMillion(double frequency, double nominal) => (frequency - nominal) / nominal * Million;

    private static (string Code, string Reason) WhyNot(WaveShape shape, int edges) => shape.Kind == WaveKind.Flat
        ? ("flat", "the record is flat: it has no edges")
        : edges < 3
        ? ("too-few-edges", string.Create(CultureInfo.InvariantCulture, $"the record holds {edges} edge{(edges == 1 ? "" : "s")}, and a period needs two of one direction; capture more cycles"))
        : ("no-steady-period", "the edges keep no steady period; check the trigger, and that one signal is on the channel");
}
