using ScopeReader.Files.Structure;

namespace ScopeReader.Files.Meaning;

/// <summary>Reads the text round a block of numbers for what it says about them, whatever its layout.</summary>
internal static class Preamble
{
    private const int PanelRows = 200;
    private static readonly char[] s_joints = [':', '=', '\t', ';', ','];

    /// <summary>Reads the lines above the header, the panel beside the data, and values in the header's own spare columns.</summary>
    public static Facts Read(TableShape shape, Header header)
    {
        var facts = new Facts();
        for (int r = 0; r < header.FirstRow; r++)
            ReadAcross(shape.Rows[r], shape.Mark, facts, null);
        if (header.Rows >= 2 && header.NamesRow is { } names && header.UnitsRow is { } units)
            ReadDown(shape.Rows[names], shape.Rows[units], shape, facts);
        for (int r = shape.First; r < Math.Min(shape.Rows.Count, shape.First + PanelRows); r++)
            ReadAcross(shape.Rows[r], shape.Mark, facts, shape.Columns);
        return facts;
    }

    /// <summary>True where a line says something that the reader knows: it then belongs to a preamble and not to the data.</summary>
    public static bool Says(string[] row) => row.Length > 0 && (FactWords.Of(Label.Read(row[0]).Name) is not null || (Joined(row[0]) is { } parts && FactWords.Of(Label.Read(parts.Key).Name) is not null));

    // Keys with their values in the cells that follow, or in the same cell behind a colon or an equals sign.
    private static void ReadAcross(string[] row, char mark, Facts facts, int[]? data)
    {
        for (int c = 0; c < row.Length; c++)
        {
            if (row[c].Length == 0 || (data is not null && data.Contains(c)) || char.IsAsciiDigit(row[c][0]))
                continue;
            Label label = Label.Read(row[c]);
            if (Joined(row[c]) is { Value.Length: > 0 } parts && FactWords.Of(Label.Read(parts.Key).Name) is { } joined)
                State(facts, joined, parts.Value, c + 1 < row.Length ? row[c + 1] : "", Label.Read(parts.Key), mark);
            else if (FactWords.Of(label.Name) is { } fact)
            {
                int value = c + 1;
                while (value < row.Length && row[value].Length == 0 && (data is null || !data.Contains(value)))
                    value++;
                if (value < row.Length && (data is null || !data.Contains(value)))
                    State(facts, fact, row[value], value + 1 < row.Length ? row[value + 1] : "", label, mark);
            }
        }
    }

    // Names over values: the header's columns that hold no samples.
    private static void ReadDown(string[] names, string[] values, TableShape shape, Facts facts)
    {
        for (int c = 0; c < Math.Min(names.Length, values.Length); c++)
            if (!shape.Columns.Contains(c) && FactWords.Of(Label.Read(names[c]).Name) is { } fact)
                State(facts, fact, values[c], "", Label.Read(names[c]), shape.Mark);
    }

    private static (string Key, string Value)? Joined(string cell)
    {
        int at = cell.IndexOfAny(s_joints);
        return at > 0 ? (cell[..at], cell[(at + 1)..].Trim().Trim(';', ',')) : null;
    }

    private static void State(Facts facts, Fact fact, string text, string next, Label key, char mark)
    {
        text = text.Trim();
        // "5.0E-7;s": the unit of a value may still be joined to it.
        if (text.IndexOfAny([';', '\t']) is > 0 and int at)
            (text, next) = (text[..at].Trim(), text[(at + 1)..].Trim());
        Cell cell = Cell.Read(text, mark);
        // A preamble may be printed with the other decimal mark than the data.
        if (cell.Kind != CellKind.Number)
            cell = Cell.Read(text, mark == '.' ? ',' : '.');
        if (cell.Kind != CellKind.Number && RateOf(text, mark) is { } rate)
            cell = rate;
        if (cell.Kind != CellKind.Number)
        {
            facts.Add(fact, new Facts.Statement(text, double.NaN, null));
            return;
        }
        (double value, string? unit) = (cell.Value, cell.Unit);
        if (unit is null && key.Unit is { Length: > 0 } keyUnit)
            (value, unit) = (UnitWords.Scale(value, key.Factor), keyUnit);
        else if (unit is null && Label.TryUnit(next, out double factor, out string written) && written.Length > 0)
            (value, unit) = (UnitWords.Scale(value, factor), written);
        facts.Add(fact, new Facts.Statement(text, value, unit));
    }

    // "500 MS/s", "1 GSPS": samples a second, which as a unit would be siemens or nothing.
    private static Cell? RateOf(string text, char mark)
    {
        foreach (string suffix in (string[])["Sa/s", "S/s", "sps", "samples/s", "Sample/s", "pts/s"])
            if (text.EndsWith(suffix, StringComparison.OrdinalIgnoreCase))
            {
                Cell cell = Cell.Read(text[..^suffix.Length].Trim() + "Hz", mark);
                return cell.Kind == CellKind.Number ? cell : null;
            }
        return null;
    }
}
