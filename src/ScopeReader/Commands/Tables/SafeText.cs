using System.Globalization;
using System.Text;

namespace ScopeReader.Commands.Tables;

/// <summary>Text from files as a terminal may be given it: on one line, with nothing that it would obey.</summary>
internal static class SafeText
{
    private const char Substitute = '\uFFFD';

    /// <summary>The text with line ends and tabs as spaces and every other control, escape and direction character replaced.</summary>
    /// <remarks>A channel's name could otherwise move the cursor, change the colours, or make a line read as something else.</remarks>
    public static string Of(string text)
    {
        var safe = new StringBuilder(text.Length);
        foreach (Rune rune in text.EnumerateRunes())
            if (rune.Value is '\t' or '\n' or '\r')
                safe.Append(' ');
            else
                safe.Append(IsShown(rune) ? rune.ToString() : Substitute.ToString());
        return safe.ToString();
    }

    private static bool IsShown(Rune rune) => Rune.GetUnicodeCategory(rune) is not (UnicodeCategory.Control or UnicodeCategory.Format or UnicodeCategory.Surrogate
        or UnicodeCategory.PrivateUse or UnicodeCategory.OtherNotAssigned or UnicodeCategory.LineSeparator or UnicodeCategory.ParagraphSeparator);
}
