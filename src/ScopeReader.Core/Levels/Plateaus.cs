using ScopeReader.Edges;
using ScopeReader.Numerics;

namespace ScopeReader.Levels;

/// <summary>Cuts a two-state wave into the stretches that its levels are read on.</summary>
/// <remarks>
/// Of each whole plateau (beyond 200,000, of every so many) the later half, less one and a half transition durations before the next edge (there a Gaussian
/// edge is within 1e-4 of its state). Where the edges leave less than a fifth of the plateau, its middle fifth, with what
/// Gaussian edges leave there.
/// </remarks>
internal static class Plateaus
{
    private const int MostPlateaus = 200_000;
    private const double Guard = 1.5, LeastShare = 0.2, SettlingShare = 0.25, SettlingGuard = 2, SigmasPerDuration = 2.5631;

    /// <summary>The stretches; those of plateaus that the record cuts off only for a state that has no whole one.</summary>
    /// <param name="count">Samples in the record.</param>
    /// <param name="transitions">Its transitions, in order.</param>
    /// <param name="duration">Their 10 to 90 % duration, samples.</param>
    public static IReadOnlyList<Plateau> Find(int count, IReadOnlyList<Transition> transitions, double duration)
    {
        var found = new List<Plateau>();
        // An odd stride takes both states in turn.
        int stride = transitions.Count / MostPlateaus * 2 + 1;
        for (int i = 1; i < transitions.Count; i += stride)
        {
            double from = transitions[i - 1].Instant, to = transitions[i].Instant, length = to - from;
            double trail = Math.Min(Guard * duration, (1 - LeastShare) / 2 * length);
            double lead = Math.Max(trail, Math.Min(length / 2, (1 - LeastShare) * length - trail));
            double settling = Math.Min(lead, Math.Max(SettlingGuard * duration, SettlingShare * length));
            double unsettled = trail < Guard * duration ? BoundedNormal.NormalCumulative(-SigmasPerDuration * trail / duration) : 0;
            Add(found, transitions[i - 1].IsRising, from, from + settling, from + lead, to - trail, count, unsettled);
        }
        if (transitions.Count == 0)
            return found;

        Transition first = transitions[0], last = transitions[^1];
        // Nothing is known of an edge before the record: all of it up to the first edge counts.
        if (!found.Exists(p => p.IsHigh != first.IsRising))
            Add(found, !first.IsRising, 0, 0, 0, first.Instant - Guard * duration, count, 0);
        if (!found.Exists(p => p.IsHigh == last.IsRising))
        {
            double length = count - last.Instant;
            Add(found, last.IsRising, last.Instant, last.Instant + Math.Max(SettlingGuard * duration, SettlingShare * length),
                last.Instant + Math.Max(Guard * duration, length / 2), count, count, 0);
        }
        return found;
    }

    private static void Add(List<Plateau> found, bool isHigh, double edge, double settling, double from, double to, int count, double unsettled)
    {
        int first = Math.Max(0, (int)Math.Ceiling(from)), end = Math.Min(count, (int)Math.Floor(to) + 1);
        if (end > first)
            found.Add(new Plateau(isHigh, first, end, (int)Math.Round(edge), Math.Min(first, (int)Math.Ceiling(settling)), unsettled));
    }
}
