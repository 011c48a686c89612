using ScopeReader.Files.Structure;

namespace ScopeReader.Files.Meaning;

/// <summary>What the rows right above a block of numbers say about its columns.</summary>
/// <param name="Labels">Label of each column of the block, in its order; an empty name where there is none.</param>
/// <param name="Rows">How many rows of names and units there are.</param>
/// <param name="FirstRow">Index of the first of them, or of the block where there is none.</param>
internal sealed record Header(Label[] Labels, int Rows, int FirstRow)
{
    /// <summary>Reads the header of a block.</summary>
    public static Header Read(TableShape shape)
    {
        int row = Above(shape, shape.First);
        string[]? units = null, names = null;
        int first = shape.First, count = 0;
        if (row >= 0 && IsUnits(shape, row))
        {
            (units, first, count) = (shape.Rows[row], row, 1);
            row = Above(shape, row);
        }
        if (row >= 0 && (units is null ? IsNames(shape, row) : shape.Rows[row].Length > shape.Columns[0]))
        {
            (names, first) = (shape.Rows[row], row);
            count++;
        }
        var labels = new Label[shape.Columns.Length];
        for (int i = 0; i < labels.Length; i++)
        {
            int c = shape.Columns[i];
            Label label = names is not null && c < names.Length ? Label.Read(names[c]) : new Label("", null, 1);
            if (units is not null && c < units.Length && Label.TryUnit(units[c], out double factor, out string unit))
                label = label with { Unit = unit, Factor = factor };
            labels[i] = label;
        }
        return new Header(labels, count, first);
    }

    // The nearest row above that is not blank.
    private static int Above(TableShape shape, int row)
    {
        do
            row--;
        while (row >= 0 && shape.Rows[row].All(string.IsNullOrWhiteSpace));
        return row;
    }

    private static bool IsUnits(TableShape shape, int row)
    {
        string[] cells = shape.Rows[row];
        int units = 0;
        foreach (int c in shape.Columns)
            if (c < cells.Length && cells[c].Length > 0)
            {
                if (!Label.TryUnit(cells[c], out _, out _) && !TradeWords.IsIndex(cells[c]))
                    return false;
                units++;
            }
        return units > 0;
    }

    // Names stand over every column but perhaps the first, and none of them is a number.
    private static bool IsNames(TableShape shape, int row)
    {
        string[] cells = shape.Rows[row];
        int named = 0;
        foreach (int c in shape.Columns)
            if (c < cells.Length && cells[c].Length > 0)
            {
                if (Cell.Read(cells[c], (byte)shape.Mark, out _, out _) != CellKind.Text)
                    return false;
                named++;
            }
        return named >= Math.Max(1, shape.Columns.Length - 1);
    }
}
