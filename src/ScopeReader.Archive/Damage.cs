namespace ScopeReader.Archive;

/// <summary>Something in an archive that does not fit.</summary>
/// <param name="Where">What is damaged: a record, a capture, the search tables, the file.</param>
/// <param name="What">In which way.</param>
public sealed record Damage(string Where, string What);
