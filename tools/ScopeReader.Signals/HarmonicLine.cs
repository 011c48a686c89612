namespace ScopeReader.Signals;

/// <summary>A harmonic of a made sine.</summary>
/// <param name="Number">From 2.</param>
/// <param name="LevelDbc">Relative to the fundamental.</param>
/// <param name="PhaseDegrees">Of its cosine where the fundamental's cosine has phase 0.</param>
public sealed record HarmonicLine(int Number, double LevelDbc, double PhaseDegrees = 0);
