namespace ScopeReader.Harmonics;

/// <summary>What rounding to a converter's steps does to a line, as peak amplitudes.</summary>
/// <param name="Likely">The largest that the wave itself shows over the places where its levels may lie between the codes.</param>
/// <param name="Most">The largest that any wave of such noise could show: nothing below it can be told from rounding.</param>
internal readonly record struct StepError(double Likely, double Most);
