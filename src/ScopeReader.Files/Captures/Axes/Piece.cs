namespace ScopeReader.Files.Axes;

/// <summary>A stretch of rows whose axis values are evenly spaced.</summary>
/// <param name="First">Index of its first row.</param>
/// <param name="Length">How many rows.</param>
/// <param name="Spacing">Its spacing, the start being that of row <paramref name="First"/>; null for a single row.</param>
internal sealed record Piece(int First, int Length, Spacing? Spacing);
