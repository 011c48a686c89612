using ScopeReader.Edges;
using ScopeReader.Readings;

namespace ScopeReader.Levels;

/// <summary>State levels: high-level, low-level, amplitude.</summary>
/// <remarks>
/// The shorth of either side of the wave finds the states (IEEE Std 181-2011, from memory); the mean of the samples that lie
/// clear of the edges, in the later half of each plateau, then gives the levels, so that edges, ringing and duty do not pull.
/// </remarks>
public static class StateLevelAnalyser
{
    private const string Method = "shorth";
    private const double MiddleShare = 0.2, MostApart = 3;

    /// <summary>Measures the levels and writes them down, or why not.</summary>
    /// <param name="job">The waveform and where readings go.</param>
    /// <param name="shape">What the first look gave.</param>
    /// <returns>The levels that edges refer to: the plan's where it fixes them; null where there are none.</returns>
    public static StateLevels? Measure(WaveformJob job, WaveShape shape)
    {
        ArgumentNullException.ThrowIfNull(job);
        ArgumentNullException.ThrowIfNull(shape);
        LevelSettings settings = job.Plan.Levels;
        if (shape.Kind != WaveKind.TwoState)
        {
            (string code, string reason) = WhyNot(job, shape);
            job.Sheet.Refuse(code, reason, Quantities.HighLevel, Quantities.LowLevel, Quantities.Amplitude);
            return settings is { High: { } above, Low: { } below } && above > below && shape.Kind != WaveKind.Flat
                ? new StateLevels(below, above, 0, 0, shape.Noise) : null;
        }

        ReadOnlySpan<double> samples = job.Waveform.Samples;
        (StateEstimate low, StateEstimate high) = Estimate(samples, shape);
        double noise = Math.Sqrt((low.Noise * low.Noise + high.Noise * high.Noise) / 2);
        Add(job, Quantities.HighLevel, high, settings.High);
        Add(job, Quantities.LowLevel, low, settings.Low);
        double amplitude = high.Level - low.Level;
        job.Sheet.Add(new Reading(Quantities.Amplitude, amplitude, job.Waveform.Unit, job.Chain.ForLevelDifference(amplitude, [.. high.Terms, .. low.Terms]), Method)
        {
            Count = high.Count + low.Count,
        });
        var levels = new StateLevels(settings.Low ?? low.Level, settings.High ?? high.Level,
            settings.Low is null ? low.Uncertainty : 0, settings.High is null ? high.Uncertainty : 0, noise);
        if (levels.High > levels.Low && !Misses(settings, low.Level, high.Level))
            return levels;
        job.Sheet.Add(new Finding("levels-off-the-wave",
            $"the plan's levels, {Engineering.Format(levels.Low, job.Waveform.Unit)} and {Engineering.Format(levels.High, job.Waveform.Unit)}, do not belong to this wave, whose states lie at {Engineering.Format(low.Level, job.Waveform.Unit)} and {Engineering.Format(high.Level, job.Waveform.Unit)}: edges are read at the wave's own; check the probe's factor, the plan's scale, or [levels]"));
        return new StateLevels(low.Level, high.Level, low.Uncertainty, high.Uncertainty, noise);
    }

    // Stated levels whose middle the wave hardly passes, or that are several times as far apart as its own or as near together.
    private static bool Misses(LevelSettings settings, double low, double high)
    {
        double below = settings.Low ?? low, above = settings.High ?? high, middle = (below + above) / 2, swing = high - low;
        return middle < low + MiddleShare * swing || middle > high - MiddleShare * swing || above - below > MostApart * swing || above - below < swing / MostApart;
    }

    /// <summary>Whether the samples clear of the edges bear the two levels out: of a sine with few samples a cycle they don't.</summary>
    internal static bool AreApart(ReadOnlySpan<double> samples, double low, double high, double noise)
    {
        (StateEstimate below, StateEstimate above) = Estimate(Scattered.Stretch(samples, low, high, noise), new WaveShape(WaveKind.TwoState, low, high, 0, low, high, noise));
        return above.Level - below.Level > 0.5 * (high - low);
    }

    /// <summary>The two states of a two-state wave.</summary>
    private static (StateEstimate Low, StateEstimate High) Estimate(ReadOnlySpan<double> samples, WaveShape shape)
    {
        IReadOnlyList<Transition> transitions = Transitions.Find(samples, shape.Lower, shape.Upper, shape.Noise);
        double duration = SingleEdge.Median(samples, transitions, shape.Lower, shape.Upper) ?? 0;
        IReadOnlyList<Plateau> plateaus = Plateaus.Find(samples.Length, transitions, duration);
        return (Side(samples, shape, plateaus, isHigh: false), Side(samples, shape, plateaus, isHigh: true));
    }

    private static StateEstimate Side(ReadOnlySpan<double> samples, WaveShape shape, IReadOnlyList<Plateau> plateaus, bool isHigh)
    {
        Plateau[] own = [.. plateaus.Where(p => p.IsHigh == isHigh)];
        if (own.Length > 0)
            return StateEstimate.Average(samples, own, shape.Step, shape.Swing);
        // No sample is clear of the edges: the shorth itself, as uncertain as the nearest samples are scattered.
        double level = isHigh ? shape.Upper : shape.Lower;
        return new StateEstimate(level, [BudgetTerm.Rectangular("settling", Math.Max(3 * shape.Noise, 0.05 * shape.Swing))], shape.Noise, 1);
    }

    private static void Add(WaveformJob job, Quantity quantity, StateEstimate state, double? stated) =>
        job.Sheet.Add(new Reading(quantity, state.Level, job.Waveform.Unit, job.Chain.ForLevel(state.Level, state.Terms), Method)
        {
            Count = state.Count,
            Note = stated is { } level ? $"edges refer to the plan's {Engineering.Format(level, job.Waveform.Unit)} instead" : null,
        });

    private static (string Code, string Reason) WhyNot(WaveformJob job, WaveShape shape) => shape.Kind switch
    {
        WaveKind.Flat => ("flat", $"every sample is {Engineering.Format(shape.Minimum, job.Waveform.Unit)}; check the probe, the coupling and the trigger"),
        WaveKind.Sinusoidal => ("not-two-state", "the wave is a sine and has no states; see peak-to-peak and rms"),
        _ => ("not-two-state", "the wave does not stay near two levels; to measure it between two of your own, set low and high in the plan's [levels]"),
    };
}
