namespace ScopeReader.Archive.Contents;

/// <summary>A quantity that a capture did not support.</summary>
/// <param name="Quantity">The quantity's identifier.</param>
/// <param name="Code">Which reason.</param>
/// <param name="Reason">The reason, for people.</param>
public sealed record NotMeasuredContent(string Quantity, string Code, string Reason);
