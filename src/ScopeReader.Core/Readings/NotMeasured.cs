namespace ScopeReader.Readings;

/// <summary>A quantity that this capture does not support.</summary>
/// <param name="Quantity">The quantity.</param>
/// <param name="Code">Which reason, kebab-case, for programs: <c>too-few-samples</c>.</param>
/// <param name="Reason">The reason and what to do, for people.</param>
/// <param name="AtMost">What the value lies below although it was not resolved, in the quantity's unit; null where nothing is known.</param>
/// <param name="AtLeast">What the value lies above although it was not resolved; null where nothing is known.</param>
public sealed record NotMeasured(Quantity Quantity, string Code, string Reason, double? AtMost = null, double? AtLeast = null);
