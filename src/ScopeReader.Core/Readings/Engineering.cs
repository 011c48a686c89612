using System.Globalization;

namespace ScopeReader.Readings;

/// <summary>Values as people read them: a prefix, the unit, and the digits that the uncertainty leaves.</summary>
public static class Engineering
{
    private const string Prefixes = "qryzafpnµm kMGTPEZYRQ";
    private const int BasePrefix = 10, MostDecimals = 15;

    /// <summary>A value in its own right, to a number of significant digits: "38.2 MHz".</summary>
    /// <param name="value">In <paramref name="unit"/>.</param>
    /// <param name="unit">A unit without prefix.</param>
    /// <param name="digits">Significant digits, 1 to 15.</param>
    public static string Format(double value, string unit, int digits = 4)
    {
        if (value == 0)
            return Join("0", "", unit);
        if (IsSmallNumber(value, unit))
            return WithPower(value, SmallPower(value), digits - 1 - Magnitude(Scale(value, SmallPower(value)), digits));
        int power = PowerOf(value, unit, digits);
        double scaled = Scale(value, power);
        if (!IsPlain(Magnitude(scaled, digits), unit))
            return Join(Exponential(value, digits), "", unit);
        return Join(Fixed(scaled, digits - 1 - Magnitude(scaled, digits)), Prefix(power), unit);
    }

    /// <summary>A value that is given and not measured, without zeros that say nothing: "455 kHz".</summary>
    /// <param name="value">In <paramref name="unit"/>.</param>
    /// <param name="unit">A unit without prefix.</param>
    /// <param name="digits">Significant digits at most, 1 to 15.</param>
    public static string Given(double value, string unit, int digits = 10)
    {
        string text = Format(value, unit, digits);
        int space = text.IndexOf(' ');
        (string number, string rest) = space < 0 ? (text, "") : (text[..space], text[space..]);
        int power = number.IndexOf('e');
        (number, string exponent) = power < 0 ? (number, "") : (number[..power], number[power..]);
        return (number.Contains('.') ? number.TrimEnd('0').TrimEnd('.') : number) + exponent + rest;
    }

    /// <summary>A value and its expanded uncertainty, two digits of it, in one unit: "38.20 MHz ± 0.40 MHz".</summary>
    /// <param name="value">In <paramref name="unit"/>.</param>
    /// <param name="uncertainty">0 or more; 0 gives the value alone.</param>
    /// <param name="unit">A unit without prefix.</param>
    public static string Format(double value, double uncertainty, string unit)
    {
        (string number, string spread, string prefixed) = Parts(value, uncertainty, unit);
        return spread.Length == 0 ? Join(number, "", prefixed) : $"{Join(number, "", prefixed)} ± {Join(spread, "", prefixed)}";
    }

    /// <summary>The same in parts, for a table: the value, the uncertainty (empty where there is none) and their prefixed unit.</summary>
    public static (string Value, string Uncertainty, string Unit) Parts(double value, double uncertainty, string unit)
    {
        if (!(uncertainty > 0) || !double.IsFinite(uncertainty))
        {
            int own = value == 0 ? 0 : PowerOf(value, unit, 6);
            if (value != 0 && IsSmallNumber(value, unit))
                return (Format(value, unit, 6), "", unit);
            double alone = Scale(value, own);
            if (value != 0 && !IsPlain(Magnitude(alone, 6), unit))
                return (Exponential(value, 6), "", unit);
            return (value == 0 ? "0" : Fixed(alone, 5 - Magnitude(alone, 6)), "", Prefix(own) + unit);
        }
        double larger = Math.Max(Math.Abs(value), uncertainty);
        if (IsSmallNumber(larger, unit))
        {
            int small = SmallPower(larger), places = 1 - Magnitude(Scale(uncertainty, small), 2);
            return (WithPower(value, small, places), WithPower(uncertainty, small, places), unit);
        }
        int power = PowerOf(larger, unit, 15);
        double spread = Scale(uncertainty, power);
        int decimals = 1 - Magnitude(spread, 2);
        // As many digits of the value as reach down to the last of the uncertainty.
        int digits = value == 0 ? 1 : Math.Clamp(Magnitude(Scale(value, power), 15) + decimals + 1, 1, 15);
        if (decimals > MostDecimals || !IsPlain(Magnitude(Math.Max(Math.Abs(Scale(value, power)), spread), 2), unit))
            return (Exponential(value, digits), Exponential(uncertainty, 2), unit);
        return (Fixed(Scale(value, power), decimals), Fixed(spread, decimals), Prefix(power) + unit);
    }

