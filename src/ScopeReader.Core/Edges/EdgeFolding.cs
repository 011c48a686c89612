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
    /// <summary>Cells per transition duration: the mean of one lies within 4e-6 of the step of a Gaussian edge's curve.</summary>
    private const double CellsPerDuration = 128;

    /// <summary>Finest cell, samples.</summary>
    private const double FinestCell = 1.0 / 64;

    /// <summary>Most cells of one averaged edge: some megabytes, 2000 transition durations.</summary>
    private const int MostCells = 1 << 18;

    private const int FewestPoints = 8;

    /// <summary>Folds the edges of one polarity.</summary>
    /// <param name="samples">The waveform.</param>
    /// <param name="levels">Its state levels.</param>
    /// <param name="codeStep">The converter's step in the channel's unit; 0 where none shows.</param>
    /// <param name="transitions">All transitions, in order of time.</param>
    /// <param name="grid">The regression grid; null where there is none.</param>
    /// <param name="rising">Which polarity.</param>
    /// <param name="duration">About the transition duration of these edges, samples.</param>
    /// <param name="otherDuration">About that of the edges of the other polarity.</param>
    /// <returns>Null without an edge of that polarity, or without enough samples about it.</returns>
    public static AveragedEdge? Fold(ReadOnlySpan<double> samples, StateLevels levels, double codeStep, IReadOnlyList<Transition> transitions,
        PeriodGrid? grid, bool rising, double duration, double otherDuration)
    {
        double cell = Math.Max(FinestCell, duration / CellsPerDuration);
        // Before the edge: the region of preshoot and what it takes to see its start; after it: up to the next edge.
        double before = 12 * duration + 8, after = CommonGap(transitions, rising, samples.Length) - 1.5 * otherDuration - 1;
        int cells = (int)Math.Clamp(Math.Ceiling((before + after) / cell) + 1, Math.Ceiling((before + 2 * duration) / cell), MostCells);
        var placement = EdgePlacement.Of(levels, codeStep, transitions, grid, rising, duration);

        double[] times = new double[cells], values = new double[cells], counts = new double[cells], squares = new double[cells];
        double from = rising ? levels.Low : levels.High, scale = 1 / (rising ? levels.Amplitude : -levels.Amplitude);
        int edges = 0, begin = Begin(samples, levels, otherDuration), finish = Finish(samples, levels, otherDuration);
        for (int k = 0; k < transitions.Count; k++)
        {
            if (transitions[k].IsRising != rising)
                continue;
            edges++;
            double place = placement.Place(transitions[k]);
            // The neighbours' own passages are no part of this edge's states, and each edge ends where most have points.
            double start = Math.Max(place - before, k > 0 ? transitions[k - 1].Instant + otherDuration : begin);
            double end = k + 1 < transitions.Count ? transitions[k + 1].Instant - 1.5 * otherDuration - 1 : finish;
            int last = (int)Math.Min(samples.Length - 1, Math.Floor(Math.Min(end, place + after)));
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

    private static AveragedEdge? Points(bool rising, int edges, double[] times, double[] values, double[] counts, double[] squares,
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
        if (n < FewestPoints)
            return null;
        double step = codeStep / levels.Amplitude;
        EdgeNoise noise = EdgeNoise.Of(times.AsSpan(0, n), values.AsSpan(0, n), counts.AsSpan(0, n), squares.AsSpan(0, n), duration, levels.Noise / levels.Amplitude, step);
        return new AveragedEdge(rising, edges, times[..n], values[..n], counts[..n], noise.Scatter, noise.CodeError, step, smear);
    }

    // An edge that the record cuts off shows no transition, but what is there of it must not count as a state: leave out
    // what is on its way at an end of the record, and what its beginning may take.
    private static int Begin(ReadOnlySpan<double> samples, StateLevels levels, double otherDuration)
    {
        int i = 0;
        while (i < samples.Length && IsUnderWay(samples[i], levels))
            i++;
        return Math.Min(samples.Length - 1, i + (int)Math.Ceiling(1.5 * otherDuration));
    }

    private static int Finish(ReadOnlySpan<double> samples, StateLevels levels, double otherDuration)
    {
        int i = samples.Length - 1;
        while (i > 0 && IsUnderWay(samples[i], levels))
            i--;
        return Math.Max(0, i - (int)Math.Ceiling(1.5 * otherDuration));
    }

    private static bool IsUnderWay(double value, StateLevels levels) => value > levels.At(0.1) && value < levels.At(0.9);

    // What nine in ten edges have to the next edge: the points at the end are then as many as elsewhere.
    private static double CommonGap(IReadOnlyList<Transition> transitions, bool rising, int length)
    {
        var gaps = new List<double>();
        for (int k = 0; k + 1 < transitions.Count; k++)
            if (transitions[k].IsRising == rising)
                gaps.Add(transitions[k + 1].Instant - transitions[k].Instant);
        if (gaps.Count == 0)
            return length;
        gaps.Sort();
        return gaps[gaps.Count / 10];
    }
}
