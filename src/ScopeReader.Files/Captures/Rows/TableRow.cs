using ScopeReader.Files.Meaning;
using ScopeReader.Files.Structure;

namespace ScopeReader.Files.Rows;

/// <summary>Holds the cells of a line against the table that they should be a row of.</summary>
internal sealed class TableRow(string file, Table table, RowCells cells)
{
    private readonly TableShape _shape = table.Shape;
    private readonly Cell[] _row = new Cell[table.Shape.Columns.Length];
    private int _wrongAt;

    /// <summary>True where the line taken last is a row.</summary>
    public bool Fits()
    {
        _wrongAt = -1;
        int numbers = 0;
        ReadOnlySpan<Cell> all = cells.All;
        for (int i = 0; i < _row.Length; i++)
        {
            int c = _shape.Columns[i];
            if (c >= all.Length)
            {
                // A table that stands right of another may end before it, its cells not even written.
                if (!IsEndOfGroup(i, all.Length))
                    return false;
                _row[i] = new Cell(CellKind.Empty, double.NaN, 0, null);
                continue;
            }
            if (all[c].Kind == CellKind.Text && table.Roles[i] != ColumnRole.Skip)
            {
                _wrongAt = c;
                return false;
            }
            _row[i] = all[c];
            if (all[c].Kind is CellKind.Number or CellKind.Gap)
                numbers++;
        }
        // Words behind the numbers are notes; a number there has slipped out of its column.
        for (int c = _shape.Width; c < all.Length; c++)
            if (all[c].Kind == CellKind.Number)
                return false;
        return numbers > 0;
    }

    /// <summary>Adds the row that fitted last.</summary>
    /// <param name="blankBefore">True where a blank line stands before it.</param>
    public void Add(bool blankBefore)
    {
        if (blankBefore && table.Rows > 0)
            table.Breaks.Add(table.Rows);
        for (int i = 0; i < _row.Length; i++)
        {
            table.Samples[i]?.Add(_row[i].Value, _row[i].Kind == CellKind.Gap);
            table.Axes[i]?.Add(_row[i].Value, _row[i].Half, _row[i].IsClock);
        }
        table.Rows++;
    }

    /// <summary>Why the line that did not fit cannot be read.</summary>
    /// <param name="line">The line.</param>
    /// <param name="number">Its number.</param>
    public ImportException Refusal(ReadOnlySpan<byte> line, long number)
    {
        if (_wrongAt < 0)
            return new ImportException(file, FormattableString.Invariant($"expected {Expected()}, found {cells.Filled}: \"{Excerpt.Of(line)}\". Export the capture again with all channels in every line."), number);
        return new ImportException(file, $"expected a number, found \"{Excerpt.Of(RowSplitter.CellAt(line, _shape.Delimiter, _wrongAt))}\". Remove the line, or leave the column out: --columns with skip in its place.", number, _wrongAt + 1);
    }

    private bool IsEndOfGroup(int i, int count)
    {
        while (i > 0 && table.Axes[i] is null)
            i--;
        return i > 0 && _shape.Columns[i] >= count;
    }

    private string Expected()
    {
        string[] names = [.. table.Header.Labels.Select(l => Excerpt.Of(l.Name, 20))];
        return names.Length == 1 ? "1 column" : names.Any(n => n.Length == 0) || names.Length > 8 ? $"{names.Length} columns" : $"{names.Length} columns ({string.Join(", ", names)})";
    }
}
