using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Commands.Tables;

/// <summary>A channel's readings as columns, or one above the other where the columns would not fit.</summary>
internal static class ReadingSection
{
    private const string AsAbove = "as above";
    private const int Gap = 2, LeastForNotes = 22;

    public static void Write(Sheet sheet, IReadOnlyList<Reading> readings)
    {
        if (readings.Count == 0)
            return;
        sheet.Heading("Readings");
        Reading[] harmonics = [.. readings.Where(r => Phrases.HarmonicNumber(r.Quantity) > 0)];
        bool compact = harmonics.Length > 2;
        Rows(sheet, compact ? [.. readings.Except(harmonics)] : readings);
        if (compact)
            Harmonics(sheet, harmonics);
        WriteMissing(sheet, readings);
    }

    private static void Rows(Sheet sheet, IReadOnlyList<Reading> readings)
    {
        string[][] rows = [.. readings.Select(r => new[] { r.Quantity.Id, Phrases.Of(r), Phrases.How(r) })];
        if (rows.Length == 0)
            return;
        // What one method gave stands together; saying the method once leaves the numbers in view.
        for (int i = rows.Length - 1; i > 0; i--)
            if (rows[i][2] == rows[i - 1][2] && rows[i][2].Length > AsAbove.Length)
                rows[i][2] = AsAbove;
        if (rows.Max(r => r[0].Length) + rows.Max(r => r[1].Length) + 2 * Gap + LeastForNotes <= sheet.Width)
        {
            sheet.Columns(rows);
            return;
        }
        foreach (string[] row in rows)
        {
            sheet.Line(row[0]);
            sheet.Indented(row[1]);
            sheet.Indented(row[2], 4);
        }
    }

    // Ten harmonics would be ten rows that differ in a number: they share the lines.
    private static void Harmonics(Sheet sheet, Reading[] harmonics)
    {
        string[] how = [.. harmonics.Select(Phrases.How).Distinct()];
        bool expected = harmonics.Any(h => h.Expected is not null);
        sheet.Line((how.Length == 1 ? $"harmonics, dBc ({how[0]})" : "harmonics, dBc") + (expected ? "; in brackets: an ideal pulse of this duty factor and these edges" : ""));
        string[] items = [.. harmonics.Select(h => $"{Phrases.HarmonicNumber(h.Quantity)}: {Phrases.Of(h).Replace(Sheet.Joined(" dBc"), "", StringComparison.Ordinal)}{(how.Length == 1 ? "" : $" ({Phrases.How(h)})")}{Expected(h)}")];
        int width = items.Max(i => i.Length) + Gap, each = Math.Max(1, (sheet.Width - Gap) / width);
        foreach (string[] line in items.Chunk(each))
            sheet.Indented(string.Concat(line.Select(i => i.PadRight(width))).TrimEnd());
    }

    private static string Expected(Reading harmonic) =>
        harmonic.Expected is { } level ? string.Create(System.Globalization.CultureInfo.InvariantCulture, $" ({level:F1})") : "";

    private static void WriteMissing(Sheet sheet, IReadOnlyList<Reading> readings)
    {
        foreach (IGrouping<string, string> table in readings.SelectMany(r => r.Budget.Missing).Where(PlanKeys.IsInPlan).Distinct().GroupBy(PlanKeys.TableOf))
        {
            string[] missing = [.. table];
            string them = missing.Length == 1 ? "it" : "them";
            sheet.Line($"without {string.Join(", ", missing)}: the plan does not state {them}, so these readings are as indicated and their ± leaves {them} out. "
                + $"Add {string.Join(", ", missing.Select(PlanKeys.For))} to {table.Key}.");
        }
    }
}
