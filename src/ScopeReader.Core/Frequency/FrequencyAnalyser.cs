using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Levels;
using ScopeReader.Readings;

namespace ScopeReader.Frequency;

/// <summary>Frequency by every method that suits the wave, period, and the deviation from nominal.</summary>
/// <remarks>
/// Primary is the method that uses most of what the wave carries: a sine fit on a sine, the edges elsewhere. The others
/// stand beside it for comparison.
/// </remarks>
public static class FrequencyAnalyser
{
    private const double Million = 1e6;

    // Edges under this many samples a cycle are not told from their alias; a fallback line must agree with half the edges.
    private const double FewestSamplesPerCycle = 4;
    private const int FewestEdgesForLine = 8;

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
        ReadOnlySpan<double> samples = job.Waveform.Samples;
        FrequencyEstimate? line = edges >= 3 ? InterpolatedFft.Estimate(samples) : null;
        FrequencyEstimate? sine = null;
        if (shape.Kind == WaveKind.Sinusoidal && (line ?? crossings?.Estimate) is { } start)
            sine = SineFit.Estimate(samples, start.CyclesPerSample);
        if (sine is { CyclesPerSample: > 1 / FewestSamplesPerCycle })
            crossings = null;

        (FrequencyEstimate? primary, string why) = Choose(shape, crossings?.Estimate, line, sine, edges);
        if (primary is null)
        {
            (string code, string reason) = WhyNot(shape, edges);
            job.Sheet.Refuse(code, reason, Quantities.Frequency, Quantities.Period, Quantities.FrequencyError);
            return null;
        }
        Steadiness steadiness = Comb.Find(samples, primary.CyclesPerSample) is { } comb
            ? SteadinessCheck.Look(job.Waveform.Memory, comb, primary.CyclesPerSample, crossings)
            : new Steadiness(SteadinessKind.Untested);
        if (SteadinessFindings.WhyNone(job, steadiness) is { } none)
        {
            job.Sheet.Refuse(SteadinessFindings.Code, none, Quantities.Frequency, Quantities.Period, Quantities.FrequencyError);
            return null;
        }
        FrequencyEstimate Widened(FrequencyEstimate estimate) => SteadinessFindings.Term(steadiness, estimate.CyclesPerSample, job.Waveform.Count) is { } term
            ? estimate with { Terms = [.. estimate.Terms, term] } : estimate;
        Add(job, Widened(primary), isPrimary: true, why);
        foreach (FrequencyEstimate? other in (FrequencyEstimate?[])[crossings?.Estimate, line, sine])
            if (other is not null && other != primary)
            {
                Add(job, Widened(other), isPrimary: false, note: null);
                FrequencyFindings.Compare(job, Widened(primary), Widened(other));
            }
        primary = Widened(primary);
        SteadinessFindings.Write(job, steadiness);
        AddPeriod(job, primary);
        AddError(job, primary);
        FrequencyFindings.Record(job, primary, crossings);
        return new MeasuredFrequency(primary, steadiness, crossings?.Grid);
    }

    private static (FrequencyEstimate? Primary, string Why) Choose(WaveShape shape, FrequencyEstimate? crossings, FrequencyEstimate? line, FrequencyEstimate? sine, int edges)
    {
        if (sine is not null)
            return (sine, "primary: on a sine the fit uses every sample");
        if (crossings is not null)
            return (crossings, shape.Kind switch
            {
                WaveKind.TwoState => "primary: on a two-state wave the edges carry the timing; a sine fit would leave its harmonics out",
                WaveKind.Sinusoidal => "primary: the sine fit did not settle on this record",
                _ => "primary: the wave is no single sine, and its crossings repeat",
            });
        bool agrees = line is not null && edges >= FewestEdgesForLine && edges > line.Count && edges < 4 * line.Count;
        return agrees ? (line, "primary: the edges keep no steady period, so the strongest line stands in") : (null, "");
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
