using ScopeReader.Bench.Drawing;

namespace ScopeReader.Bench.Plots;

/// <summary>Something measured, or a limit, drawn where it belongs on the plot.</summary>
/// <param name="Y">The level that it marks.</param>
/// <param name="Label">A word or two.</param>
/// <param name="Ink">How it is drawn.</param>
/// <param name="X">The place that it marks; null for the whole width.</param>
internal sealed record PlotMark(double Y, string Label, Ink Ink, double? X = null);
