namespace ScopeReader.Harmonics;

/// <summary>How many harmonics there are of each kind, and cycles of the fundamental.</summary>
/// <param name="Wanted">The highest that the plan asks for.</param>
/// <param name="Seen">The highest of those below half of the sample rate.</param>
/// <param name="Fitted">The highest that was fitted: above <paramref name="Seen"/>, where sampling folds them to.</param>
/// <param name="Cycles">Whole cycles of the record.</param>
internal readonly record struct HarmonicCounts(int Wanted, int Seen, int Fitted, int Cycles);
