namespace ScopeReader.Archive.Contents;

/// <summary>A quantity that a capture did not support.</summary>
/// <param name="Quantity">The quantity's identifier.</param>
/// <param name="Code">Which reason.</param>
/// <param name="Reason">The reason, for people.</param>
/// <param name="AtMost">What the value lies below although it was not resolved; null where nothing is known.</param>
/// <param name="AtLeast">What it lies above.</param>
public sealed record NotMeasuredContent(string Quantity, string Code, string Reason, double? AtMost = null, double? AtLeast = null);
