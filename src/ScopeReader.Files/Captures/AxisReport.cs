using ScopeReader.Captures;

namespace ScopeReader.Files;

/// <summary>How an axis was understood.</summary>
/// <param name="Source">Where it was found.</param>
/// <param name="Unit">"s", "Hz" or "sample".</param>
/// <param name="Interval">Step between neighbours in <paramref name="Unit"/>; null where none is known.</param>
/// <param name="IntervalLow">The shortest step that the rounded values allow.</param>
/// <param name="IntervalHigh">The longest.</param>
/// <param name="WorstDeviation">How far the worst printed value lies from even spacing, in <paramref name="Unit"/>; null where there is no column.</param>
public sealed record AxisReport(AxisSource Source, string Unit, double? Interval, double? IntervalLow, double? IntervalHigh, double? WorstDeviation);
