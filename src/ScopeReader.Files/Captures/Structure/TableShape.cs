namespace ScopeReader.Files.Structure;

/// <summary>Where a block of numbers begins in the lines looked at, and how its rows are built.</summary>
internal sealed record TableShape
{
    /// <summary>The character between cells; a space stands for any run of spaces and tabs.</summary>
    public required char Delimiter { get; init; }

    /// <summary>The decimal mark.</summary>
    public required char Mark { get; init; }

    /// <summary>The lines looked at, in cells.</summary>
    public required IReadOnlyList<string[]> Rows { get; init; }

    /// <summary>Index of the first row of the block.</summary>
    public required int First { get; init; }

    /// <summary>Indices of the columns that hold numbers, rising.</summary>
    public required int[] Columns { get; init; }

    /// <summary>How many columns hold numbers, their first rows.</summary>
    public required int Sampled { get; init; }
}
