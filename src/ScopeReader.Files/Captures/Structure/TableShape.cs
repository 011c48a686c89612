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

    /// <summary>For each of them the index of a column that holds its unit in every row, or -1.</summary>
    public required int[] UnitColumns { get; init; }

    /// <summary>For each of them the base unit that its cells have written in them, or null.</summary>
    public required string?[] CellUnits { get; init; }

    /// <summary>How many rows of the block are among the lines looked at.</summary>
    public required int Sampled { get; init; }

    /// <summary>How many cells its rows have.</summary>
    public int Width => Rows[First].Length;
}
