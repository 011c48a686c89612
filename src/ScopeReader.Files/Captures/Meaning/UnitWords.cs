using ScopeReader.Readings;

namespace ScopeReader.Files.Meaning;

/// <summary>Units as exports spell them, in nine languages; the plain ones are <see cref="Units"/>'s.</summary>
internal static class UnitWords
{
    private static readonly Dictionary<string, (double Factor, string Unit)> s_words = new(StringComparer.OrdinalIgnoreCase)
    {
        ["msec"] = (1e-3, "s"),
        ["usec"] = (1e-6, "s"),
        ["µsec"] = (1e-6, "s"),
        ["nsec"] = (1e-9, "s"),
        ["psec"] = (1e-12, "s"),
        ["milliseconds"] = (1e-3, "s"),
        ["microseconds"] = (1e-6, "s"),
        ["nanoseconds"] = (1e-9, "s"),
        ["Sekunde"] = (1, "s"),
        ["Sekunden"] = (1, "s"),
        ["Sek"] = (1, "s"),
        ["seconde"] = (1, "s"),
        ["secondes"] = (1, "s"),
        ["segundo"] = (1, "s"),
        ["segundos"] = (1, "s"),
        ["secondo"] = (1, "s"),
        ["secondi"] = (1, "s"),
        ["sekunda"] = (1, "s"),
        ["sekundy"] = (1, "s"),
        ["sekund"] = (1, "s"),
        ["秒"] = (1, "s"),
        ["毫秒"] = (1e-3, "s"),
        ["微秒"] = (1e-6, "s"),
        ["纳秒"] = (1e-9, "s"),
        ["ミリ秒"] = (1e-3, "s"),
        ["マイクロ秒"] = (1e-6, "s"),
        ["ナノ秒"] = (1e-9, "s"),
        ["voltio"] = (1, "V"),
        ["voltios"] = (1, "V"),
        ["woltów"] = (1, "V"),
        ["wolt"] = (1, "V"),
        ["wolty"] = (1, "V"),
        ["伏"] = (1, "V"),
        ["伏特"] = (1, "V"),
        ["ボルト"] = (1, "V"),
        ["millivolt"] = (1e-3, "V"),
        ["millivolts"] = (1e-3, "V"),
        ["amp"] = (1, "A"),
        ["amps"] = (1, "A"),
        ["amperio"] = (1, "A"),
        ["amperios"] = (1, "A"),
        ["安"] = (1, "A"),
        ["安培"] = (1, "A"),
        ["アンペア"] = (1, "A"),
        ["watts"] = (1, "W"),
        ["hercio"] = (1, "Hz"),
        ["herc"] = (1, "Hz"),
        ["赫兹"] = (1, "Hz"),
        ["ヘルツ"] = (1, "Hz"),
        ["dBuV"] = (1, "dBµV"),
        ["dB(mW)"] = (1, "dBm"),
        ["Vdc"] = (1, "V"),
        ["Vac"] = (1, "V"),
        ["Vpp"] = (1, "V"),
    };

    /// <summary>A value in the base unit. A small prefix is divided by its exact inverse: 12.5 mV is then the double nearest to 0.0125.</summary>
    public static double Scale(double value, double factor) => factor < 1 ? value / Math.Round(1 / factor) : value * factor;

    /// <summary>Takes a unit as written apart into its factor and its base unit; false for any other word.</summary>
    public static bool TryRead(string text, out double factor, out string unit)
    {
        text = text.Trim().Replace('\u03BC', 'µ');
        if (s_words.TryGetValue(text, out (double Factor, string Unit) word))
        {
            (factor, unit) = word;
            return true;
        }
        if (text is "1" or "m" or "bit" or "sample" or "samples")
        {
            // A metre or a plain 1 as a label is a name or a number, not the unit of a waveform.
            (factor, unit) = (1, "");
            return false;
        }
        return Units.TryUnit(text, out factor, out unit);
    }
}
