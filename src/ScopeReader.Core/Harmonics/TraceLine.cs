using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>A line of a spectrum trace, noise taken off.</summary>
/// <param name="Frequency">Hz.</param>
/// <param name="LevelDb">On the trace's scale in dB.</param>
/// <param name="FrequencyTerms">Uncertainty of the frequency, Hz.</param>
/// <param name="LevelTerms">Uncertainty of the level, dB.</param>
internal sealed record TraceLine(double Frequency, double LevelDb, IReadOnlyList<BudgetTerm> FrequencyTerms, IReadOnlyList<BudgetTerm> LevelTerms);
