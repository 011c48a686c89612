using System.Globalization;
using System.Text;

namespace ScopeReader.Bench.Drawing;

/// <summary>Text as a terminal may be given it: nothing that it would obey, and of known width.</summary>
internal static class ScreenText
{
    /// <summary>Stands for a character that is not shown.</summary>
    public const char Substitute = '·';

    /// <summary>The text with control, escape, formatting, combining and unpaired characters replaced.</summary>
    /// <remarks>A name read from a file could otherwise move the cursor, turn the writing direction or shift the columns.</remarks>
    public static string Clean(string text)
    {
        int i = 0;
        while (i < text.Length && IsShown(text[i]))
            i++;
        if (i == text.Length)
            return text;
        var clean = new StringBuilder(text, 0, i, text.Length);
        for (; i < text.Length; i++)
        {
            if (char.IsHighSurrogate(text[i]) && i + 1 < text.Length && char.IsLowSurrogate(text[i + 1]))
                i++;
            clean.Append(IsShown(text[i]) ? text[i] : text[i] is '\t' or '\n' or '\r' ? ' ' : Substitute);
        }
        return clean.ToString();
    }

    /// <summary>Columns that a clean text takes.</summary>
    public static int Width(string clean)
    {
        int width = 0;
        foreach (char c in clean)
            width += WidthOf(c);
        return width;
    }

    /// <summary>Columns that a character takes: 2 for those of East Asian width W or F (Unicode Standard Annex 11), else 1.</summary>
    public static int WidthOf(char c) => c >= 0x1100 && c is <= (char)0x115F or (>= (char)0x2E80 and <= (char)0x303E) or (>= (char)0x3041 and <= (char)0xA4CF)
        or (>= (char)0xA960 and <= (char)0xA97F) or (>= (char)0xAC00 and <= (char)0xD7A3) or (>= (char)0xF900 and <= (char)0xFAFF)
        or (>= (char)0xFE30 and <= (char)0xFE6F) or (>= (char)0xFF01 and <= (char)0xFF60) or (>= (char)0xFFE0 and <= (char)0xFFE6) ? 2 : 1;

    /// <summary>A clean text cut to a width, its last column an ellipsis where something is missing.</summary>
    public static string Cut(string clean, int width)
    {
        if (Width(clean) <= width)
            return clean;
        if (width <= 0)
            return "";
        int used = 0, i = 0;
        while (used + WidthOf(clean[i]) <= width - 1)
            used += WidthOf(clean[i++]);
        return clean[..i] + "…";
    }

    /// <summary>A file's name cut to a width: without its ending first, then out of its middle, for its two ends tell files apart.</summary>
    public static string CutName(string name, int width)
    {
        string clean = Clean(name);
        if (Width(clean) <= width)
            return clean;
        clean = Path.GetFileNameWithoutExtension(clean);
        if (Width(clean) <= width || width < 5)
            return Cut(clean, width);
        int end = (width - 1) / 2;
        return Cut(clean, width - end) + CutStart(clean, end + 1)[1..];
    }

    /// <summary>The end of a clean text, for paths, whose last part says most.</summary>
    public static string CutStart(string clean, int width)
    {
        if (Width(clean) <= width)
            return clean;
        if (width <= 0)
            return "";
        int used = 0, i = clean.Length;
        while (used + WidthOf(clean[i - 1]) <= width - 1)
            used += WidthOf(clean[--i]);
        return "…" + clean[i..];
    }

    /// <summary>A text as lines of a width, broken between words; a word that is longer is broken anywhere.</summary>
    public static IReadOnlyList<string> Wrap(string text, int width)
    {
        width = Math.Max(2, width);
        var lines = new List<string>();
        string line = "";
        foreach (string word in Clean(text).Split(' ', StringSplitOptions.RemoveEmptyEntries))
        {
            string rest = word;
            if (line.Length > 0 && Width(line) + 1 + Width(rest) > width)
            {
                lines.Add(line);
                line = "";
            }
            while (Width(rest) > width)
            {
                int used = 0, i = 0;
                while (used + WidthOf(rest[i]) <= width)
                    used += WidthOf(rest[i++]);
                lines.Add(rest[..i]);
                rest = rest[i..];
            }
            line = line.Length == 0 ? rest : line + " " + rest;
        }
        if (line.Length > 0 || lines.Count == 0)
            lines.Add(line);
        return lines;
    }

    // Symbols of the 2000s that terminals draw as pictures two columns wide are not worth a table: they are not shown either.
    private static bool IsShown(char c) => c is >= ' ' and <= '~' || (c >= '\u00A0' && char.GetUnicodeCategory(c) is not
        (UnicodeCategory.Control or UnicodeCategory.Format or UnicodeCategory.Surrogate or UnicodeCategory.PrivateUse or UnicodeCategory.OtherNotAssigned
        or UnicodeCategory.NonSpacingMark or UnicodeCategory.EnclosingMark or UnicodeCategory.SpacingCombiningMark
        or UnicodeCategory.LineSeparator or UnicodeCategory.ParagraphSeparator)
        && c is not (>= '\u2300' and <= '\u24FF' or >= '\u2600' and <= '\u27BF' or >= '\u2B00' and <= '\u2BFF' or '\u00AD' or '\u25FD' or '\u25FE'));
}
