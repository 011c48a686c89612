using System.Globalization;

namespace ScopeReader.Archive.Packing;

/// <summary>How a column writes its numbers, where each is written with all the digits that the number has.</summary>
/// <param name="Number">What stands about the number, its marks and its exponent; decimals and trimming do not count.</param>
/// <param name="Significant">Digits of each number, or <see cref="DecimalDigits.Shortest"/>.</param>
/// <param name="Trims">True where zeros at the end are left out.</param>
/// <param name="WholePoint">True where a whole number has a decimal mark and a zero.</param>
/// <param name="WholePointBeforeExponent">True where a single digit before an exponent has them.</param>
internal sealed record RealFormat(NumberFormat Number, int Significant, bool Trims, bool WholePoint, bool WholePointBeforeExponent)
{
    /// <summary>Bytes that <see cref="Write"/> may need beside those before and after.</summary>
    public const int LongestText = 96;

    // Written without an exponent, so many zeros are the most.
    private const int MostZeros = 40;

    /// <summary>Reads a field; the caller writes it again and compares.</summary>
    public bool TryRead(ReadOnlySpan<byte> field, out double value, out bool hasExponent)
    {
        (value, hasExponent) = (0, false);
        if (field.Length > NumberFormat.LongestText || field.Length < Number.Before.Length + Number.After.Length || !field.StartsWith(Number.Before) || !field.EndsWith(Number.After))
            return false;
        ReadOnlySpan<byte> text = field[Number.Before.Length..^Number.After.Length];
        hasExponent = text.Contains(Number.Mark);
        if (Number.Point != '.')
        {
            Span<byte> pointed = stackalloc byte[text.Length];
            text.Replace(pointed, Number.Point, (byte)'.');
            return double.TryParse(pointed, NumberStyles.Float, CultureInfo.InvariantCulture, out value) && double.IsFinite(value);
        }
        return double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out value) && double.IsFinite(value);
    }

    /// <summary>Writes a number as the column does.</summary>
    /// <param name="text">At least <see cref="LongestText"/> bytes and those before and after.</param>
    /// <param name="value">The number, finite.</param>
    /// <param name="hasExponent">Whether this one has an exponent.</param>
    /// <returns>Bytes written; 0 where it would be too long.</returns>
    public int Write(Span<byte> text, double value, bool hasExponent)
    {
        Span<byte> digits = stackalloc byte[64];
        int count = DecimalDigits.Write(value, Significant, digits, out int exponent);
        while (Trims && count > 1 && digits[count - 1] == '0')
            count--;
        if (!hasExponent && Math.Abs(exponent) > MostZeros)
            return 0;
        Number.Before.CopyTo(text);
        int at = Number.Before.Length;
        if (double.IsNegative(value))
            text[at++] = (byte)'-';
        else if (Number.Sign != 0)
            text[at++] = Number.Sign;
        at += hasExponent ? Scaled(text[at..], digits[..count], exponent) : Plain(text[at..], digits[..count], exponent);
        Number.After.CopyTo(text[at..]);
        return at + Number.After.Length;
    }

    private int Scaled(Span<byte> text, ReadOnlySpan<byte> digits, int exponent)
    {
        int at = 0;
        text[at++] = digits[0];
        if (digits.Length > 1 || WholePointBeforeExponent)
            text[at++] = Number.Point;
        if (digits.Length == 1 && WholePointBeforeExponent)
            text[at++] = (byte)'0';
        digits[1..].CopyTo(text[at..]);
        at += digits.Length - 1;
        return at + Number.WriteExponent(text[at..], exponent);
    }

    private int Plain(Span<byte> text, ReadOnlySpan<byte> digits, int exponent)
    {
        int at = 0;
        if (exponent < 0)
        {
            if (Number.LeadingZero)
                text[at++] = (byte)'0';
            text[at++] = Number.Point;
            text.Slice(at, -exponent - 1).Fill((byte)'0');
            at += -exponent - 1;
            digits.CopyTo(text[at..]);
            return at + digits.Length;
        }
        int whole = exponent + 1;
        for (int i = 0; i < whole; i++)
            text[at++] = i < digits.Length ? digits[i] : (byte)'0';
        if (digits.Length > whole)
        {
            text[at++] = Number.Point;
            digits[whole..].CopyTo(text[at..]);
            return at + digits.Length - whole;
        }
        if (WholePoint)
        {
            text[at++] = Number.Point;
            text[at++] = (byte)'0';
        }
        return at;
    }

    public void Save(PackWriter writer)
    {
        Number.Save(writer);
        writer.Bytes([(byte)Significant, (byte)((Trims ? 1 : 0) | (WholePoint ? 2 : 0) | (WholePointBeforeExponent ? 4 : 0))]);
    }

    public static RealFormat Load(ref PackReader reader)
    {
        NumberFormat number = NumberFormat.Load(ref reader);
        ReadOnlySpan<byte> b = reader.Bytes(2);
        if (b[0] > DecimalDigits.Most)
            throw new InvalidDataException("a packed number format is not one");
        return new RealFormat(number, b[0], (b[1] & 1) != 0, (b[1] & 2) != 0, (b[1] & 4) != 0);
    }
}
