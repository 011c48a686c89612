using ScopeReader.Files.Meaning;

namespace ScopeReader.Files.Structure;

/// <summary>Whether a row of cells belongs to a block.</summary>
internal static class RowFit
{
    /// <summary>True where every column is there, none of them holds a word, and one of them a number.</summary>
    public static bool Fits(ReadOnlySpan<Cell> cells, ReadOnlySpan<int> columns)
    {
        int numbers = 0;
        foreach (int c in columns)
        {
            if (c >= cells.Length || cells[c].Kind == CellKind.Text)
                return false;
            if (cells[c].Kind == CellKind.Number)
                numbers++;
        }
        return numbers > 0;
    }

    /// <summary>The columns that hold numbers.</summary>
    public static int[] Numbers(ReadOnlySpan<Cell> cells)
    {
        var columns = new List<int>();
        for (int c = 0; c < cells.Length; c++)
            if (cells[c].Kind == CellKind.Number)
                columns.Add(c);
        return [.. columns];
    }

    /// <summary>True where a line is a remark: it stands apart from the table wherever it is.</summary>
    public static bool IsRemark(string[] row) => row.Length > 0 && row[0].Length > 0 && row[0][0] is '#' or '%' or '!';

    /// <summary>For each column of numbers the column right of it, where that holds a unit in every row given.</summary>
    public static int[] UnitColumns(IReadOnlyList<string[]> rows, int[] columns)
    {
        int[] units = new int[columns.Length];
        for (int i = 0; i < columns.Length; i++)
        {
            int c = columns[i] + 1;
            units[i] = rows.All(row => c < row.Length && Label.TryUnit(row[c], out _, out _)) ? c : -1;
        }
        return units;
    }
}
