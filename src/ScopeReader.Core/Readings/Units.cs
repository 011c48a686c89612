using System.Globalization;

namespace ScopeReader.Readings;

/// <summary>Values with units as people write them: <c>455kHz</c>, <c>1.2 us</c>, <c>-50 ppm</c>, <c>15pF</c>, <c>50ohm</c>.</summary>
public static class Units
{
    private static readonly string[] Known =
        ["Hz", "s", "V", "A", "W", "F", "H", "ohm", "m", "Sa/s", "V/s", "%", "ppm", "dB", "dBm", "dBc", "dBV", "dBµV", "dBc/Hz", "dBm/Hz", "bit", "sample", "1/sample",
         "°C", "K", "ppm/year", "ppm/s", "1"];

    // Ratios: a person may write any of these where another is expected.
    private static readonly Dictionary<string, double> Ratios = new(StringComparer.Ordinal) { ["1"] = 1, ["%"] = 1e-2, ["ppm"] = 1e-6, ["ppb"] = 1e-9 };

    private static readonly Dictionary<string, string> Spellings = new(StringComparer.OrdinalIgnoreCase)
    {
        ["\u2126"] = "ohm",
        ["\u03a9"] = "ohm",
        ["ohms"] = "ohm",
        ["sec"] = "s",
        ["second"] = "s",
        ["seconds"] = "s",
        ["volt"] = "V",
        ["volts"] = "V",
        ["ampere"] = "A",
        ["amperes"] = "A",
        ["watt"] = "W",
        ["hertz"] = "Hz",
        ["dbuv"] = "dBµV",
        ["degC"] = "°C",
        ["ppm/yr"] = "ppm/year",
        ["bits"] = "bit",
        ["samples"] = "sample",
    };

    /// <summary>Reads a value.</summary>
    /// <param name="text">A number and its unit, with or without a space, decimal point, prefix allowed.</param>
    /// <param name="unit">The base unit that is expected.</param>
    /// <param name="value">The value in that unit.</param>
    /// <param name="problem">What is wrong, in words that follow the place: "expected …, found …".</param>
    public static bool TryParse(string text, string unit, out double value, out string problem)
    {
        ArgumentNullException.ThrowIfNull(text);
        if (!TryParse(text, out value, out string? found, unit))
        {
            problem = $"expected a number with its unit, such as {Example(unit)}, found \"{text}\"";
            return false;
        }
        if (found == unit)
        {
            problem = "";
            return true;
        }
        if (Ratios.TryGetValue(unit, out double to) && Ratios.TryGetValue(found, out double from))
        {
            // One division of two exact decimal powers is kinder to the last digit than a product with 1e-6.
            value = from >= to ? value * Math.Round(from / to) : value / Math.Round(to / from);
            problem = "";
            return true;
        }
        problem = found.Length == 0 && unit != "1"
            ? $"expected a unit after the number, such as {Example(unit)}, found \"{text}\""
            : $"expected a value in {unit}, such as {Example(unit)}, found \"{text}\"";
        return false;
    }

    /// <summary>Reads a value in whatever known unit it has.</summary>
    /// <param name="text">A number and its unit.</param>
    /// <param name="value">The value in the base unit.</param>
    /// <param name="unit">The base unit: empty where none was written.</param>
    public static bool TryParse(string text, out double value, out string unit) => TryParse(text, out value, out unit, null);

    private static bool TryParse(string text, out double value, out string unit, string? expected)
    {
        ArgumentNullException.ThrowIfNull(text);
        ReadOnlySpan<char> trimmed = text.AsSpan().Trim();
        int end = NumberLength(trimmed);
        unit = "";
        if (!double.TryParse(trimmed[..end], NumberStyles.Float, CultureInfo.InvariantCulture, out value) || !double.IsFinite(value))
            return false;
        string suffix = trimmed[end..].Trim().ToString();
        if (suffix.Length == 0)
        {
            unit = expected == "1" ? "1" : "";
            return true;
        }
        if (!TryUnit(suffix, out double factor, out unit))
            return false;
        value *= factor;
        return double.IsFinite(value);
    }

    /// <summary>Takes a unit apart into its prefix's factor and its base unit.</summary>
    /// <param name="text">A unit as written: <c>mV</c>, <c>us</c>, <c>µs</c>, <c>kHz</c>, <c>Volt</c>.</param>
    /// <param name="factor">What one of it is in the base unit.</param>
    /// <param name="unit">The base unit.</param>
    public static bool TryUnit(string text, out double factor, out string unit)
    {
        ArgumentNullException.ThrowIfNull(text);
        text = text.Trim().Replace('\u03bc', 'µ');
        (factor, unit) = (1, Spell(text));
        if (unit.Length > 0)
            return true;
        if (text.Length < 2 || Exponent(text[0]) is not { } exponent)
            return false;
        string rest = Spell(text[1..]);
        if (rest.Length == 0 || Ratios.ContainsKey(rest) || rest.StartsWith("dB", StringComparison.Ordinal))
            return false;
        (factor, unit) = (Math.Pow(10, exponent), rest);
        return true;
    }

    private static string Spell(string text)
    {
        if (Spellings.TryGetValue(text, out string? spelt))
            return spelt;
        // "ppb" is a known ratio but no base unit of ours.
        if (Ratios.ContainsKey(text))
            return text;
        foreach (string known in Known)
            if (known.Equals(text, StringComparison.Ordinal))
                return known;
        foreach (string known in Known)
            // One letter must match in case (S is siemens, h is an hour); longer ones are clear: HZ, khz, dbm.
            if (known.Length > 1 && known.Equals(text, StringComparison.OrdinalIgnoreCase))
                return known;
        return "";
    }

    private static int? Exponent(char prefix) => prefix switch
    {
        'f' => -15,
        'p' => -12,
        'n' => -9,
        'u' or 'µ' => -6,
        'm' => -3,
        'k' or 'K' => 3,
        'M' => 6,
        'G' => 9,
        'T' => 12,
        _ => null,
    };

    // The longest start that reads as a number; an exponent counts only with digits, so that "2e" stays a 2 with a unit.
    private static int NumberLength(ReadOnlySpan<char> text)
    {
        int i = 0;
        if (i < text.Length && text[i] is '+' or '-')
            i++;
        while (i < text.Length && (char.IsAsciiDigit(text[i]) || text[i] == '.'))
            i++;
        if (i < text.Length && text[i] is 'e' or 'E')
        {
            int j = i + 1;
            if (j < text.Length && text[j] is '+' or '-')
                j++;
            int digits = j;
            while (j < text.Length && char.IsAsciiDigit(text[j]))
                j++;
            if (j > digits)
                i = j;
        }
        return i;
    }

    private static string Example(string unit) => unit switch
    {
        "Hz" => "455 kHz",
        "s" => "1.2 us",
        "V" => "3.3 V",
        "F" => "15 pF",
        "ohm" => "50 ohm",
        "m" => "150 mm",
        "%" => "2 %",
        "ppm" => "25 ppm",
        "dB" => "0.5 dB",
        "dBc" => "-20 dBc",
        "dBm" => "-10 dBm",
        "dBV" => "-10 dBV",
        "bit" => "8",
        "1" => "0.5",
        _ => "1 " + unit,
    };
}
