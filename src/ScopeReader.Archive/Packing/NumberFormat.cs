namespace ScopeReader.Archive.Packing;

/// <summary>How a column writes its numbers, so that a whole number and an exponent give the very text back.</summary>
/// <param name="Before">Bytes before each number: padding, a quote.</param>
/// <param name="After">Bytes after each number: a unit, a quote.</param>
/// <param name="Sign">Byte before numbers that are not negative; 0 for none.</param>
/// <param name="Point">The decimal mark.</param>
/// <param name="Decimals">Digits after the mark; where <paramref name="Trims"/>, the most of them.</param>
/// <param name="Trims">True where zeros at the end are left out.</param>
/// <param name="LeadingZero">True where a zero stands before the mark.</param>
/// <param name="Mark">E or e.</param>
/// <param name="ExponentDigits">Digits of the exponent, at least.</param>
/// <param name="ExponentPlus">True where exponents that are not negative have a sign.</param>
internal sealed record NumberFormat(byte[] Before, byte[] After, byte Sign, byte Point, int Decimals, bool Trims, bool LeadingZero, byte Mark, int ExponentDigits, bool ExponentPlus)
{
    /// <summary>The exponent of a number without one.</summary>
    public const sbyte NoExponent = sbyte.MinValue;

    /// <summary>Longest text that is taken for a number.</summary>
    public const int LongestText = 48;

    /// <summary>Most digits after the mark.</summary>
    public const int MostDigits = NumberText.MostSignificant;

    private static readonly long[] PowersOfTen = MakePowers();

    private static ReadOnlySpan<byte> Pairs =>
        "00010203040506070809101112131415161718192021222324252627282930313233343536373839404142434445464748495051525354555657585960616263646566676869707172737475767778798081828384858687888990919293949596979899"u8;

    /// <summary>Reads a field as a scaled whole number; the caller writes it again and compares.</summary>
    public bool TryRead(ReadOnlySpan<byte> field, out long mantissa, out sbyte exponent)
    {
        (mantissa, exponent) = (0, NoExponent);
        if (field.Length > LongestText || !field.StartsWith(Before) || !field.EndsWith(After) || field.Length < Before.Length + After.Length)
            return false;
        if (!NumberText.TryRead(field[Before.Length..^After.Length], out NumberText text) || text.Decimals > Decimals || text.Significant + Decimals - text.Decimals > MostDigits)
            return false;
        mantissa = text.Mantissa * PowersOfTen[Decimals - text.Decimals];
        if (text.Negative)
            mantissa = -mantissa;
        if (text.HasExponent)
            exponent = (sbyte)text.Exponent;
        return true;
    }

    /// <summary>Writes a number as the column does.</summary>
    /// <param name="text">At least <see cref="LongestText"/> bytes and the lengths of <see cref="Before"/> and <see cref="After"/>.</param>
    /// <param name="mantissa">The whole number.</param>
    /// <param name="exponent">Its exponent, or <see cref="NoExponent"/>.</param>
    /// <returns>Bytes written.</returns>
    public int Write(Span<byte> text, long mantissa, sbyte exponent)
    {
        Before.CopyTo(text);
        int at = Before.Length;
        if (mantissa < 0)
            text[at++] = (byte)'-';
        else if (Sign != 0)
            text[at++] = Sign;

        ulong size = (ulong)Math.Abs(mantissa), scale = (ulong)PowersOfTen[Decimals];
        ulong whole = size / scale, fraction = size - whole * scale;
        if (whole > 0 || LeadingZero || Decimals == 0)
        {
            whole.TryFormat(text[at..], out int digits);
            at += digits;
        }
        if (Decimals > 0 && !(Trims && fraction == 0))
        {
            text[at++] = Point;
            int i = at + Decimals;
            for (; i - at >= 2; fraction /= 100)
                Pairs.Slice(2 * (int)(fraction % 100), 2).CopyTo(text[(i -= 2)..]);
            if (i > at)
                text[at] = (byte)('0' + fraction);
            at += Decimals;
            while (Trims && text[at - 1] == '0')
                at--;
        }
        if (exponent != NoExponent)
            at += WriteExponent(text[at..], exponent);
        After.CopyTo(text[at..]);
        return at + After.Length;
    }

    /// <summary>Writes an exponent with its mark.</summary>
    public int WriteExponent(Span<byte> text, int exponent)
    {
        int at = 0, size = Math.Abs(exponent);
        text[at++] = Mark;
        if (exponent < 0)
            text[at++] = (byte)'-';
        else if (ExponentPlus)
            text[at++] = (byte)'+';
        int digits = Math.Max(ExponentDigits, size >= 100 ? 3 : size >= 10 ? 2 : 1);
        for (int i = at + digits - 1; i >= at; i--, size /= 10)
            text[i] = (byte)('0' + size % 10);
        return at + digits;
    }

    public void Save(PackWriter writer)
    {
        writer.Block(Before);
        writer.Block(After);
        writer.Bytes([Sign, Point, (byte)Decimals, Mark, (byte)ExponentDigits, (byte)((Trims ? 1 : 0) | (LeadingZero ? 2 : 0) | (ExponentPlus ? 4 : 0))]);
    }

    public static NumberFormat Load(ref PackReader reader)
    {
        byte[] before = reader.Block().ToArray(), after = reader.Block().ToArray();
        ReadOnlySpan<byte> b = reader.Bytes(6);
        if (b[2] > MostDigits || b[4] > 5)
            throw new InvalidDataException("a packed number format is not one");
        return new NumberFormat(before, after, b[0], b[1], b[2], (b[5] & 1) != 0, (b[5] & 2) != 0, b[3], b[4], (b[5] & 4) != 0);
    }

    private static long[] MakePowers()
    {
        var powers = new long[MostDigits + 1];
        powers[0] = 1;
        for (int i = 1; i < powers.Length; i++)
            powers[i] = 10 * powers[i - 1];
        return powers;
    }
}
