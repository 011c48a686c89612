namespace ScopeReader.Readings;

/// <summary>A sentence that the numbers support, and what to try next.</summary>
/// <param name="Code">Which finding, kebab-case.</param>
/// <param name="Text">The sentence, with its figures.</param>
/// <param name="Value">The finding in a word, where it has one: <c>edge-excited</c>.</param>
public sealed record Finding(string Code, string Text, string? Value = null)
{
    /// <summary>Where an oscillation lives: <c>high</c>, <c>low</c> or <c>both</c>; null where that is not the question.</summary>
    public string? Level { get; init; }

    /// <summary>Whether an oscillation goes with the edge rate; null where that is not the question.</summary>
    public bool? Locked { get; init; }
}
