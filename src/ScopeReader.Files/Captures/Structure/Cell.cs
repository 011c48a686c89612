using System.Text;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Numbers;

namespace ScopeReader.Files.Structure;

/// <summary>One cell of a table, read.</summary>
/// <param name="Kind">What it holds.</param>
/// <param name="Value">The number in <paramref name="Unit"/>; NaN where there is none.</param>
/// <param name="Half">Half of the last printed digit, in the same unit.</param>
/// <param name="Unit">The base unit written in the cell; null where none is.</param>
/// <param name="IsClock">True where it is a time of day, s since midnight.</param>
internal readonly record struct Cell(CellKind Kind, double Value, double Half, string? Unit, bool IsClock = false)
{
    /// <summary>Values from here on stand for no number.</summary>
    // SCPI-99 7.2.1.4 and 7.2.1.5 (from memory): 9.9E37 is infinity and 9.91E37 is not a number.
    public const double Infinity = 9.89e37;

    private static readonly string[] s_gaps = ["inf", "infinity", "1.#inf", "1.#qnan", "nan", "ol", "overload", "over", "ovld", "o.l", "o.l.", "ovfl", "overflow", "-", "--", "---", "----", "n/a", "na", "null", "\u221E", "*", "***", "****"];

    private static readonly Cell s_empty = new(CellKind.Empty, double.NaN, 0, null), s_gap = s_empty with { Kind = CellKind.Gap }, s_text = s_empty with { Kind = CellKind.Text };

    /// <summary>Reads a cell as it stands in the file.</summary>
    /// <param name="cell">UTF-8, quotes and spaces and all.</param>
    /// <param name="mark">The decimal mark.</param>
    public static Cell Read(ReadOnlySpan<byte> cell, byte mark)
    {
        cell = Trim(cell);
        if (cell.IsEmpty)
            return s_empty;
        if (NumberParser.TryParse(cell, mark, out double value, out int lastDigit))
            return Math.Abs(value) < Infinity ? new Cell(CellKind.Number, value, NumberParser.HalfOf(lastDigit), null) : s_gap;
        if (cell.Length > NumberParser.LongestNumber)
            return s_text;
        if (IsDate(cell))
            return s_empty;
        int number = NumberParser.Length(cell, mark);
        if (number > 0 && cell[^1] != mark)
        {
            if (cell.IndexOf((byte)':') > 0 && ClockTime.TryParse(cell, out double seconds, out double half))
                return new Cell(CellKind.Number, seconds, half, "s", IsClock: true);
            if (GroupedNumber.TryParse(cell, mark, out value, out lastDigit))
                return new Cell(CellKind.Number, value, NumberParser.HalfOf(lastDigit), null);
            if (NumberParser.TryParse(cell[..number], mark, out value, out lastDigit) && UnitWords.TryRead(Encoding.UTF8.GetString(cell[number..]), out double factor, out string unit))
                return new Cell(CellKind.Number, UnitWords.Scale(value, factor), NumberParser.HalfOf(lastDigit) * factor, unit);
        }
        return IsGap(cell) ? s_gap : s_text;
    }

    /// <summary>The same for text of the head.</summary>
    public static Cell Read(string cell, char mark) => cell.Length > 4 * NumberParser.LongestNumber ? s_text : Read(Encoding.UTF8.GetBytes(cell), (byte)mark);

    /// <summary>A cell without spaces, tabs and quotes round it.</summary>
    public static ReadOnlySpan<byte> Trim(ReadOnlySpan<byte> cell)
    {
        cell = cell.Trim(" \t\r"u8);
        if (cell.Length >= 2 && cell[0] == '"' && cell[^1] == '"')
            cell = cell[1..^1].Trim(" \t"u8);
        return cell;
    }

    // A date in a cell of its own says nothing that the times beside it don't.
    private static bool IsDate(ReadOnlySpan<byte> cell)
    {
        if (cell.Length is < 6 or > 10 || !char.IsAsciiDigit((char)cell[^1]))
            return false;
        int at = cell.IndexOfAny("-/."u8);
        return at is >= 1 and <= 4 && cell.Count(cell[at]) == 2 && cell.IndexOfAnyExceptInRange((byte)'-', (byte)'9') < 0 && cell[at + 1] != cell[at];
    }

    private static bool IsGap(ReadOnlySpan<byte> cell)
    {
        if (cell.Length > 10)
            return false;
        string word = Encoding.UTF8.GetString(cell);
        foreach (string gap in s_gaps)
            if (word.Equals(gap, StringComparison.OrdinalIgnoreCase) || (word[0] is '-' or '+' && word.AsSpan(1).Equals(gap, StringComparison.OrdinalIgnoreCase)))
                return true;
        return false;
    }
}
