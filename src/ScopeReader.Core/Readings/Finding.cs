namespace ScopeReader.Readings;

/// <summary>A sentence that the numbers support, and what to try next.</summary>
/// <param name="Code">Which finding, kebab-case.</param>
/// <param name="Text">The sentence, with its figures.</param>
/// <param name="Value">The finding in a word, where it has one: <c>edge-excited</c>.</param>
public sealed record Finding(string Code, string Text, string? Value = null);
