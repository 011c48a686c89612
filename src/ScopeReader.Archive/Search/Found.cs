namespace ScopeReader.Archive.Search;

/// <summary>What a search found.</summary>
/// <param name="Matches">How many entries match, shown or not.</param>
/// <param name="Entries">The first of them, latest capture first.</param>
/// <param name="Doubts">What in the question may be a slip: a name that the archive does not know.</param>
public sealed record Found(long Matches, IReadOnlyList<FoundEntry> Entries, IReadOnlyList<string> Doubts);
