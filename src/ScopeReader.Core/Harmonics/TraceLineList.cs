namespace ScopeReader.Harmonics;

/// <summary>Every line of a trace that stands out of its noise.</summary>
internal static class TraceLineList
{
    // A top on the skirt of a stronger line, lifted there by noise, does not fall by this on both sides.
    private const double Prominence = 6;
    private const int MostLines = 200;

    /// <summary>The lines, from the lowest frequency up; the strongest two hundred where there are more.</summary>
    /// <param name="levels">The trace.</param>
    /// <param name="from">Index after the start-of-span feed-through.</param>
    public static IReadOnlyList<TraceLine> Of(TraceLevels levels, int from)
    {
        TraceNoise floor = levels.Floor(from);
        double threshold = floor.Threshold(levels.Count);
        var tops = new List<int>();
        for (int i = Math.Max(1, from); i < levels.Count - 1; i++)
            if (levels.IsTop(i) && levels.Level(i) > threshold && levels.Level(i) > levels.Level(i - 1) && IsProminent(levels, i))
                tops.Add(i);
        return [.. tops.OrderByDescending(levels.Level).Take(MostLines).Where(levels.StandsOut).Select(levels.Line).OfType<TraceLine>().OrderBy(l => l.Frequency)];
    }

    private static bool IsProminent(TraceLevels levels, int top) => Falls(levels, top, -1) && Falls(levels, top, +1);

    private static bool Falls(TraceLevels levels, int top, int step)
    {
        for (int i = top + step; i >= 0 && i < levels.Count; i += step)
            if (levels.Level(i) > levels.Level(top))
                return false;
            else if (levels.Level(i) < levels.Level(top) - Prominence)
                return true;
        return true;
    }
}
