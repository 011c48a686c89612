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
    /// <returns>The primary frequency; null where there is none.</returns>
    public static MeasuredFrequency? Measure(WaveformJob job, WaveShape shape, CrossingFrequency? crossings, int edges)
    {
        ArgumentNullException.ThrowIfNull(job);
        ArgumentNullException.ThrowIfNull(shape);
        if (crossings is null)
        {
            (string code, string reason) = WhyNot(shape, edges);
            job.Sheet.Refuse(code, reason, Quantities.Frequency, Quantities.Period, Quantities.FrequencyError);
            return null;
        }

        FrequencyEstimate primary = crossings.Estimate;
        AddFrequency(job, primary, isPrimary: true, Why(shape));
        AddPeriod(job, primary);
        AddError(job, primary);
        return new MeasuredFrequency(primary, crossings.Grid);
    }

    private static string Why(WaveShape shape) => shape.Kind == WaveKind.TwoState
        ? "primary: on a two-state wave the edges carry the timing"
        : "primary: the wave is no single sine, and its crossings repeat";

    private static (double Value, Budget Budget) OnChain(WaveformJob job, FrequencyEstimate estimate)
    {
        double perSample = job.Chain.FrequencyFactor / job.Waveform.Interval, value = estimate.CyclesPerSample * perSample;
        return (value, job.Chain.ForTime(value, estimate.Terms.Select(t => t.Times(perSample))));
    }

    private static void AddFrequency(WaveformJob job, FrequencyEstimate estimate, bool isPrimary, string note)
    {
        (double value, Budget budget) = OnChain(job, estimate);
        job.Sheet.Add(new Reading(Quantities.Frequency, value, job.Waveform.Axis.FrequencyUnit, budget, estimate.Method) { IsPrimary = isPrimary, Count = estimate.Count, Note = note });
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
        job.Sheet.Add(new Reading(Quantities.FrequencyError, (value - nominal) / nominal * Million, "ppm", budget.Times(Million / nominal), estimate.Method)
        {
            Count = estimate.Count,
            Note = $"against a nominal {Engineering.Format(nominal, "Hz", 10)}",
        });
    }

    private static (string Code, string Reason) WhyNot(WaveShape shape, int edges) => shape.Kind == WaveKind.Flat
        ? ("flat", "the record is flat: it has no edges")
        : edges < 3
        ? ("too-few-edges", string.Create(CultureInfo.InvariantCulture, $"the record holds {edges} edge{(edges == 1 ? "" : "s")}, and a period needs two of one direction; capture more cycles"))
        : ("no-steady-period", "the edges keep no steady period; check the trigger, and that one signal is on the channel");
}
