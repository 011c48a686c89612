using System.Globalization;
using System.Text;

namespace ScopeReader.Files.Plans;

/// <summary>A key of an [import] table with its value as TOML has it.</summary>
/// <param name="Key">The key.</param>
/// <param name="Value">The value, in TOML.</param>
/// <param name="Said">The value as a person says it: "comma", "time, CH1".</param>
public sealed record ImportEntry(string Key, string Value, string Said)
{
    /// <summary>"decimal comma", "columns time, CH1".</summary>
    public override string ToString() => $"{Key} {Said}";

    /// <summary>A text as a TOML value.</summary>
    public static string Quoted(string text)
    {
        ArgumentNullException.ThrowIfNull(text);
        var quoted = new StringBuilder("\"");
        foreach (char c in text)
            quoted.Append(c is '"' or '\\' ? $"\\{c}" : char.IsControl(c) ? string.Create(CultureInfo.InvariantCulture, $"\\u{(int)c:X4}") : c.ToString());
        return quoted.Append('"').ToString();
    }

    /// <summary>Texts as a TOML list.</summary>
    public static string List(IEnumerable<string> texts) => $"[{string.Join(", ", texts.Select(Quoted))}]";
}
