using System.Buffers;

namespace ScopeReader.Archive.Packing;

/// <summary>What rows spread over a column say of how it writes its numbers.</summary>
/// <param name="Format">Everything about the numbers but how many digits each has.</param>
/// <param name="IsScaled">True where scaled whole numbers hold every digit.</param>
/// <param name="Significant">The most digits that a number has, zeros at its start left out.</param>
/// <param name="SignificantVaries">True where some have fewer.</param>
/// <param name="WholePoint">True where a whole number has a decimal mark and a zero.</param>
/// <param name="WholePointBeforeExponent">True where one with an exponent has them.</param>
internal sealed record NumberStyle(NumberFormat Format, bool IsScaled, int Significant, bool SignificantVaries, bool WholePoint, bool WholePointBeforeExponent)
{
    private const int Looked = 2000, LongestAffix = 16, FewestForReals = 11, MostForShortest = 17;

    private static readonly SearchValues<byte> NumberStart = SearchValues.Create("+-.0123456789"u8);

    /// <summary>The formats to try where numbers may be written with all their digits, the likeliest first.</summary>
    public IEnumerable<RealFormat> RealFormats()
    {
        if (Significant is < FewestForReals or > DecimalDigits.Most)
            yield break;
        if (SignificantVaries && Significant <= MostForShortest)
            yield return new RealFormat(Format, DecimalDigits.Shortest, true, WholePoint, WholePointBeforeExponent);
        yield return new RealFormat(Format, Significant, SignificantVaries, WholePoint, WholePointBeforeExponent);
    }

    /// <summary>Looks at a column; null where the middle row is no number.</summary>
    public static NumberStyle? Find(ReadOnlySpan<byte> block, TextTable table, int column)
    {
        ReadOnlySpan<byte> first = block[table.Field(table.Rows / 2, column)];
        int start = first.IndexOfAny(NumberStart), end = first.LastIndexOfAnyInRange((byte)'0', (byte)'9') + 1;
        if (start < 0 || end <= start || start > LongestAffix || first.Length - end > LongestAffix)
            return null;
        ReadOnlySpan<byte> before = first[..start], after = first[end..];

        byte sign = 0, point = (byte)'.', mark = (byte)'e';
        int least = int.MaxValue, most = 0, exponentDigits = int.MaxValue, fewest = int.MaxValue, significant = 0;
        bool leadingZero = true, plus = false, wholePoint = false, wholePointBeforeExponent = false;
        int step = Math.Max(1, table.Rows / Looked);
        for (int row = 0; row < table.Rows; row += step)
        {
            ReadOnlySpan<byte> field = block[table.Field(row, column)];
            if (!field.StartsWith(before) || !field.EndsWith(after) || field.Length < before.Length + after.Length
                || !NumberText.TryRead(field[before.Length..^after.Length], out NumberText number))
                continue; // An exception; too many of them are found out later.
            (least, most) = (Math.Min(least, number.Decimals), Math.Max(most, number.Decimals));
            (fewest, significant) = (number.Significant > 0 ? Math.Min(fewest, number.Significant) : fewest, Math.Max(significant, number.Significant));
            leadingZero &= number.LeadingDigit;
            if (number.Sign == '+')
                sign = number.Sign;
            if (number.Point != 0)
                point = number.Point;
            bool endsInPointZero = number.Decimals == 1 && number.Mantissa % 10 == 0;
            wholePoint |= endsInPointZero && !number.HasExponent;
            wholePointBeforeExponent |= endsInPointZero && number.HasExponent;
            if (!number.HasExponent)
                continue;
            mark = number.Mark;
            exponentDigits = Math.Min(exponentDigits, number.ExponentDigits);
            plus |= number.ExponentPlus;
        }
        if (least == int.MaxValue)
            return null;
        var format = new NumberFormat(before.ToArray(), after.ToArray(), sign, point, Math.Min(most, NumberFormat.MostDigits), least < most, leadingZero, mark,
            exponentDigits == int.MaxValue ? 1 : exponentDigits, plus);
        return new NumberStyle(format, most <= NumberFormat.MostDigits, significant, fewest < significant, wholePoint, wholePointBeforeExponent);
    }
}
