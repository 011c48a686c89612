namespace ScopeReader.Archive.Search;

/// <summary>A primary reading of a found entry.</summary>
/// <param name="Quantity">The quantity's identifier.</param>
/// <param name="Channel">The channel.</param>
/// <param name="Segment">The segment, from 1.</param>
/// <param name="Value">In <paramref name="Unit"/>.</param>
/// <param name="Unit">The unit.</param>
/// <param name="ExpandedUncertainty">Half the width of the 95 % interval.</param>
/// <param name="Repeatability">The capture's own part of the standard uncertainty.</param>
/// <param name="Method">The method.</param>
public sealed record FoundReading(string Quantity, string Channel, int Segment, double Value, string Unit, double ExpandedUncertainty, double Repeatability, string Method);
