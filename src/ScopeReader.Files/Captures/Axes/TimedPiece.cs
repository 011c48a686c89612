using ScopeReader.Captures;

namespace ScopeReader.Files.Axes;

/// <summary>A stretch of rows with its time axis.</summary>
/// <param name="First">Index of its first row.</param>
/// <param name="Length">How many rows.</param>
/// <param name="Axis">When they were taken; the start is that of the earliest.</param>
/// <param name="Falls">True where the rows run backwards in time.</param>
/// <param name="IsPaired">True where two rows stand for each instant.</param>
internal sealed record TimedPiece(int First, int Length, TimeAxis Axis, bool Falls = false, bool IsPaired = false);
