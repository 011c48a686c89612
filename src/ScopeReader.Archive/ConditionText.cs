using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Archive;

/// <summary>Conditions as texts that read back to the same bits.</summary>
public static class ConditionText
{
    /// <summary>"5 V", all digits, no prefix.</summary>
    public static string Format(Condition condition)
    {
        ArgumentNullException.ThrowIfNull(condition);
        return string.Create(CultureInfo.InvariantCulture, $"{condition.Value:R} {condition.Unit}").TrimEnd();
    }

    /// <summary>Reads <see cref="Format"/>'s text, or a person's.</summary>
    /// <exception cref="FormatException">No number, or an unknown unit.</exception>
    public static Condition Parse(string text)
    {
        ArgumentNullException.ThrowIfNull(text);
        // A prefix multiplies, which can spoil the last bit: 5100 mV is 5.1 V.
        return Units.TryParse(text, out double value, out string unit)
            ? new Condition(double.Parse(value.ToString("G15", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture), unit)
            : throw new FormatException($"expected a number with its unit, such as 5 V, found \"{text}\"");
    }
}
