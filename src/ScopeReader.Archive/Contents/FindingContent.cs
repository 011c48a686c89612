namespace ScopeReader.Archive.Contents;

/// <summary>A kept finding.</summary>
/// <param name="Code">Which finding.</param>
/// <param name="Value">The finding in a word, where it has one.</param>
/// <param name="Text">The sentence.</param>
public sealed record FindingContent(string Code, string? Value, string Text);
