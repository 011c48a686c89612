using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Files.Meaning;

namespace ScopeReader.Files.Structure;

/// <summary>Stops where two readings of the numbers are both plausible.</summary>
internal static class Ambiguity
{
    /// <summary>Refuses a table whose commas could mean two things.</summary>
    /// <exception cref="ImportException">They could.</exception>
    public static void Check(string file, TableShape shape, ImportSettings settings, Facts facts, long startLine)
    {
        if (settings.DecimalMark is not null || facts.Word(Fact.DecimalMark) is not null)
            return;
        if (settings.Delimiter is null && shape is { Delimiter: ',', Columns: [0, 1], Width: 2 })
            CheckDelimiter(file, shape, startLine);
        if (shape.Mark == ',')
            CheckGroups(file, shape, startLine);
    }

    // "12,5": two whole numbers, or one with a decimal comma. A row counter in front or names above settle it.
    private static void CheckDelimiter(string file, TableShape shape, long startLine)
    {
        string? example = null;
        double previous = double.NaN;
        bool counts = true;
        for (int r = shape.First; r < shape.Rows.Count; r++)
        {
            string[] row = shape.Rows[r];
            if (row.Length < 2)
                continue;
            if (!IsWhole(row[0], true) || !IsWhole(row[1], false))
                return;
            double first = double.Parse(row[0], CultureInfo.InvariantCulture);
            counts &= double.IsNaN(previous) || first == previous + 1;
            previous = first;
            example ??= $"{row[0]},{row[1]}";
        }
        bool isNamed = shape.First > 0 && shape.Rows.Take(shape.First).Last(r => r.Length > 0 || r == shape.Rows[0]).Count(c => c.Length > 0) > 1;
        if (counts || isNamed || example is null)
            return;
        throw new ImportException(file, $"expected to tell a column's end from a decimal mark, found \"{Excerpt.Of(example, 20)}\": two whole numbers, or one number with a decimal comma. "
            + "Give --delimiter comma or --decimal comma.", startLine + shape.First);
    }

    // "1,234": one and a bit, or more than a thousand. Any other number of digits behind a comma settles it.
    private static void CheckGroups(string file, TableShape shape, long startLine)
    {
        (string Text, int Row, int Column)? example = null;
        for (int r = shape.First; r < shape.Rows.Count; r++)
            foreach (int c in shape.Columns)
            {
                if (c >= shape.Rows[r].Length || !shape.Rows[r][c].Contains(','))
                    continue;
                if (!IsGrouped(shape.Rows[r][c]))
                    return;
                example ??= (shape.Rows[r][c], r, c);
            }
        if (example is { } found)
            throw new ImportException(file, $"expected to tell a decimal mark from a thousands separator, found \"{Excerpt.Of(found.Text, 20)}\": {found.Text.Replace(',', '.')} or {found.Text.Replace(",", "", StringComparison.Ordinal)}. "
                + "Give --decimal comma or --decimal point.", startLine + found.Row, found.Column + 1);
    }

    private static bool IsWhole(string text, bool signed) =>
        text.Length is > 0 and < 16 && text.AsSpan(signed && text[0] is '-' or '+' ? 1 : 0) is { Length: > 0 } digits && digits.IndexOfAnyExceptInRange('0', '9') < 0;

    private static bool IsGrouped(string text)
    {
        string[] groups = text.TrimStart('+', '-').Split(',');
        return groups[0].Length is >= 1 and <= 3 && groups[0][0] is >= '1' and <= '9'
            && groups.All(g => g.AsSpan().IndexOfAnyExceptInRange('0', '9') < 0) && groups.Skip(1).All(g => g.Length == 3);
    }
}
