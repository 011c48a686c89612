using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;

namespace ScopeReader.Files.Numbers;

/// <summary>How the numbers of a column are printed: where the digits, the mark and the exponent stand. A number that is
/// printed as the one before it is read sixteen characters at once.</summary>
/// <remarks>Up to 15 characters and what ends them; the sign in front is apart. Any other number is read the scalar way, and
/// its layout is learnt as long as that pays. Digits to a number by three multiply-and-add steps (8, 16, 32 bits).</remarks>
internal struct NumberLayout
{
    /// <summary>How many bytes may be looked at from the start of a number on, after its sign.</summary>
    public const int Reach = 16;

    private const int Most = 15, MostPowerDigits = 4, Rare = 2, Retry = 64;

    // Characters as they must be: '0' stands for any digit, '+' for either sign of the exponent.
    private Vector128<byte> _expected;

    // How far each may be off in its bits: 9 for a digit, 6 from '+' to '-', 0 for what is fixed, 255 behind the number.
    private Vector128<byte> _limit;

    // Takes the digits of the significand to the right end.
    private Vector128<byte> _places;

    private int _length, _fraction, _sign, _power, _powerDigits;
    private int _missedRow, _misses;

    /// <summary>A layout that no number has.</summary>
    public static NumberLayout None => new() { _expected = Vector128<byte>.AllBitsSet, _missedRow = int.MinValue / 2 };

    /// <summary>Exact powers of ten from 0 on, then halves of last digits from that of the smallest.</summary>
    public static double[] Tables { get; } = [.. NumberParser.Powers, .. NumberParser.Halves];

    /// <summary>Reads the number at a place if it is printed as the last one was.</summary>
    /// <param name="p">Where it begins; <see cref="Reach"/> bytes behind its sign may be looked at.</param>
    /// <param name="layout">How the column's last number was printed.</param>
    /// <param name="tables"><see cref="Tables"/>.</param>
    /// <param name="value">Where the number goes, correctly rounded.</param>
    /// <param name="half">Where half of its last printed digit goes; null for nowhere.</param>
    /// <returns>The place behind it; null where it is printed in another way.</returns>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static unsafe byte* ReadAlike(byte* p, NumberLayout* layout, double* tables, double* value, double* half)
    {
        if (!Sse41.IsSupported)
            return null;
        bool negative = *p == '-';
        p += negative || *p == '+' ? 1 : 0;
        Vector128<byte> off = Vector128.Load(p) ^ layout->_expected;
        if (!Vector128.EqualsAll(Vector128.Max(off, layout->_limit), layout->_limit))
            return null;
        int exponent = -layout->_fraction;
        if (layout->_powerDigits > 0)
        {
            byte* digit = p + layout->_power;
            int power = *digit & 15;
            for (int k = 1; k < layout->_powerDigits; k++)
                power = power * 10 + (digit[k] & 15);
            int sign = layout->_sign == 0 ? '+' : p[layout->_sign];
            exponent += sign == '-' ? -power : power;
            // Between '+' and '-' lies more in the code than the limit can tell apart.
            if (((sign - '+') & ~('-' - '+')) != 0)
                return null;
        }
        if ((uint)(exponent + NumberParser.ExactPower) > 2 * NumberParser.ExactPower)
            return null;
        // Fifteen digits at most: an exact double.
        double exact = (long)Digits(Ssse3.Shuffle(off, layout->_places));
        exact = exponent < 0 ? exact / tables[-exponent] : exact * tables[exponent];
        *value = negative ? -exact : exact;
        if (half != null)
            *half = tables[NumberParser.ExactPower + 1 + NumberParser.HalfRange + exponent];
        return p + layout->_length;
    }

    /// <summary>Reads the number at a place however it is printed, and learns that where it pays.</summary>
    /// <param name="p">Where it begins; <see cref="Reach"/> bytes behind its sign may be looked at.</param>
    /// <param name="mark">The decimal mark.</param>
    /// <param name="layout">How the column's last number was printed.</param>
    /// <param name="row">The row, so that numbers of ever other lengths are not learnt.</param>
    /// <param name="value">Where the number goes, correctly rounded.</param>
    /// <param name="half">Where half of its last printed digit goes; null for nowhere.</param>
    /// <returns>The place behind it; null where there is no number, or one that stands for none.</returns>
    [MethodImpl(MethodImplOptions.NoInlining)]
    public static unsafe byte* ReadAny(byte* p, byte mark, NumberLayout* layout, int row, double* value, double* half)
    {
        byte* end = PlainNumber.Read(p, mark, out *value, out int lastDigit);
        if (end == null)
            return null;
        if (half != null)
            *half = NumberParser.HalfOf(lastDigit);
        if (row - layout->_missedRow > Rare || ++layout->_misses % Retry == 0)
            layout->Learn(p + (*p is (byte)'-' or (byte)'+' ? 1 : 0), end, mark);
        layout->_missedRow = row;
        return end;
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static ulong Digits(Vector128<byte> digits)
    {
        Vector128<short> pairs = Ssse3.MultiplyAddAdjacent(digits, Vector128.Create((short)0x010A).AsSByte());
        Vector128<int> fours = Sse2.MultiplyAddAdjacent(pairs, Vector128.Create(0x00010064).AsInt16());
        Vector128<short> narrow = Sse41.PackUnsignedSaturate(fours, fours).AsInt16();
        ulong eights = Sse2.MultiplyAddAdjacent(narrow, Vector128.Create(0x00012710).AsInt16()).AsUInt64().ToScalar();
        return (eights & uint.MaxValue) * 100_000_000 + (eights >> 32);
    }

    private unsafe void Learn(byte* p, byte* end, byte mark)
    {
        int length = (int)(end - p), digits = 0, fraction = 0, sign = 0, power = 0, powerDigits = 0;
        if (length > Most)
            return;
        Span<byte> expected = stackalloc byte[Reach], limit = stackalloc byte[Reach], at = stackalloc byte[Reach], places = stackalloc byte[Reach];
        limit.Fill(byte.MaxValue);
        places.Fill(byte.MaxValue);
        bool isFraction = false, isPower = false;
        for (int i = 0; i <= length; i++)
        {
            byte c = p[i];
            bool isDigit = i < length && char.IsAsciiDigit((char)c);
            (expected[i], limit[i]) = isDigit ? ((byte)'0', (byte)9) : (c, (byte)0);
            if (isDigit && isPower)
                (power, powerDigits) = (powerDigits == 0 ? i : power, powerDigits + 1);
            else if (isDigit)
            {
                at[digits++] = (byte)i;
                fraction += isFraction ? 1 : 0;
            }
            else if (i < length && c == mark)
                isFraction = true;
            else if (i < length && (c | 0x20) == 'e')
                isPower = true;
            else if (i < length)
                (sign, expected[i], limit[i]) = (i, (byte)'+', '+' ^ '-');
        }
        if (powerDigits > MostPowerDigits)
            return;
        at[..digits].CopyTo(places[(Reach - digits)..]);
        (_expected, _limit, _places) = (Vector128.Create<byte>(expected), Vector128.Create<byte>(limit), Vector128.Create<byte>(places));
        (_length, _fraction, _sign, _power, _powerDigits) = (length, fraction, sign, power, powerDigits);
    }
}
