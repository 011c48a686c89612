using ScopeReader.Levels;
using ScopeReader.Numerics;

namespace ScopeReader.Frequency;

/// <summary>A waveform's frequency by every method that suits it, and which of them is primary.</summary>
/// <param name="Primary">The primary estimate; null where there is none.</param>
/// <param name="Why">Why it is the primary one.</param>
/// <param name="Others">The others.</param>
/// <param name="Steadiness">Whether the record is one steady wave; untested without a primary.</param>
/// <remarks>
/// Primary is the method that uses most of what the wave carries: a sine fit on a sine, the joint fit on other periodic waves
/// whose edges the samples show, the crossings where edges fall between samples. An unsteady record widens them all.
/// </remarks>
internal sealed record FrequencyMethods(FrequencyEstimate? Primary, string Why, IReadOnlyList<FrequencyEstimate> Others, Steadiness Steadiness)
{
    // Edges under this many samples a cycle are not told from their alias; a fallback line must agree with half the edges.
    private const double FewestSamplesPerCycle = 4;
    private const int FewestEdgesForLine = 8;

    /// <summary>Runs them.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="shape">What the first look gave.</param>
    /// <param name="crossings">What the edges gave; null where they gave nothing.</param>
    /// <param name="edges">How many transitions there are.</param>
    public static FrequencyMethods Of(ReadOnlyMemory<double> samples, WaveShape shape, CrossingFrequency? crossings, int edges)
    {
        FrequencyEstimate? line = edges >= 3 ? InterpolatedFft.Estimate(samples.Span) : null, sine = null, harmonic = null;
        if (shape.Kind == WaveKind.Sinusoidal && (line ?? crossings?.Estimate) is { } start)
            sine = SineFit.Estimate(samples.Span, start.CyclesPerSample);
        if (sine is { CyclesPerSample: > 1 / FewestSamplesPerCycle })
            crossings = null;
        double? first = (sine ?? crossings?.Estimate ?? line)?.CyclesPerSample;
        Comb? comb = first is { } at ? Comb.Find(samples.Span, at) : null;
        PartFit[] parts = comb is null ? [] : PartFit.Over(samples, new WaveTemplate(comb.Model), first!.Value);
        if (comb is not null && (sine is null ? crossings is not null : HarmonicFrequency.Showing(comb) > 1))
            harmonic = HarmonicFrequency.Estimate(samples, comb, parts, first!.Value, crossings);

        (FrequencyEstimate? primary, string why) = Choose(shape, crossings, line, sine, harmonic, edges);
        if (primary is null)
            return new FrequencyMethods(null, "", [], new Steadiness(SteadinessKind.Untested));
        Steadiness steadiness = comb is null ? new Steadiness(SteadinessKind.Untested) : SteadinessCheck.Look(parts, samples.Length, comb, primary.CyclesPerSample, crossings);
        FrequencyEstimate Widened(FrequencyEstimate estimate) => SteadinessFindings.Term(steadiness, estimate.CyclesPerSample, samples.Length) is { } term
            ? estimate with { Terms = [.. estimate.Terms, term] } : estimate;
        FrequencyEstimate?[] all = [harmonic, crossings?.Estimate, line, sine];
        return new FrequencyMethods(Widened(primary), why, [.. all.OfType<FrequencyEstimate>().Where(e => e != primary).Select(Widened)], steadiness);
    }

    private static (FrequencyEstimate? Primary, string Why) Choose(WaveShape shape, CrossingFrequency? crossings, FrequencyEstimate? line, FrequencyEstimate? sine, FrequencyEstimate? harmonic, int edges)
    {
        if (sine is not null)
            return (sine, "primary: on a sine the fit uses every sample");
        if (harmonic is not null && crossings!.IsResolved)
            return (harmonic, shape.Kind == WaveKind.TwoState
                ? "primary: the joint fit of all harmonics uses every sample of the edges, which carry the timing; a sine fit would leave its harmonics out"
                : "primary: the wave is no single sine, and the joint fit uses all its harmonics");
        if (crossings is not null)
            return (crossings.Estimate, shape.Kind switch
            {
                WaveKind.TwoState => "primary: on a two-state wave the edges carry the timing, and these are too short for the samples to follow them",
                WaveKind.Sinusoidal => "primary: the sine fit did not settle on this record",
                _ => "primary: the wave is no single sine, and its crossings repeat",
            });
        bool agrees = line is not null && edges >= FewestEdgesForLine && edges > line.Count && edges < 4 * line.Count;
        return agrees ? (line, "primary: the edges keep no steady period, so the strongest line stands in") : (null, "");
    }
}
