using System.Numerics;

namespace ScopeReader.Files.Numbers;

/// <summary>Decimal numbers of up to 19 digits rounded correctly by one or two multiplications of 64 bits.</summary>
/// <remarks>D. Lemire, Number Parsing at a Gigabyte per Second, Software: Practice and Experience 51 (2021), algorithm 1
/// (from memory). The tests hold it against the runtime's own parser, bit by bit.</remarks>
internal static class ExactProduct
{
    /// <summary>The farthest power of ten that is tabled, either way.</summary>
    public const int Farthest = 60;

    private const int MantissaBits = 52, LeastExponent = -1023, MostExponent = 0x7FF;

    // The first 128 bits of 5 to the power, the top bit set; those below 1 rounded up.
    private static readonly (ulong High, ulong Low)[] s_fives = [.. Enumerable.Range(-Farthest, 2 * Farthest + 1).Select(Five)];

    /// <summary>Rounds a significand times a power of ten; false where that takes more than this.</summary>
    /// <param name="significand">Up to 19 digits, not zero.</param>
    /// <param name="power">Power of ten.</param>
    /// <param name="value">The nearest double.</param>
    public static bool TryRound(ulong significand, int power, out double value)
    {
        value = 0;
        if (significand == 0 || power is < -Farthest or > Farthest)
            return false;
        int shift = BitOperations.LeadingZeroCount(significand);
        significand <<= shift;
        (ulong fiveHigh, ulong fiveLow) = s_fives[power + Farthest];
        ulong high = Math.BigMul(significand, fiveHigh, out ulong low);
        // Only where all the bits below the mantissa are ones may the second half of the power still change it.
        const ulong below = ulong.MaxValue >> (MantissaBits + 3);
        if ((high & below) == below)
        {
            ulong carry = Math.BigMul(significand, fiveLow, out _);
            low += carry;
            if (carry > low)
                high++;
        }
        if (low == ulong.MaxValue && power is < -27 or > 55)
            return false;
        int upper = (int)(high >> 63);
        int drop = upper + 64 - MantissaBits - 3;
        ulong mantissa = high >> drop;
        int exponent = (((152170 + 65536) * power) >> 16) + 63 + upper - shift - LeastExponent;
        if (exponent <= 0)
            return false;
        // Exactly halfway between two doubles: to even.
        if (low <= 1 && power is >= -4 and <= 23 && (mantissa & 3) == 1 && mantissa << drop == high)
            mantissa &= ~1UL;
        mantissa += mantissa & 1;
        mantissa >>= 1;
        if (mantissa >= 2UL << MantissaBits)
        {
            mantissa = 1UL << MantissaBits;
            exponent++;
        }
        if (exponent >= MostExponent)
            return false;
        value = BitConverter.UInt64BitsToDouble((mantissa & ~(1UL << MantissaBits)) | ((ulong)exponent << MantissaBits));
        return true;
    }

    private static (ulong High, ulong Low) Five(int power)
    {
        BigInteger five = BigInteger.Pow(5, Math.Abs(power)), bits = five;
        if (power < 0)
        {
            int length = (int)(five - 1).GetBitLength();
            bits = (BigInteger.One << (power >= -27 ? length + 127 : 2 * length + 128)) / five + 1;
        }
        int excess = (int)bits.GetBitLength() - 128;
        bits = excess > 0 ? bits >> excess : bits << -excess;
        return ((ulong)(bits >> 64), (ulong)(bits & ulong.MaxValue));
    }
}
