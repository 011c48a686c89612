namespace ScopeReader.Files.Meaning;

/// <summary>What a preamble says, by what it says it about.</summary>
internal sealed class Facts
{
    private readonly Dictionary<Fact, Statement> _statements = [];

    /// <summary>One thing said.</summary>
    /// <param name="Text">As it stands.</param>
    /// <param name="Value">Its number in <paramref name="Unit"/>; NaN where it has none.</param>
    /// <param name="Unit">The base unit; null where none is written.</param>
    public readonly record struct Statement(string Text, double Value, string? Unit);

    /// <summary>How many numbers are stated.</summary>
    public int Numbers => _statements.Values.Count(s => double.IsFinite(s.Value) && s.Value != 0);

    /// <summary>A number that the preamble states in one of some units or without a unit; null where it doesn't.</summary>
    public Statement? Number(Fact fact, params ReadOnlySpan<string> units)
    {
        if (!_statements.TryGetValue(fact, out Statement said) || !double.IsFinite(said.Value))
            return null;
        return said.Unit is null || units.Contains(said.Unit) ? said : null;
    }

    /// <summary>A word that the preamble states; null where it doesn't.</summary>
    public string? Word(Fact fact) => _statements.TryGetValue(fact, out Statement said) && said.Text.Length > 0 ? said.Text : null;

    /// <summary>Writes something down; what is said first stays.</summary>
    public void Add(Fact fact, Statement statement) => _statements.TryAdd(fact, statement);

    /// <summary>Adds what an earlier preamble said and this one does not.</summary>
    public void Inherit(Facts earlier)
    {
        foreach ((Fact fact, Statement said) in earlier._statements)
            _statements.TryAdd(fact, said);
    }
}
