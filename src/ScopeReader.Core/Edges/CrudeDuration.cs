using ScopeReader.Levels;

namespace ScopeReader.Edges;

/// <summary>A first look at how long the edges of one polarity take: the scale that cells and windows are set by.</summary>
internal static class CrudeDuration
{
    private const int MostEdges = 64;

    /// <summary>Median over up to 64 edges, 10 to 90 % by straight lines, samples; null without a whole edge.</summary>
    public static double? Of(ReadOnlySpan<double> samples, StateLevels levels, IReadOnlyList<Transition> transitions, bool rising)
    {
        int count = transitions.Count(t => t.IsRising == rising), stride = Math.Max(1, count / MostEdges), number = 0;
        var durations = new List<double>(MostEdges);
        foreach (Transition t in transitions)
        {
            if (t.IsRising != rising || number++ % stride != 0)
                continue;
            double from = levels.At(rising ? 0.1 : 0.9), to = levels.At(rising ? 0.9 : 0.1), sign = rising ? 1 : -1;
            int i = Math.Clamp(t.Index, 0, samples.Length - 1), j = Math.Min(i + 1, samples.Length - 1);
            while (i > 0 && sign * (samples[i] - from) > 0)
                i--;
            while (j < samples.Length - 1 && sign * (samples[j] - to) < 0)
                j++;
            if (sign * (samples[i] - from) > 0 || sign * (samples[j] - to) < 0)
                continue;
            durations.Add(Passes(samples, j - 1, to) - Passes(samples, i, from));
        }
        if (durations.Count == 0)
            return null;
        durations.Sort();
        return Math.Max(0.05, durations[durations.Count / 2]);
    }

    private static double Passes(ReadOnlySpan<double> samples, int i, double level) =>
        samples[i + 1] == samples[i] ? i + 0.5 : i + Math.Clamp((level - samples[i]) / (samples[i + 1] - samples[i]), 0, 1);
}
