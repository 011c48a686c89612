using ScopeReader.Readings;
using static ScopeReader.Harmonics.HarmonicAnalyser;

namespace ScopeReader.Harmonics;

/// <summary>Says which lines of a trace are multiples of one frequency, and which are not.</summary>
internal static class TraceCombFindings
{
    private const int MostNamed = 5, HighestOrder = 1000;

    /// <summary>Writes what it finds.</summary>
    /// <param name="levels">The trace.</param>
    /// <param name="from">Index after the start-of-span feed-through.</param>
    /// <param name="fundamental">Hz.</param>
    /// <param name="carrier">The strongest line.</param>
    /// <param name="resolutionBandwidth">Hz; 0 where unknown.</param>
    /// <param name="sheet">Where findings go.</param>
    public static void Write(TraceLevels levels, int from, double fundamental, TraceLine carrier, double resolutionBandwidth, ReadingSheet sheet)
    {
        var orders = new List<int>();
        var others = new List<TraceLine>();
        double reach = Math.Max(resolutionBandwidth, 2 * levels.Spacing);
        foreach (TraceLine line in TraceLineList.Of(levels, from))
        {
            int order = (int)Math.Round(line.Frequency / fundamental);
            // The multiple of a frequency that is off by a part of a point is off by that many parts.
            if (order is >= 1 and <= HighestOrder && Math.Abs(line.Frequency - order * fundamental) < reach + order * levels.Spacing / 10 && reach < fundamental / 4)
                orders.Add(order);
            else
                others.Add(line);
        }
        if (orders.Count > 2)
            sheet.Add(new Finding("comb", Text($"{orders.Count} lines are multiples of {Engineering.Format(fundamental, "Hz", 5)}, up to {orders[^1]} times: harmonics of one source"), "comb"));
        if (others.Count == 0)
            return;
        string named = string.Join(", ", others.OrderByDescending(l => l.LevelDb).Take(MostNamed).Select(l => Text($"{Engineering.Format(l.Frequency, "Hz", 5)} ({l.LevelDb - carrier.LevelDb:F1} dBc)")));
        string more = others.Count > MostNamed ? Text($" and {others.Count - MostNamed} weaker") : "";
        sheet.Add(new Finding("spurs", Text($"{(others.Count == 1 ? "a line that is no harmonic" : "lines that are no harmonics")}: {named}{more}: another source, a mixing product or the analyser's own; with 10 dB more attenuation a line of the source stays where it is in dBc"), "spurs"));
    }
}
