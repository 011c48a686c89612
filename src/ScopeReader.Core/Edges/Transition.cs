namespace ScopeReader.Edges;

/// <summary>One qualified passage from state to state.</summary>
/// <param name="IsRising">Direction.</param>
/// <param name="Index">Index of the sample at or before the 50 % crossing: the crossing lies in [Index, Index + 1).</param>
/// <param name="Instant">The 50 % instant in samples from the first, by straight line between the two samples.</param>
public readonly record struct Transition(bool IsRising, int Index, double Instant);
