using System.Globalization;

namespace ScopeReader.Archive.Packing;

/// <summary>A number's decimal digits. They follow from the number alone: the same on every machine, now and in years.</summary>
internal static class DecimalDigits
{
    /// <summary>Stands for as few digits as give the same number back.</summary>
    public const int Shortest = 0;

    /// <summary>More digits than any file needs.</summary>
    public const int Most = 24;

    private static readonly string[] Formats = ["R", .. Enumerable.Range(0, Most).Select(n => "E" + n.ToString(CultureInfo.InvariantCulture))];

    /// <summary>Writes the digits of a finite number's size, rounded to so many, the first not zero unless all are.</summary>
    /// <param name="value">The number; its sign does not count.</param>
    /// <param name="significant">How many digits, 1 to <see cref="Most"/>, or <see cref="Shortest"/>.</param>
    /// <param name="digits">At least <see cref="NumberFormat.LongestText"/> bytes.</param>
    /// <param name="exponent">Power of ten of the first digit.</param>
    /// <returns>How many digits.</returns>
    public static int Write(double value, int significant, Span<byte> digits, out int exponent)
    {
        Span<byte> text = stackalloc byte[64];
        Math.Abs(value).TryFormat(text, out int length, Formats[significant], CultureInfo.InvariantCulture);
        int count = 0, at = 0, whole = -1, zeros = 0;
        for (; at < length && text[at] != 'E'; at++)
        {
            if (text[at] == '.')
                whole = at;
            else if (count > 0 || text[at] != '0')
                digits[count++] = text[at];
            else
                zeros++;
        }
        exponent = (whole < 0 ? at : whole) - 1 - zeros;
        if (at < length)
        {
            bool negative = text[at + 1] == '-';
            int power = 0;
            for (int i = at + 2; i < length; i++)
                power = 10 * power + (text[i] - '0');
            exponent += negative ? -power : power;
        }
        if (count == 0)
            (count, exponent, digits[0]) = (1, 0, (byte)'0');
        return count;
    }
}
