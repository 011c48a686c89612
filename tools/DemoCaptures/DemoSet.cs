namespace ScopeReader.DemoCaptures;

/// <summary>Every capture of captures-demo/.</summary>
public static class DemoSet
{
    /// <summary>The files, in the order of the README there.</summary>
    public static IReadOnlyList<DemoFile> All { get; } =
    [
        // True error of the source, ppm; the instrument shows 12 ppm more.
        new("if-source-7.csv", () => Sources.Buffered(-4, 71)),
        new("if-source-8.csv", () => Sources.Buffered(84, 72)),
        new("if-source-9.csv", () => Sources.Buffered(29, 73)),
        new("oscillator-pin-7.csv", () => Sources.AtThePin(-4, 74)),
        new("node-breadboard.csv", Nodes.Breadboard),
        new("node-soldered.csv", Nodes.Soldered),
        new("source-spectrum.csv", Sources.Spectrum),
        new("logger-export.csv", Awkward.LoggerExport),
        new("no-interval.csv", Awkward.NoInterval),
        new("slow-edge.csv", Nodes.SlowEdge),
        new("divider.csv", Nodes.Divider),
    ];
}
