using System.Runtime.CompilerServices;

namespace ScopeReader.Files.Numbers;

/// <summary>Reads a number whose end is not known yet, for the quick way through a table.</summary>
internal static unsafe class PlainNumber
{
    /// <summary>Reads the number at a place; eight bytes behind its end may be looked at.</summary>
    /// <param name="p">Where it begins.</param>
    /// <param name="mark">The decimal mark.</param>
    /// <param name="value">The number, correctly rounded.</param>
    /// <param name="lastDigit">Decimal exponent of its last printed digit.</param>
    /// <returns>The place behind it, or null where there is no number or one that stands for none.</returns>
    public static byte* Read(byte* p, byte mark, out double value, out int lastDigit)
    {
        byte* start = p;
        bool negative = *p == '-';
        if (negative || *p == '+')
            p++;
        ulong significand = 0;
        byte* first = p;
        uint digit;
        while ((digit = (uint)(*p - '0')) <= 9)
        {
            significand = significand * 10 + digit;
            p++;
        }
        int digits = (int)(p - first), exponent = 0;
        if (*p == mark)
        {
            byte* fraction = ++p;
            for (ulong eight; AreDigits(eight = Unsafe.ReadUnaligned<ulong>(p)); p += 8)
                significand = significand * 100_000_000 + EightDigits(eight);
            while ((digit = (uint)(*p - '0')) <= 9)
            {
                significand = significand * 10 + digit;
                p++;
            }
            exponent = (int)(fraction - p);
            digits -= exponent;
        }
        if ((*p | 0x20) == 'e')
        {
            byte* q = p + 1;
            bool below = *q == '-';
            if (below || *q == '+')
                q++;
            int power = 0;
            byte* firstOfPower = q;
            while ((digit = (uint)(*q - '0')) <= 9)
            {
                power = Math.Min(power * 10 + (int)digit, 100_000);
                q++;
            }
            if (q == firstOfPower)
                digits = 0;
            p = q;
            exponent += below ? -power : power;
        }
        lastDigit = exponent;
        if (digits > 0 && NumberParser.TryRound(significand, digits, exponent, out double rounded) && rounded < Structure.Cell.Infinity)
        {
            value = negative ? -rounded : rounded;
            return p;
        }
        return Slow(start, p, digits, mark, out value);
    }

    [MethodImpl(MethodImplOptions.NoInlining)]
    private static byte* Slow(byte* start, byte* end, int digits, byte mark, out double value)
    {
        value = 0;
        long length = end - start;
        return digits > 0 && length <= NumberParser.LongestNumber && NumberParser.Slow(new ReadOnlySpan<byte>(start, (int)length), mark, out value) && Math.Abs(value) < Structure.Cell.Infinity ? end : null;
    }

    private static bool AreDigits(ulong eight) =>
        ((eight & 0xF0F0F0F0F0F0F0F0) | (((eight + 0x0606060606060606) & 0xF0F0F0F0F0F0F0F0) >> 4)) == 0x3333333333333333;

    // Pairs, then fours, then all eight at once; the first digit is the lowest byte.
    private static ulong EightDigits(ulong eight)
    {
        eight = (eight & 0x0F0F0F0F0F0F0F0F) * 2561 >> 8;
        eight = (eight & 0x00FF00FF00FF00FF) * 6553601 >> 16;
        return (eight & 0x0000FFFF0000FFFF) * 42949672960001 >> 32;
    }
}
