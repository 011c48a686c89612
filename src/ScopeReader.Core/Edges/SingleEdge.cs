namespace ScopeReader.Edges;

/// <summary>One edge by itself: by straight lines between its samples, from its middle outward.</summary>
/// <remarks>
/// Noise moves such a duration by more than it does the averaged edge's, and samples that are far apart bend it: it is for windows
/// to be sized by, and to see whether edges differ from each other.
/// </remarks>
internal static class SingleEdge
{
    /// <summary>As many edges as a median is taken over.</summary>
    private const int Inspected = 501;

    /// <summary>Between two levels, each passed where it is nearest to the 50 % instant.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="edge">The edge.</param>
    /// <param name="lower">Lower level, in the samples' unit.</param>
    /// <param name="upper">Upper level.</param>
    /// <returns>Samples; null where the record does not hold both passages.</returns>
    public static double? Duration(ReadOnlySpan<double> samples, Transition edge, double lower, double upper)
    {
        double? after = Outward(samples, edge, +1, edge.IsRising ? upper : lower), before = Outward(samples, edge, -1, edge.IsRising ? lower : upper);
        return after + before;
    }

    /// <summary>Median 10 to 90 % duration over up to 501 edges, samples; null without a whole edge.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="edges">The edges.</param>
    /// <param name="low">Low state level.</param>
    /// <param name="high">High state level.</param>
    public static double? Median(ReadOnlySpan<double> samples, IReadOnlyList<Transition> edges, double low, double high)
    {
        int count = Math.Min(Inspected, edges.Count);
        double lower = low + 0.1 * (high - low), upper = low + 0.9 * (high - low);
        var durations = new List<double>(count);
        for (int i = 0; i < count; i++)
            if (Duration(samples, edges[(int)((long)i * edges.Count / count)], lower, upper) is { } duration)
                durations.Add(duration);
        if (durations.Count == 0)
            return null;
        durations.Sort();
        return durations[durations.Count / 2];
    }

    // Distance from the 50 % instant to the nearest passage of a level, walking one way.
    private static double? Outward(ReadOnlySpan<double> samples, Transition edge, int direction, double level)
    {
        bool upwards = edge.IsRising == direction > 0;
        int i = direction > 0 ? edge.Index + 1 : edge.Index;
        while (i >= 0 && i < samples.Length && (upwards ? samples[i] < level : samples[i] > level))
            i += direction;
        if (i < 0 || i >= samples.Length)
            return null;
        int before = Math.Clamp(i - direction, 0, samples.Length - 1);
        double step = samples[i] - samples[before];
        double part = step == 0 ? 0 : Math.Clamp((level - samples[before]) / step, 0, 1);
        return Math.Abs(before + direction * part - edge.Instant);
    }
}
