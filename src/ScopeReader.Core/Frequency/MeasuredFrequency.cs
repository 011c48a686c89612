namespace ScopeReader.Frequency;

/// <summary>What later stages build on: the primary frequency and the grid of the edges.</summary>
/// <param name="Primary">The primary estimate, before the chain.</param>
/// <param name="Steadiness">Whether the record is one steady wave.</param>
/// <param name="Grid">Where the regression puts the edges; null where only a fit gave the frequency.</param>
public sealed record MeasuredFrequency(FrequencyEstimate Primary, Steadiness Steadiness, PeriodGrid? Grid);
