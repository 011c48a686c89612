using System.Buffers;

namespace ScopeReader.Archive.Packing;

/// <summary>Finds how a column writes its numbers, from rows spread over it.</summary>
internal static class NumberFormatFinder
{
    private const int Looked = 2000, LongestAffix = 16;

    private static readonly SearchValues<byte> NumberStart = SearchValues.Create("+-.0123456789"u8);

    public static NumberFormat? Find(ReadOnlySpan<byte> block, TextTable table, int column)
    {
        ReadOnlySpan<byte> first = block[table.Field(table.Rows / 2, column)];
        int start = first.IndexOfAny(NumberStart), end = first.LastIndexOfAnyInRange((byte)'0', (byte)'9') + 1;
        if (start < 0 || end <= start || start > LongestAffix || first.Length - end > LongestAffix)
            return null;
        ReadOnlySpan<byte> before = first[..start], after = first[end..];

        byte sign = 0, point = (byte)'.', mark = (byte)'e';
        int least = int.MaxValue, most = 0, exponentDigits = int.MaxValue;
        bool leadingZero = true, plus = false;
        int step = Math.Max(1, table.Rows / Looked);
        for (int row = 0; row < table.Rows; row += step)
        {
            ReadOnlySpan<byte> field = block[table.Field(row, column)];
            if (!field.StartsWith(before) || !field.EndsWith(after) || field.Length < before.Length + after.Length
                || !NumberText.TryRead(field[before.Length..^after.Length], out NumberText number))
                continue; // An exception; too many of them are found out later.
            (least, most) = (Math.Min(least, number.Decimals), Math.Max(most, number.Decimals));
            leadingZero &= number.LeadingDigit;
            if (number.Sign == '+')
                sign = number.Sign;
            if (number.Point != 0)
                point = number.Point;
            if (!number.HasExponent)
                continue;
            mark = number.Mark;
            exponentDigits = Math.Min(exponentDigits, number.ExponentDigits);
            plus |= number.ExponentPlus;
        }
        if (least == int.MaxValue || most > 18)
            return null;
        return new NumberFormat(before.ToArray(), after.ToArray(), sign, point, most, least < most, leadingZero, mark,
            exponentDigits == int.MaxValue ? 1 : exponentDigits, plus);
    }
}
