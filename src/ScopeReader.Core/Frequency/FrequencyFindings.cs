using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Frequency;

/// <summary>What the frequency's figures say about the record and the chain, and what to change.</summary>
internal static class FrequencyFindings
{
    private const double FewCycles = 10, LeastShare = 0.3;

    /// <summary>Two methods whose intervals do not meet.</summary>
    public static void Compare(WaveformJob job, FrequencyEstimate primary, FrequencyEstimate other)
    {
        double difference = other.CyclesPerSample - primary.CyclesPerSample;
        double reach = new Budget(primary.Terms).ExpandedUncertainty + new Budget(other.Terms).ExpandedUncertainty;
        if (Math.Abs(difference) <= reach)
            return;
        job.Sheet.Add(new Finding("frequency-methods-differ", string.Create(CultureInfo.InvariantCulture,
            $"{other.Method} reads {difference / primary.CyclesPerSample * 1e6:+0.###;-0.###} ppm from {primary.Method}, more than both uncertainties together ({reach / primary.CyclesPerSample * 1e6:0.###} ppm): look for modulation, drift, or a second signal")));
    }

    /// <summary>Few cycles, sampling in step with the wave, and a probe that may pull the source.</summary>
    public static void Record(WaveformJob job, FrequencyEstimate primary, CrossingFrequency? crossings)
    {
        if (job.Plan.Chain is { TimebaseReadsPpm: { } reads } chain && reads != 0)
            job.Sheet.Add(new Finding("timebase-corrected", string.Create(CultureInfo.InvariantCulture,
                $"every time and frequency is corrected for a timebase that reads {Math.Abs(reads):0.######} ppm {(reads > 0 ? "high" : "low")}{(chain.TimebaseCalibrated is { } day ? $", calibrated {day:yyyy-MM-dd}" : "")}")));
        double cycles = primary.CyclesPerSample * job.Waveform.Count;
        if (cycles < FewCycles)
            job.Sheet.Add(new Finding("few-cycles", string.Create(CultureInfo.InvariantCulture,
                $"{cycles:0.0} cycles in the record: the frequency rests on little; ten times the record makes it about thirty times as certain")));
        if (crossings is { CommensurateMultiple: > 0 })
            Commensurate(job, primary, crossings, cycles);
        if (job.Plan.Chain.ProbeCapacitance is { } capacitance and > 0)
            job.Sheet.Add(new Finding("probe-loading",
                $"the probe adds {Engineering.Format(capacitance, "F", 2)} to the node: at an oscillator's own pin that pulls the frequency, a crystal's typically by 10 to 30 ppm per pF (common practice), and no budget covers it; measure at a buffered output, or repeat with a smaller capacitance"));
    }

    private static void Commensurate(WaveformJob job, FrequencyEstimate primary, CrossingFrequency crossings, double cycles)
    {
        double bound = primary.Terms.Where(t => t.Name == CrossingFrequency.InterpolationTerm).Sum(t => t.Contribution);
        if (bound < LeastShare * new Budget(primary.Terms).StandardUncertainty)
            return;
        int places = crossings.CommensurateMultiple;
        job.Sheet.Add(new Finding("near-commensurate-sampling", string.Create(CultureInfo.InvariantCulture,
            $"{crossings.Grid.Period:0.######} samples per cycle: the crossings stay {(places == 1 ? "at one place" : $"at {places} places")} between samples ({EdgeInterpolation.Wraps(crossings.Grid.Period, cycles, places):0.0} wraps, 5 average the error), and interpolation may be off by {bound * Math.Sqrt(3) / primary.CyclesPerSample * 1e6:0.###} ppm, which is in the budget; change the sample rate a little, or take a longer record")));
    }
}
