namespace ScopeReader.Archive.Contents;

/// <summary>One correction: a field's text before and after; null where there was or will be none.</summary>
/// <param name="Field">subject, serial, operator, instrument, calibration-due, notes, captured-at, tag, or a condition as <c>condition supply</c>.</param>
/// <param name="From">Before.</param>
/// <param name="To">After.</param>
public sealed record Change(string Field, string? From, string? To);
