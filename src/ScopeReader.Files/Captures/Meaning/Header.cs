using ScopeReader.Captures;
using ScopeReader.Files.Structure;

namespace ScopeReader.Files.Meaning;

/// <summary>What the rows right above a block of numbers say about its columns.</summary>
/// <param name="Labels">Label of each column of the block, in its order; an empty name where there is none.</param>
/// <param name="FirstRow">Index of the first header row, or of the block where there is none.</param>
/// <param name="NamesRow">Index of the row of names.</param>
/// <param name="UnitsRow">Index of the row of units.</param>
internal sealed record Header(Label[] Labels, int FirstRow, int? NamesRow, int? UnitsRow)
{
    /// <summary>How many rows of names and units there are.</summary>
    public int Rows => (NamesRow is null ? 0 : 1) + (UnitsRow is null ? 0 : 1);

    /// <summary>Reads the header of a block.</summary>
    public static Header Read(TableShape shape)
    {
        int row = Above(shape, shape.First);
        int? unitsRow = null, namesRow = null;
        if (row >= 0 && IsUnits(shape, Cells(shape, row)))
        {
            unitsRow = row;
            row = Above(shape, row);
        }
        if (row >= 0 && (unitsRow is null ? IsNames(shape, row) : MayNameUnits(shape, row)))
            namesRow = row;
        // A row of units alone may be one of names that happen to be units: "t, V" stays a name where nothing stands above.
        var labels = new Label[shape.Columns.Length];
        for (int i = 0; i < labels.Length; i++)
        {
            int c = shape.Columns[i];
            Label label = namesRow is { } n && c < Cells(shape, n).Length ? Label.Read(Cells(shape, n)[c]) : new Label("", null, 1);
            if (unitsRow is { } u && c < Cells(shape, u).Length && Label.TryUnit(Cells(shape, u)[c], out double factor, out string unit))
                label = label with { Unit = unit, Factor = factor };
            if (shape.CellUnits[i] is { } written)
                label = label with { Unit = written, Factor = 1 };
            labels[i] = label;
        }
        return new Header(labels, namesRow ?? unitsRow ?? shape.First, namesRow, unitsRow);
    }

    /// <summary>The same with the units that the person gives, where they give some; what is written in the cells stays.</summary>
    public Header Told(TableShape shape, ImportSettings settings)
    {
        Label[] labels = [.. Labels];
        for (int i = 0; i < labels.Length; i++)
            if (settings.Units is { } units && shape.Columns[i] < units.Count && shape.CellUnits[i] is null && Label.TryGiven(units[shape.Columns[i]], out double factor, out string unit))
                labels[i] = labels[i] with { Unit = unit, Factor = factor };
        return this with { Labels = labels };
    }

    // The nearest row above that says something: not blank, and not a line that only marks where the data begin.
    private static int Above(TableShape shape, int row)
    {
        do
            row--;
        while (row >= 0 && (shape.Rows[row].All(string.IsNullOrWhiteSpace) || IsMarker(shape, row)));
        return row;
    }

    private static bool IsMarker(TableShape shape, int row)
    {
        string[] cells = shape.Rows[row];
        if (Filled(cells) != 1 || cells[0].Length == 0 || Label.TryUnit(cells[0], out _, out _) || Label.Read(cells[0]).Unit is not null || Preamble.Says(cells))
            return false;
        // Over a single column one word may be its name, unless it follows lines of keys and values.
        return shape.Columns.Length > 1 || (row > 0 && Filled(shape.Rows[row - 1]) > 1);
    }

    private static int Filled(string[] cells) => cells.Count(c => c.Length > 0);

    // Names with spaces in them fall apart where spaces separate columns: a unit in brackets rejoins its name.
    private static string[] Cells(TableShape shape, int row)
    {
        string[] cells = shape.Rows[row];
        if (shape.Delimiter != RowSplitter.Spaces || cells.Length <= shape.Columns[^1] + 1)
            return cells;
        var joined = new List<string>();
        foreach (string cell in cells)
            if (joined.Count > 0 && cell[0] is '(' or '[')
                joined[^1] += " " + cell;
            else if (cell != "#")
                joined.Add(cell);
        return [.. joined];
    }

    private static bool IsUnits(TableShape shape, string[] cells)
    {
        int units = 0, named = 0;
        foreach (int c in shape.Columns)
            if (c < cells.Length && cells[c].Length > 0)
            {
                if (Label.TryUnit(cells[c], out _, out _))
                    units++;
                else if (TradeWords.IsIndex(cells[c]))
                    named++;
                else
                    return false;
            }
        return units > 0 && units + named >= Math.Max(1, shape.Columns.Length - 1);
    }

    // A row over units names the columns, even in numbers ("t, 2, 4") or not at all, unless it says something else.
    private static bool MayNameUnits(TableShape shape, int row) => !Preamble.Says(shape.Rows[row]) && shape.Rows[row].Length > shape.Columns[0];

    // Names stand over every column but perhaps the first, and none of them is a number.
    private static bool IsNames(TableShape shape, int row)
    {
        string[] cells = Cells(shape, row);
        int named = 0;
        foreach (int c in shape.Columns)
            if (c < cells.Length && cells[c].Length > 0)
            {
                if (Cell.Read(cells[c], shape.Mark).Kind == CellKind.Number)
                    return false;
                named++;
            }
        return named >= Math.Max(1, shape.Columns.Length - 1) && !IsKeyAndValue(shape, cells);
    }

    // "Points, 800" is a key with its value even where points would be a fair name for a column.
    private static bool IsKeyAndValue(TableShape shape, string[] cells) =>
        Preamble.Says(cells) && (!TradeWords.IsAxis(Label.Read(cells[0]).Name) || cells.Any(c => Cell.Read(c, shape.Mark).Kind == CellKind.Number));
}
