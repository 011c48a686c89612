namespace ScopeReader.Numerics;

/// <summary>A number as the unevaluated sum of two doubles: about 31 decimal digits, for sums that cancel.</summary>
/// <remarks>T. J. Dekker, A floating-point technique for extending the available precision, Numer. Math. 18 (1971) (from memory);
/// products by fused multiply-add.</remarks>
internal readonly record struct DoubleDouble(double High, double Low)
{
    public static implicit operator DoubleDouble(double value) => new(value, 0);

    public static explicit operator double(DoubleDouble value) => value.High + value.Low;

    public static DoubleDouble operator +(DoubleDouble a, DoubleDouble b)
    {
        double sum = a.High + b.High, part = sum - a.High;
        double error = a.High - (sum - part) + (b.High - part) + a.Low + b.Low;
        return Normal(sum, error);
    }

    public static DoubleDouble operator -(DoubleDouble a) => new(-a.High, -a.Low);

    public static DoubleDouble operator -(DoubleDouble a, DoubleDouble b) => a + -b;

    public static DoubleDouble operator *(DoubleDouble a, DoubleDouble b)
    {
        double product = a.High * b.High;
        return Normal(product, Math.FusedMultiplyAdd(a.High, b.High, -product) + a.High * b.Low + a.Low * b.High);
    }

    public static DoubleDouble operator /(DoubleDouble a, DoubleDouble b)
    {
        // Long division: two quotient digits of 53 bits and a correction.
        double first = a.High / b.High;
        DoubleDouble rest = a - b * first;
        double second = rest.High / b.High;
        rest -= b * second;
        return Normal(first, second) + rest.High / b.High;
    }

    // The low part below half a last place of the high one. Infinities would turn into not-a-number here: callers give finite values.
    private static DoubleDouble Normal(double high, double low)
    {
        double sum = high + low;
        return new(sum, low - (sum - high));
    }
}
