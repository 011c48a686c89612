using ScopeReader.Edges;

namespace ScopeReader.Ringing;

/// <summary>What kind of oscillation is on a two-state wave, and the figures that say so.</summary>
/// <remarks>
/// Phase over the edges alone cannot tell: a steady oscillation advances by the same phase from edge to edge, and one at a multiple
/// of the edge rate by none. So what the edges have in common is taken apart into what decays and what stays, and what they have
/// not in common into a sine that goes on through the edges and what has no phase at all.
/// </remarks>
/// <param name="Kind">The kind.</param>
/// <param name="Tone">The oscillation of its own; null for none.</param>
/// <param name="IsLocked">Whether it goes with the edge rate; null where there is none.</param>
/// <param name="Rings">The judgement on the band that rings; null for none.</param>
/// <param name="Edges">How many edges were looked at.</param>
internal sealed record KindOfRinging(RingingKind Kind, FoundTone? Tone, bool? IsLocked, BandJudgement? Rings, int Edges)
{
    /// <summary>Fewer edges do not show what comes with each of them.</summary>
    public const int FewestEdges = 5;

    /// <summary>Looks.</summary>
    /// <param name="samples">The record.</param>
    /// <param name="transitions">Its transitions, five or more.</param>
    /// <param name="rise">Duration of rising edges, samples.</param>
    /// <param name="fall">Duration of falling edges, samples.</param>
    /// <param name="ringing">Frequencies at which the averaged edges ring, cycles per sample.</param>
    /// <param name="repetition">Frequency of the wave, cycles per sample; null where it does not repeat.</param>
    /// <returns>Null where the levels are too short to tell.</returns>
    public static KindOfRinging? Of(ReadOnlySpan<double> samples, IReadOnlyList<Transition> transitions, double rise, double fall, IReadOnlyList<double> ringing, double? repetition)
    {
        IReadOnlyList<LevelSpan> spans = LevelSpan.Of(transitions, rise, fall);
        if (spans.Count < FewestEdges - 1)
            return null;
        var frequencies = new List<double>(ringing.Take(1));
        if (ringing.Count == 0 && LevelSpectrum.Early(samples, spans) is { } early)
            frequencies.Add(early);
        // What lies within a window's width of a ringing is looked at with it.
        if (LevelSpectrum.Late(samples, spans) is { } late && frequencies.All(f => Math.Abs(f - late) > f / 3))
            frequencies.Add(late);
        var bands = new List<BandJudgement>();
        foreach (double frequency in frequencies)
        {
            if (BandJudgement.Of(samples, spans, frequency) is not { } band)
                return null;
            bands.Add(band);
        }
        BandJudgement? rings = bands.Find(b => b.Rings);
        FoundTone? tone = bands.Select(b => b.Tone).OfType<FoundTone>().MaxBy(t => t.Rms);
        RingingKind kind = (rings, tone) switch
        {
            (not null, not null) => RingingKind.Both,
            (not null, null) => RingingKind.EdgeExcited,
            (null, not null) => RingingKind.FreeRunning,
            _ when bands.Exists(b => b.IsNoise) => RingingKind.Noise,
            // In white noise alone the fit to the averaged edge is the finer test.
            _ => ringing.Count > 0 ? RingingKind.EdgeExcited : RingingKind.None,
        };
        return new KindOfRinging(kind, tone, tone is null ? null : Locked(tone, repetition), rings ?? (ringing.Count > 0 ? bands[0] : null), spans.Count + 1);
    }

    // Within half of what the record can resolve of a multiple of the edge rate.
    private static bool Locked(FoundTone tone, double? repetition)
    {
        if (repetition is not { } f)
            return tone.IsInStep;
        double distance = Math.Abs(tone.Frequency / f - Math.Round(tone.Frequency / f)) * f;
        return !tone.Restarts && distance < 0.5 / Math.Max(1, tone.Span);
    }
}
