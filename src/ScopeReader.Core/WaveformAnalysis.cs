using ScopeReader.Edges;
using ScopeReader.Frequency;
using ScopeReader.Harmonics;
using ScopeReader.Levels;
using ScopeReader.Readings;
using ScopeReader.Ringing;

namespace ScopeReader;

/// <summary>The order in which a waveform is measured: each stage builds on the ones before.</summary>
public static class WaveformAnalysis
{
    /// <summary>Runs every analyser that suits the waveform.</summary>
    /// <returns>The averaged edges that could be made out, for what looks at their shape next.</returns>
    public static IReadOnlyList<MeasuredEdge> Measure(WaveformJob job)
    {
        ArgumentNullException.ThrowIfNull(job);
        if (!IsOfThisWorld(job))
        {
            job.Sheet.Refuse("out-of-range", "values or times lie beyond anything a bench can have; check the file's units and the plan's scale",
                [.. Quantities.All.Where(q => q.Kinds.HasFlag(CaptureKinds.Waveform))]);
            return [];
        }
        FrequencyStage stage = MeasureFrequency(job);
        job = stage.Job;
        job.Cancellation.ThrowIfCancellationRequested();

        IReadOnlyList<MeasuredEdge> edges = EdgeAnalyser.Measure(job, stage.States, stage.Shape.Step, stage.Transitions, stage.Frequency?.Grid);
        RingingAnalyser.Measure(job, edges, stage.Transitions);
        job.Cancellation.ThrowIfCancellationRequested();
        HarmonicAnalyser.Measure(job, stage.Frequency?.Primary);
        return edges;
    }

    /// <summary>The first stages alone: shape, levels, transitions, frequency by every method, jitter and stability, widths.</summary>
    public static FrequencyStage MeasureFrequency(WaveformJob job)
    {
        ArgumentNullException.ThrowIfNull(job);
        ReadOnlySpan<double> samples = job.Waveform.Samples;
        WaveShape shape = WaveShapeAnalyser.Look(samples);
        job.Cancellation.ThrowIfCancellationRequested();
        StateLevels? states = StateLevelAnalyser.Measure(job, shape);
        (double low, double high) = states is null ? (shape.Lower, shape.Upper) : (states.Low, states.High);
        double noise = states?.Noise ?? shape.Noise;
        IReadOnlyList<Transition> transitions = shape.Kind == WaveKind.Flat ? [] : Transitions.Find(samples, low, high, noise);
        job.Cancellation.ThrowIfCancellationRequested();

        CrossingFrequency? crossings = CrossingFrequency.Measure(samples, transitions, low, high, noise, shape);
        MeasuredFrequency? frequency = FrequencyAnalyser.Measure(job, shape, crossings, transitions.Count, out Steadiness steadiness);
        job = job with { Fitness = new WaveFitness(steadiness, Clipping.Look(job, shape)) };
        FitnessFindings.Look(job, shape, crossings, frequency?.Primary.CyclesPerSample);
        JitterAnalyser.Measure(job, crossings);
        WidthAnalyser.Measure(job, transitions, crossings, states is null ? noise / Math.Sqrt(samples.Length) : double.Hypot(states.LowUncertainty, states.HighUncertainty) / 2);
        LevelAnalyser.Measure(job, shape, noise, frequency is null ? null : 1 / frequency.Primary.CyclesPerSample);
        return new FrequencyStage(job, shape, states, transitions, frequency);
    }

    // Squares and reciprocals of what passes here stay far inside a double.
    private static bool IsOfThisWorld(WaveformJob job)
    {
        const double smallest = 1e-40, largest = 1e40;
        double most = 0;
        foreach (double v in job.Waveform.Samples)
            most = Math.Max(most, Math.Abs(v));
        return (most == 0 || most is > smallest and < largest) && job.Waveform.Interval is > smallest and < largest;
    }
}
