namespace ScopeReader.Archive.Search;

/// <summary>What a search found.</summary>
/// <param name="Matches">How many entries match, shown or not.</param>
/// <param name="Entries">The first of them, latest capture first.</param>
/// <param name="UnknownNames">Names in the question that are no quantity and no condition of any entry: likely a slip.</param>
public sealed record Found(long Matches, IReadOnlyList<FoundEntry> Entries, IReadOnlyList<string> UnknownNames);
