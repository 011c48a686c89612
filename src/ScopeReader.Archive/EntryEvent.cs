using ScopeReader.Archive.Contents;

namespace ScopeReader.Archive;

/// <summary>One record of an entry's history.</summary>
/// <param name="Record">The record's number.</param>
/// <param name="Kind">entry, amendment or measurement.</param>
/// <param name="At">When, UTC.</param>
/// <param name="By">Who.</param>
/// <param name="Reason">Why; empty for the entry itself.</param>
/// <param name="Hash">The record's hash.</param>
/// <param name="Changes">What an amendment changed; empty otherwise.</param>
/// <param name="Measurement">The measurement that the record brought; null for an amendment.</param>
public sealed record EntryEvent(long Record, string Kind, DateTimeOffset At, string By, string Reason, string Hash, IReadOnlyList<Change> Changes, MeasurementContent? Measurement);
