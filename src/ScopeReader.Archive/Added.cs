namespace ScopeReader.Archive;

/// <summary>What became of a capture that was added.</summary>
/// <param name="Entry">Number of its entry.</param>
/// <param name="IsNew">False where the same bytes were in the archive already: nothing was written.</param>
/// <param name="AddedAt">When that entry was added, UTC.</param>
public sealed record Added(int Entry, bool IsNew, DateTimeOffset AddedAt);
