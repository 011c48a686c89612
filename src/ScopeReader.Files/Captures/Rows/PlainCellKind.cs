namespace ScopeReader.Files.Rows;

/// <summary>What a cell of a plain row holds.</summary>
internal enum PlainCellKind
{
    /// <summary>A number that is wanted.</summary>
    Number,

    /// <summary>The number of the row: whole, and not wanted.</summary>
    Count,

    /// <summary>The unit of the number before it, the same in every row.</summary>
    Unit,

    /// <summary>Anything without quotes; not wanted.</summary>
    Anything,
}
