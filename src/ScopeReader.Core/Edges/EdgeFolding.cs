using ScopeReader.Frequency;
using ScopeReader.Levels;

namespace ScopeReader.Edges;

/// <summary>Lays the edges of one polarity over each other (equivalent time).</summary>
/// <remarks>
/// On a periodic waveform the regression grid says where each edge lies far better than its own two samples do; the samples
/// of the edges fall at different phases, so the folded points are dense and neither a straight line between two samples nor
/// the noise of one edge bends them. An edge that jitter has moved is moved back by the share of its distance from the grid
/// that is jitter and not noise (the least-squares estimate of its place). Without a grid each edge lies at its own 50 %
/// instant.
/// </remarks>
internal static class EdgeFolding
{
    /// <summary>Cells per transition duration: the curve bends by less than 1e-5 of the step inside one.</summary>
    private const double CellsPerDuration = 64;

    /// <summary>Finest cell, samples.</summary>
    private const double FinestCell = 1.0 / 64;

    /// <summary>Most cells of one averaged edge: a few megabytes, 4000 transition durations.</summary>
    private const int MostCells = 1 << 18;

    /// <summary>Folds the edges of one polarity.</summary>
    /// <param name="samples">The waveform.</param>
    /// <param name="levels">Its state levels.</param>
    /// <param name="codeStep">The converter's step in the channel's unit; 0 where none shows.</param>
    /// <param name="transitions">All transitions, in order of time.</param>
    /// <param name="grid">The regression grid; null where there is none.</param>
    /// <param name="rising">Which polarity.</param>
    /// <param name="duration">About the transition duration of these edges, samples.</param>
    /// <param name="otherDuration">About that of the edges of the other polarity.</param>
    /// <returns>Null without an edge of that polarity.</returns>
    public static AveragedEdge? Fold(ReadOnlySpan<double> samples, StateLevels levels, double codeStep, IReadOnlyList<Transition> transitions,
        PeriodGrid? grid, bool rising, double duration, double otherDuration)
    {
        double cell = Math.Max(FinestCell, duration / CellsPerDuration);
        // Before the edge: the region of preshoot and what it takes to see its start; after it: up to the next edge.
        double before = 12 * duration + 8, gap = LongestGap(transitions, rising, samples.Length);
        int cells = (int)Math.Min(MostCells, Math.Ceiling((before + gap) / cell) + 1);
        var placement = EdgePlacement.Of(levels, codeStep, transitions, grid, rising, duration);

        double[] times = new double[cells], values = new double[cells], counts = new double[cells], squares = new double[cells];
        double from = rising ? levels.Low : levels.High, scale = 1 / (rising ? levels.Amplitude : -levels.Amplitude);
        int edges = 0;
        for (int k = 0; k < transitions.Count; k++)
        {
            if (transitions[k].IsRising != rising)
                continue;
            edges++;
            double place = placement.Place(transitions[k]);
            // The neighbours' own passages are no part of this edge's states.
            double start = Math.Max(place - before, k > 0 ? transitions[k - 1].Instant + otherDuration : double.NegativeInfinity);
            double end = k + 1 < transitions.Count ? transitions[k + 1].Instant - 1.5 * otherDuration - 1 : double.PositiveInfinity;
            int last = (int)Math.Min(samples.Length - 1, Math.Floor(Math.Min(end, place - before + cells * cell)));
            for (int i = Math.Max(0, (int)Math.Ceiling(start)); i <= last; i++)
            {
                double t = i - place;
                int c = (int)((t + before) / cell);
                if ((uint)c >= (uint)cells)
                    continue;
                times[c] += t;
                double value = (samples[i] - from) * scale;
                values[c] += value;
                squares[c] += value * value;
                counts[c]++;
            }
        }
        return edges == 0 ? null : Points(rising, edges, times, values, counts, squares, levels, codeStep, placement.Smear, duration);
    }

    private static AveragedEdge Points(bool rising, int edges, double[] times, double[] values, double[] counts, double[] squares,
        StateLevels levels, double codeStep, double smear, double duration)
    {
        int n = 0;
        for (int c = 0; c < counts.Length; c++)
        {
            if (counts[c] == 0)
                continue;
            double count = counts[c], mean = values[c] / count;
            (times[n], values[n], counts[n], squares[n]) = (times[c] / count, mean, count, Math.Max(0, squares[c] - count * mean * mean));
            n++;
        }
        double step = codeStep / levels.Amplitude;
        EdgeNoise noise = EdgeNoise.Of(times.AsSpan(0, n), values.AsSpan(0, n), counts.AsSpan(0, n), squares.AsSpan(0, n), duration, levels.Noise / levels.Amplitude, step);
        return new AveragedEdge(rising, edges, times[..n], values[..n], counts[..n], noise.Scatter, noise.CodeError, step, smear);
    }

    private static double LongestGap(IReadOnlyList<Transition> transitions, bool rising, int length)
    {
        double longest = 0;
        for (int k = 0; k < transitions.Count; k++)
            if (transitions[k].IsRising == rising)
                longest = Math.Max(longest, (k + 1 < transitions.Count ? transitions[k + 1].Instant : length) - transitions[k].Instant);
        return longest;
    }
}
