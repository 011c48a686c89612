using ScopeReader.Readings;

namespace ScopeReader.Files.Meaning;

/// <summary>The label of a column: its name, and its unit where one is written with it.</summary>
/// <param name="Name">The name without the unit; empty where there is only a unit.</param>
/// <param name="Unit">The base unit; null where none is written.</param>
/// <param name="Factor">What one of the written unit is in the base unit.</param>
internal readonly record struct Label(string Name, string? Unit, double Factor)
{
    private static readonly (char Open, char Close)[] s_brackets = [('(', ')'), ('[', ']'), ('<', '>'), ('{', '}')];

    /// <summary>Reads <c>Time (s)</c>, <c>U[mV]</c>, <c>[V]</c>, <c>A in V</c>, <c>in s</c>, <c>U/mV</c>, <c>Time</c>.</summary>
    public static Label Read(string cell)
    {
        cell = cell.Trim().Trim('#', '"', '\'').Trim();
        foreach ((char open, char close) in s_brackets)
        {
            int start = cell.LastIndexOf(open), end = cell.LastIndexOf(close);
            if (start >= 0 && end > start && UnitWords.TryRead(cell[(start + 1)..end], out double factor, out string unit))
                return new Label((cell[..start] + cell[(end + 1)..]).Trim(), unit, factor);
        }
        if (cell.StartsWith("in ", StringComparison.OrdinalIgnoreCase) && UnitWords.TryRead(cell[3..], out double alone, out string only))
            return new Label("", only, alone);
        foreach (string joint in (string[])[" in ", "/", ", "])
        {
            int at = cell.LastIndexOf(joint, StringComparison.OrdinalIgnoreCase);
            if (at > 0 && UnitWords.TryRead(cell[(at + joint.Length)..], out double factor, out string unit))
                return new Label(cell[..at].Trim(), unit, factor);
        }
        return new Label(cell, null, 1);
    }

    /// <summary>Reads a unit that a person gives: what may be a name in a file is what they say it is.</summary>
    public static bool TryGiven(string text, out double factor, out string unit) => UnitWords.TryRead(text, out factor, out unit) || Units.TryUnit(text, out factor, out unit);

    /// <summary>Reads a cell that should hold a unit alone: <c>V</c>, <c>(us)</c>, <c>second</c>.</summary>
    public static bool TryUnit(string cell, out double factor, out string unit)
    {
        cell = cell.Trim().Trim('#', '"', '\'').Trim();
        if (cell.Length > 2 && s_brackets.Any(b => b.Open == cell[0] && b.Close == cell[^1]))
            cell = cell[1..^1];
        return UnitWords.TryRead(cell, out factor, out unit);
    }
}
