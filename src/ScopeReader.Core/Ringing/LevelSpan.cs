using ScopeReader.Edges;

namespace ScopeReader.Ringing;

/// <summary>What lies between an edge and the next, without either transition; times in samples from the first sample.</summary>
/// <param name="IsHigh">True after a rising edge.</param>
/// <param name="Edge">The 50 % instant that it starts from.</param>
/// <param name="From">Its start after that instant.</param>
/// <param name="Length">How long it is.</param>
internal readonly record struct LevelSpan(bool IsHigh, double Edge, double From, double Length)
{
    private const int Most = 40;

    // Transition durations left out after and before an edge: a Gaussian edge is then within 1e-4 of its state.
    private const double After = 1.5, Before = 1.5;

    /// <summary>Up to 40 successive spans from the middle of the record.</summary>
    /// <param name="transitions">All transitions, in order.</param>
    /// <param name="rise">Duration of rising edges, samples.</param>
    /// <param name="fall">Duration of falling edges, samples.</param>
    public static IReadOnlyList<LevelSpan> Of(IReadOnlyList<Transition> transitions, double rise, double fall)
    {
        int first = Math.Max(0, (transitions.Count - 1 - Most) / 2);
        var spans = new List<LevelSpan>(Most);
        for (int k = first; k + 1 < transitions.Count && spans.Count < Most; k++)
        {
            var (own, next) = transitions[k].IsRising ? (rise, fall) : (fall, rise);
            double from = After * own + 1, length = transitions[k + 1].Instant - transitions[k].Instant - from - Before * next - 1;
            if (length > 0)
                spans.Add(new LevelSpan(transitions[k].IsRising, transitions[k].Instant, from, length));
        }
        return spans;
    }
}
