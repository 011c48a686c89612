using System.Text;
using ScopeReader.Files.Numbers;

namespace ScopeReader.Files.Structure;

/// <summary>What a cell of a table holds.</summary>
internal enum CellKind
{
    /// <summary>Nothing.</summary>
    Empty,

    /// <summary>A finite number.</summary>
    Number,

    /// <summary>No number, said in so many words: over range, not a number, infinite.</summary>
    Gap,

    /// <summary>Anything else.</summary>
    Text,
}

/// <summary>Reads one cell.</summary>
internal static class Cell
{
    // SCPI-99 7.2.1.4 and 7.2.1.5 (from memory): 9.9E37 is infinity and 9.91E37 is not a number.
    private const double Infinity = 9.89e37;

    private static readonly string[] s_gaps = ["inf", "infinity", "nan", "ol", "overload", "over", "ovld", "o.l", "o.l.", "ovfl", "overflow", "-", "--", "---", "----", "n/a", "na", "null", "\u221E"];

    /// <summary>Says what a cell is.</summary>
    /// <param name="cell">UTF-8, as it stands in the file.</param>
    /// <param name="mark">The decimal mark.</param>
    /// <param name="value">The number, or NaN.</param>
    /// <param name="lastDigit">Decimal exponent of its last printed digit.</param>
    public static CellKind Read(ReadOnlySpan<byte> cell, byte mark, out double value, out int lastDigit)
    {
        cell = Trim(cell);
        if (cell.IsEmpty)
        {
            (value, lastDigit) = (double.NaN, 0);
            return CellKind.Empty;
        }
        if (NumberParser.TryParse(cell, mark, out value, out lastDigit))
        {
            if (Math.Abs(value) < Infinity)
                return CellKind.Number;
            value = double.NaN;
            return CellKind.Gap;
        }
        value = double.NaN;
        return IsGap(cell) ? CellKind.Gap : CellKind.Text;
    }

    /// <summary>The same for text of the head.</summary>
    public static CellKind Read(string cell, byte mark, out double value, out int lastDigit) =>
        Read(Encoding.UTF8.GetBytes(cell), mark, out value, out lastDigit);

    /// <summary>A cell without spaces, tabs and quotes round it.</summary>
    public static ReadOnlySpan<byte> Trim(ReadOnlySpan<byte> cell)
    {
        cell = cell.Trim(" \t\r"u8);
        if (cell.Length >= 2 && cell[0] == '"' && cell[^1] == '"')
            cell = cell[1..^1].Trim(" \t"u8);
        return cell;
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