    // Beyond the prefixes, and without any, a number's size hides behind zeros, or its digits do.
    private static bool IsPlain(int magnitude, string unit) => TakesPrefix(unit) ? magnitude is >= -3 and < 6 : magnitude is > 3 - MostDecimals and < MostDecimals;

    private static string Exponential(double value, int digits)
    {
        string text = value.ToString("E" + (digits - 1), CultureInfo.InvariantCulture);
        int at = text.IndexOf('E');
        return $"{text[..at]}e{int.Parse(text.AsSpan(at + 1), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture)}";
    }

    // A plain number has no prefix, and a row of zeros is not read: 23.2e-6. Below a millionth of a millionth the power stands as it is.
    private static bool IsSmallNumber(double value, string unit) => unit == "1" && Math.Abs(value) is >= 1e-12 and < 1e-3;

    private static int SmallPower(double value) => Math.Max(-BasePrefix, (int)Math.Floor(Magnitude(value, 4) / 3.0));

    private static string WithPower(double value, int power, int decimals) => string.Create(CultureInfo.InvariantCulture, $"{Fixed(Scale(value, power), decimals)}e{3 * power}");

    private static string Prefix(int power) => power == 0 ? "" : Prefixes[power + BasePrefix].ToString();

    private static string Join(string number, string prefix, string unit) =>
        prefix.Length + unit.Length == 0 || unit == "1" ? number + prefix : $"{number} {prefix}{unit}";

    // Powers of a thousand. Ratios, decibels and plain numbers take no prefix.
    private static int PowerOf(double value, string unit, int digits) =>
        TakesPrefix(unit) ? Math.Clamp((int)Math.Floor(Magnitude(value, digits) / 3.0), -BasePrefix, Prefixes.Length - 1 - BasePrefix) : 0;

    private static bool TakesPrefix(string unit) =>
        !(unit is "" or "1" or "%" or "ppm" or "bit" or "sample" or "1/sample" or "°C" || unit.StartsWith("dB", StringComparison.Ordinal) || unit.StartsWith("ppm", StringComparison.Ordinal));

    // The decimal exponent after rounding to the digits: 999.96 to four digits is 1.000e3.
    private static int Magnitude(double value, int digits)
    {
        string text = Math.Abs(value).ToString("E" + (digits - 1), CultureInfo.InvariantCulture);
        return int.Parse(text.AsSpan(text.IndexOf('E') + 1), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture);
    }

    private static double Scale(double value, int power) => power >= 0 ? value / Math.Pow(10, 3 * power) : value * Math.Pow(10, -3 * power);

    private static string Fixed(double value, int decimals)
    {
        if (decimals >= 0)
            return WithoutNegativeZero(value.ToString("F" + Math.Min(decimals, MostDecimals), CultureInfo.InvariantCulture));
        // Digits left of the point that the uncertainty does not support read as zeros.
        double step = Math.Pow(10, -decimals);
        return WithoutNegativeZero((Math.Round(value / step) * step).ToString("F0", CultureInfo.InvariantCulture));
    }

    private static string WithoutNegativeZero(string text) =>
        text[0] == '-' && text.AsSpan().IndexOfAnyExcept("-0.") < 0 ? text[1..] : text;
}
