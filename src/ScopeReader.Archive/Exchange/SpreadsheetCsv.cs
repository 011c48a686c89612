using System.Buffers;
using System.Globalization;
using System.Text;

namespace ScopeReader.Archive.Exchange;

/// <summary>Writes CSV that is safe to open in a spreadsheet: no cell can act as a formula, under any separator.</summary>
/// <remarks>
/// A text's character that would begin a formula (= + - @ and their full-width forms) gets an apostrophe before it wherever a
/// cell could begin: at the start, and after anything that some spreadsheet takes for a separator, a quote or a line's end.
/// Numbers are written as numbers.
/// </remarks>
public sealed class SpreadsheetCsv(TextWriter writer)
{
    private const string FormulaStarts = "=+-@\uFF1D\uFF0B\uFF0D\uFF20", Separators = ",;|\t\r\n\"'";

    private static readonly SearchValues<char> NeedQuotes = SearchValues.Create(",;|\t\r\n\"");

    private bool _begun;

    /// <summary>A text.</summary>
    public SpreadsheetCsv Text(string? text)
    {
        string safe = Safe(text ?? "");
        return Raw(safe.AsSpan().ContainsAny(NeedQuotes) ? $"\"{safe.Replace("\"", "\"\"", StringComparison.Ordinal)}\"" : safe);
    }

    /// <summary>A number, all its digits; an empty cell for null.</summary>
    public SpreadsheetCsv Number(double? value) => Raw(value?.ToString("R", CultureInfo.InvariantCulture) ?? "");

    /// <summary>A whole number.</summary>
    public SpreadsheetCsv Number(long value) => Raw(value.ToString(CultureInfo.InvariantCulture));

    /// <summary>Ends the row.</summary>
    public void End()
    {
        writer.Write('\n');
        _begun = false;
    }

    /// <summary>A whole row of texts.</summary>
    public void Row(params ReadOnlySpan<string> texts)
    {
        foreach (string text in texts)
            Text(text);
        End();
    }

    /// <summary>A text with its formula starts made harmless.</summary>
    public static string Safe(string text)
    {
        ArgumentNullException.ThrowIfNull(text);
        var safe = new StringBuilder(text.Length + 1);
        bool couldBegin = true;
        foreach (char c in text)
        {
            if (couldBegin && FormulaStarts.Contains(c, StringComparison.Ordinal))
                safe.Append('\'');
            // A null character ends a cell's text in some programs.
            safe.Append(c == '\0' ? ' ' : c);
            couldBegin = Separators.Contains(c, StringComparison.Ordinal) || (couldBegin && (char.IsWhiteSpace(c) || char.IsControl(c)));
        }
        return safe.ToString();
    }

    private SpreadsheetCsv Raw(string cell)
    {
        if (_begun)
            writer.Write(',');
        writer.Write(cell);
        _begun = true;
        return this;
    }
}
