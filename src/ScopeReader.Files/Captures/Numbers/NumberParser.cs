using System.Globalization;

namespace ScopeReader.Files.Numbers;

/// <summary>Numbers as instruments print them, correctly rounded: the same bits as <see cref="double.Parse(string)"/>.</summary>
/// <remarks>Up to 2^53 of digits and a power of ten up to 22 are both exact doubles, so that one multiplication or division
/// rounds once (Clinger 1990). Up to 19 digits take a multiplication of 128 bits (<see cref="ExactProduct"/>); everything else
/// goes the long way.</remarks>
internal static class NumberParser
{
    /// <summary>The longest number that is read, in bytes.</summary>
    public const int LongestNumber = 1024;

    /// <summary>The highest power of ten that is an exact double.</summary>
    public const int ExactPower = 22;

    /// <summary>So many digits fit into 64 bits, whatever they are.</summary>
    public const int MostDigits = 19;

    /// <summary>Whole numbers up to this are exact doubles.</summary>
    public const ulong ExactDigits = 1UL << 53;

    /// <summary>Halves of last digits are tabled from 10^-this to 10^this.</summary>
    public const int HalfRange = 40;

    /// <summary>The powers of ten that are exact doubles.</summary>
    public static readonly double[] Powers = [1e0, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7, 1e8, 1e9, 1e10, 1e11, 1e12, 1e13, 1e14, 1e15, 1e16, 1e17, 1e18, 1e19, 1e20, 1e21, 1e22];

    /// <summary>Halves of last digits, from that of 10^-<see cref="HalfRange"/>.</summary>
    public static readonly double[] Halves = [.. Enumerable.Range(-HalfRange, 2 * HalfRange + 1).Select(e => 0.5 * Math.Pow(10, e))];

    /// <summary>Half of a last digit at a decimal exponent.</summary>
    public static double HalfOf(int lastDigit) => lastDigit is >= -HalfRange and <= HalfRange ? Halves[lastDigit + HalfRange] : 0.5 * Math.Pow(10, lastDigit);

    /// <summary>Reads a whole cell as a number.</summary>
    /// <param name="cell">UTF-8, without spaces round it.</param>
    /// <param name="mark">The decimal mark.</param>
    /// <param name="value">The number; infinite where it is too large for a double.</param>
    /// <param name="lastDigit">Decimal exponent of the last printed digit: -12 for <c>1.000e-9</c>.</param>
    public static bool TryParse(ReadOnlySpan<byte> cell, byte mark, out double value, out int lastDigit)
    {
        (value, lastDigit) = (0, 0);
        int i = 0, digits = 0, exponent = 0;
        ulong significand = 0;
        bool negative = cell.Length > 0 && cell[0] == '-';
        if (negative || (cell.Length > 0 && cell[0] == '+'))
            i++;
        for (; i < cell.Length && (uint)(cell[i] - '0') <= 9; i++, digits++)
            significand = unchecked(significand * 10 + (ulong)(cell[i] - '0'));
        if (i < cell.Length && cell[i] == mark)
        {
            int fraction = ++i;
            for (; i < cell.Length && (uint)(cell[i] - '0') <= 9; i++)
                significand = unchecked(significand * 10 + (ulong)(cell[i] - '0'));
            exponent = fraction - i;
            digits -= exponent;
        }
        if (digits == 0 || cell.Length > LongestNumber)
            return false;
        if (i < cell.Length && (cell[i] | 0x20) == 'e')
        {
            if (!TryExponent(cell[(i + 1)..], out int power))
                return false;
            exponent += power;
        }
        else if (i < cell.Length)
            return false;

        lastDigit = exponent;
        if (!TryRound(significand, digits, exponent, out double exact))
            return Slow(cell, mark, out value);
        value = negative ? -exact : exact;
        return true;
    }

    /// <summary>Rounds a significand times a power of ten; false where only the long way can.</summary>
    /// <param name="significand">The digits as a whole number; any value where there are more than 19.</param>
    /// <param name="digits">How many there are.</param>
    /// <param name="exponent">The power of ten.</param>
    /// <param name="value">The nearest double.</param>
    public static bool TryRound(ulong significand, int digits, int exponent, out double value)
    {
        value = significand;
        if (digits > MostDigits)
            return false;
        if (significand > ExactDigits || exponent is < -ExactPower or > ExactPower)
            return ExactProduct.TryRound(significand, exponent, out value);
        value = exponent < 0 ? value / Powers[-exponent] : value * Powers[exponent];
        return true;
    }

    /// <summary>Length of the number that a cell begins with; 0 where it begins with none.</summary>
    public static int Length(ReadOnlySpan<byte> cell, byte mark)
    {
        int i = cell.Length > 0 && (cell[0] is (byte)'-' or (byte)'+') ? 1 : 0, digits = 0;
        for (bool marked = false; i < cell.Length; i++)
        {
            if (char.IsAsciiDigit((char)cell[i]))
                digits++;
            else if (cell[i] == mark && !marked)
                marked = true;
            else
                break;
        }
        if (digits == 0)
            return 0;
        // An exponent counts only with digits, so that "2e" stays a 2 with something behind it.
        int e = i + 1;
        if (i < cell.Length && (cell[i] | 0x20) == 'e')
        {
            if (e < cell.Length && (cell[e] is (byte)'-' or (byte)'+'))
                e++;
            int first = e;
            while (e < cell.Length && char.IsAsciiDigit((char)cell[e]))
                e++;
            if (e > first)
                i = e;
        }
        return i;
    }

    private static bool TryExponent(ReadOnlySpan<byte> text, out int power)
    {
        power = 0;
        bool negative = text.Length > 0 && text[0] == '-';
        if (negative || (text.Length > 0 && text[0] == '+'))
            text = text[1..];
        foreach (byte b in text)
        {
            if ((uint)(b - '0') > 9)
                return false;
            power = Math.Min(power * 10 + (b - '0'), 100_000);
        }
        if (negative)
            power = -power;
        return text.Length > 0;
    }

    /// <summary>Reads a number of any length, digits and exponent already checked.</summary>
    public static bool Slow(ReadOnlySpan<byte> cell, byte mark, out double value)
    {
        Span<byte> point = stackalloc byte[LongestNumber];
        cell.CopyTo(point);
        point = point[..cell.Length];
        if (mark != '.')
            point.Replace(mark, (byte)'.');
        return double.TryParse(point, NumberStyles.AllowLeadingSign | NumberStyles.AllowDecimalPoint | NumberStyles.AllowExponent, CultureInfo.InvariantCulture, out value);
    }
}
