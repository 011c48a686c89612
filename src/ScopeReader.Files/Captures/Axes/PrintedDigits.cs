using System.Runtime.InteropServices;

namespace ScopeReader.Files.Axes;

/// <summary>What the digits of a column say about how finely it was printed.</summary>
/// <remarks>A fixed number of decimals or of significant digits shows the last digit of every value, trailing zeros too.
/// A shortest form leaves trailing zeros off: then a value was printed as finely as the longest, and six digits at least,
/// the usual default of such forms. A zero has no digits of its own and is as fine as the finest.</remarks>
internal sealed class PrintedDigits
{
    private const int UsualDigits = 6;
    private readonly double _finest;
    private readonly int? _digits;

    /// <summary>Judges by the first part of a column.</summary>
    /// <param name="values">As printed; NaN where one is missing.</param>
    /// <param name="halves">Half of each one's last printed digit.</param>
    public PrintedDigits(ReadOnlySpan<double> values, ReadOnlySpan<double> halves)
    {
        _finest = double.PositiveInfinity;
        bool sameHalf = true, sameDigits = true, hasTrailingZero = false;
        double half = 0;
        int digits = 0, most = 0;
        for (int i = 0; i < values.Length; i++)
        {
            if (double.IsNaN(values[i]) || values[i] == 0)
                continue;
            double significand = Math.Round(Math.Abs(values[i]) / (2 * halves[i]));
            int count = significand < 1 ? 1 : (int)Math.Floor(Math.Log10(significand) + 1e-9) + 1;
            sameHalf &= half == 0 || half == halves[i];
            sameDigits &= digits == 0 || digits == count;
            hasTrailingZero |= halves[i] < 0.5 && significand % 10 == 0;
            (half, digits, most, _finest) = (halves[i], count, Math.Max(most, count), Math.Min(_finest, halves[i]));
        }
        if (double.IsInfinity(_finest))
            _finest = 0.5;
        _digits = sameHalf || sameDigits || hasTrailingZero ? null : Math.Max(most, UsualDigits);
    }

    /// <summary>Puts halves right that the digits alone show wrong.</summary>
    public void Correct(ReadOnlySpan<double> values, Span<double> halves)
    {
        if (_digits is not { } digits)
        {
            ReadOnlySpan<long> bits = MemoryMarshal.Cast<double, long>(values);
            for (int at = 0, found; (found = bits[at..].IndexOf(0L)) >= 0; at += found + 1)
                halves[at + found] = _finest;
            return;
        }
        for (int i = 0; i < values.Length; i++)
            if (values[i] == 0)
                halves[i] = Math.Min(halves[i], _finest);
            else if (!double.IsNaN(values[i]))
                halves[i] = Math.Min(halves[i], 0.5 * Math.Pow(10, Math.Floor(Math.Log10(Math.Abs(values[i]))) - digits + 1));
    }
}
