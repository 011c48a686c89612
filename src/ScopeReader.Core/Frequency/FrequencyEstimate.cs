namespace ScopeReader.Frequency;

/// <summary>What one estimator says of a waveform's frequency, before the chain.</summary>
/// <param name="Method">The method's name as readings have it: <c>sine-fit</c>.</param>
/// <param name="CyclesPerSample">The frequency, cycles per sample, above 0 and at most 0.5.</param>
/// <param name="Terms">The capture's own uncertainty terms, in cycles per sample.</param>
/// <param name="Count">Cycles or edges it rests on.</param>
public sealed record FrequencyEstimate(string Method, double CyclesPerSample, IReadOnlyList<Readings.BudgetTerm> Terms, int Count);
