namespace ScopeReader.Files.Numbers;

/// <summary>Numbers whose thousands are set apart: <c>1,234.5</c>, <c>1.234.567,8</c>, <c>12'345.6</c>, <c>1 234,5</c>.</summary>
internal static class GroupedNumber
{
    private const int GroupLength = 3;

    /// <summary>Reads one; false where nothing tells grouping from a decimal mark (<c>1,234</c>) or the groups are not of three.</summary>
    public static bool TryParse(ReadOnlySpan<byte> cell, byte mark, out double value, out int lastDigit)
    {
        (value, lastDigit) = (0, 0);
        Span<byte> plain = stackalloc byte[NumberParser.LongestNumber];
        if (cell.Length > plain.Length)
            return false;
        int at = 0, length = 0, groups = 0, digits = 0;
        byte separator = 0;
        if (cell[0] is (byte)'+' or (byte)'-')
            plain[length++] = cell[at++];
        while (at < cell.Length && cell[at] != mark)
        {
            if (char.IsAsciiDigit((char)cell[at]))
            {
                plain[length++] = cell[at++];
                digits++;
                continue;
            }
            (byte found, int width) = Separator(cell[at..], mark);
            bool isWhole = groups == 0 ? digits is > 0 and <= GroupLength : digits == GroupLength;
            if (width == 0 || !isWhole || (groups > 0 && found != separator))
                return false;
            (separator, digits) = (found, 0);
            groups++;
            at += width;
        }
        // A comma or a point that is not the decimal mark proves itself as a separator only beside one, or by coming twice.
        bool isProven = at < cell.Length || groups > 1 || separator is not ((byte)',' or (byte)'.');
        if (groups == 0 || digits != GroupLength || !isProven)
            return false;
        cell[at..].CopyTo(plain[length..]);
        return NumberParser.TryParse(plain[..(length + cell.Length - at)], mark, out value, out lastDigit);
    }

    // Which separator stands here, and how many bytes it takes: comma, point, apostrophes, and four kinds of space.
    private static (byte Kind, int Width) Separator(ReadOnlySpan<byte> text, byte mark) => text switch
    {
        [(byte)',' or (byte)'.', ..] => text[0] == mark ? ((byte)0, 0) : (text[0], 1),
        [(byte)'\'', ..] => ((byte)'\'', 1),
        [(byte)' ', ..] => ((byte)' ', 1),
        [0xC2, 0xA0, ..] => ((byte)'n', 2),
        [0xE2, 0x80, 0x89, ..] => ((byte)'t', 3),
        [0xE2, 0x80, 0xAF, ..] => ((byte)'m', 3),
        [0xE2, 0x80, 0x99, ..] => ((byte)'q', 3),
        _ => ((byte)0, 0),
    };
}
