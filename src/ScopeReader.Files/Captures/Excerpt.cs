using System.Globalization;
using System.Text;

namespace ScopeReader.Files;

/// <summary>What a file contains, made fit for a message: one line, no control characters, not too long.</summary>
internal static class Excerpt
{
    public const int Longest = 60;

    public static string Of(ReadOnlySpan<char> text, int longest = Longest)
    {
        text = text.Trim();
        bool cut = text.Length > longest;
        if (cut)
            text = text[..longest];
        var clean = new StringBuilder(text.Length + 1);
        foreach (char c in text)
            clean.Append(IsPlain(c) ? c : c is '\t' or '\r' or '\n' ? ' ' : '\uFFFD');
        return cut ? clean.Append('…').ToString() : clean.ToString();
    }

    public static string Of(ReadOnlySpan<byte> utf8, int longest = Longest) =>
        Of(Encoding.UTF8.GetString(utf8.Length > 4 * longest + 4 ? utf8[..(4 * longest + 4)] : utf8), longest);

    // Direction marks and other format characters could make a message read as something that the file does not say.
    private static bool IsPlain(char c) => char.GetUnicodeCategory(c) is not (UnicodeCategory.Control or UnicodeCategory.Format
        or UnicodeCategory.LineSeparator or UnicodeCategory.ParagraphSeparator or UnicodeCategory.Surrogate or UnicodeCategory.PrivateUse);
}
