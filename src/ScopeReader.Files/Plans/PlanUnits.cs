using ScopeReader.Readings;

namespace ScopeReader.Files.Plans;

/// <summary>Units as a plan's messages name them.</summary>
internal static class PlanUnits
{
    private static readonly char[] Number = [.. "+-.0123456789"];
    private static readonly string[] Prefixed = ["Hz", "s", "V", "A", "W", "F", "H", "ohm", "m"];
    private static readonly string[] Plain = ["%", "ppm", "ppb", "dB", "dBm", "dBc", "dBV", "dBµV", "dBc/Hz", "dBm/Hz", "bit", "V/s", "°C", "K", "ppm/year", "sample", "1/sample"];
    private static readonly string[] Prefixes = ["", "p", "n", "u", "m", "k", "M", "G"];

    /// <summary>Every unit that a message may propose.</summary>
    public static IReadOnlyList<string> All { get; } = [.. Prefixed.SelectMany(WithPrefixes), .. Plain];

    /// <summary>What follows the number in a value: empty where there is none.</summary>
    public static string UnitOf(string text)
    {
        string rest = text.Trim().TrimStart(Number);
        // The exponent of 1e-3 belongs to the number.
        return (rest.Length > 1 && rest[0] is 'e' or 'E' && Number.Contains(rest[1]) ? rest[1..].TrimStart(Number) : rest).Trim();
    }

    /// <summary>The spelling of the expected unit that is nearest to an unknown one; null where the unit is known, absent or far off.</summary>
    public static string? MistypedUnit(string text, string unit)
    {
        string found = UnitOf(text);
        if (found.Length == 0 || found.Length == text.Trim().Length || Units.TryUnit(found, out _, out _))
            return null;
        string? nearest = NearestWord.Of(found, Prefixed.Contains(unit) ? WithPrefixes(unit) : [unit]);
        // A unit that shares no letter with what was meant is better told what is expected than guessed at.
        return nearest is not null && NearestWord.Distance(found, nearest) < Math.Max(found.Length, nearest.Length) ? nearest : null;
    }

    /// <summary>A value as a person would write it.</summary>
    public static string Example(string unit) => unit switch
    {
        "Hz" => "455 kHz",
        "s" => "2 ns",
        "V" => "50 mV",
        "F" => "12 pF",
        "ohm" => "50 ohm",
        "m" => "150 mm",
        "%" => "2 %",
        "ppm" => "25 ppm",
        "ppm/year" => "1 ppm/year",
        "dB" => "0.5 dB",
        "dBc" => "-60 dBc",
        _ => $"1 {unit}",
    };

    private static IEnumerable<string> WithPrefixes(string unit) => Prefixes.Select(prefix => prefix + unit);
}
