namespace ScopeReader.Files.Structure;

/// <summary>What a cell of a table holds.</summary>
internal enum CellKind
{
    /// <summary>Nothing.</summary>
    Empty,

    /// <summary>A finite number, perhaps with its unit.</summary>
    Number,

    /// <summary>No number, said in so many words: over range, not a number, infinite.</summary>
    Gap,

    /// <summary>Anything else.</summary>
    Text,
}
