namespace ScopeReader.Archive.Packing;

/// <summary>What a number's text consists of. The mantissa holds where there are <see cref="MostSignificant"/> digits or fewer.</summary>
internal readonly record struct NumberText(bool Negative, byte Sign, byte Point, long Mantissa, int Significant, int Decimals, bool LeadingDigit,
    bool HasExponent, byte Mark, int Exponent, int ExponentDigits, bool ExponentPlus)
{
    /// <summary>As many digits as a whole number of 64 bits always holds.</summary>
    public const int MostSignificant = 18;

    /// <summary>Takes a number apart; false where it is none, or one that is too long.</summary>
    public static bool TryRead(ReadOnlySpan<byte> text, out NumberText number)
    {
        number = default;
        int at = 0;
        byte sign = text.Length > 0 && text[0] is (byte)'-' or (byte)'+' ? text[at++] : (byte)0;
        long mantissa = 0;
        int digits = 0, zeros = 0, decimals = 0, whole = 0;
        byte point = 0;
        for (; at < text.Length; at++)
        {
            byte c = text[at];
            if (c is >= (byte)'0' and <= (byte)'9')
            {
                if (++digits > NumberFormat.LongestText)
                    return false;
                if (c == '0' && zeros == digits - 1)
                    zeros++;
                mantissa = unchecked(10 * mantissa + (c - '0'));
                if (point != 0)
                    decimals++;
                else
                    whole++;
            }
            else if (point == 0 && c is (byte)'.' or (byte)',')
                point = c;
            else
                break;
        }
        if (digits == 0)
            return false;
        bool hasExponent = false, plus = false;
        byte mark = 0;
        int exponent = 0, exponentDigits = 0;
        if (at < text.Length && text[at] is (byte)'e' or (byte)'E')
        {
            (hasExponent, mark) = (true, text[at++]);
            bool negative = false;
            if (at < text.Length && text[at] is (byte)'-' or (byte)'+')
                (negative, plus) = (text[at] == '-', text[at++] == '+');
            for (; at < text.Length && text[at] is >= (byte)'0' and <= (byte)'9' && exponentDigits < 4; at++, exponentDigits++)
                exponent = 10 * exponent + (text[at] - '0');
            if (exponentDigits == 0 || exponent > 120)
                return false;
            exponent = negative ? -exponent : exponent;
        }
        if (at != text.Length)
            return false;
        number = new NumberText(sign == '-', sign, point, mantissa, digits - zeros, decimals, whole > 0, hasExponent, mark, exponent, exponentDigits, plus);
        return true;
    }
}
