using System.Globalization;
using ScopeReader.Comparing;
using ScopeReader.Readings;

namespace ScopeReader.Commands.Tables;

/// <summary>A comparison for people: what it means first, then the numbers side by side, then the curves over each other.</summary>
internal static class ComparisonTable
{
    private const int PlotRows = 16, WidestPlot = 110, Gap = 2;

    // Of these the table keeps to itself what stands in other rows too.
    private static readonly Quantity[] Derived = [Quantities.ThdR, Quantities.FundamentalPower];

    /// <summary>The whole comparison as text.</summary>
    /// <param name="comparison">What was found.</param>
    /// <param name="width">Columns of a line.</param>
    /// <param name="colour">Whether it shows colours.</param>
    public static string Of(Comparison comparison, int width, bool colour)
    {
        var sheet = new Sheet(width, colour);
        sheet.Columns([.. new[] { comparison.Reference }.Concat(comparison.Sides).Select((side, i) => new[] { i == 0 ? "reference" : "compared", Files(side) })]);
        sheet.Heading("Findings");
        foreach (Finding finding in comparison.Findings)
            sheet.Columns([["-", SafeText.Of(finding.Text)]]);
        if (comparison.Readings.Count > 0)
            ReadingSection.Write(sheet, comparison.Readings);
        if (comparison.NotMeasured.Count > 0)
        {
            sheet.Heading("Not measured");
            sheet.Line(Phrases.List(comparison.NotMeasured.Select(n => n.Quantity)));
            sheet.Indented(SafeText.Of(comparison.NotMeasured[0].Reason));
        }
        foreach (var group in comparison.Differences.GroupBy(d => (d.File, d.Channel)))
            Differences(sheet, group.Key.File, group.Key.Channel, [.. group.Where(d => !Derived.Contains(d.Quantity))]);
        OnOneSide(sheet, comparison);
        foreach (Overlay overlay in comparison.Overlays)
            Plot(sheet, comparison, overlay);
        string[] cautions = [.. new[] { comparison.Reference }.Concat(comparison.Sides).SelectMany(s => s.Captures).SelectMany(c => c.Cautions).Distinct()];
        if (cautions.Length > 0)
            sheet.Heading("Take care");
        foreach (string caution in cautions)
            sheet.Columns([["-", SafeText.Of(caution)]]);
        return sheet.ToString();
    }

    private static string Files(ComparedSide side) => SafeText.Of(string.Join(", ", side.Captures.Select(c => c.Capture.File)));

    private static void Differences(Sheet sheet, string file, string channel, Difference[] differences)
    {
        sheet.Heading($"Differences, {SafeText.Of(channel)} of {SafeText.Of(file)}");
        bool unknown = differences.Any(d => d.IsSignificant is null);
        sheet.Line("* beyond its 95 % interval; one difference of nothing in twenty is, by chance" + (unknown ? "; ? a chain term that it depends on is not stated" : ""));
        string[][] rows = [[" quantity", "reference", "compared", "difference", "ratio"], .. differences.Select(Row)];
        // The ratio is what a narrow terminal can best do without.
        foreach (int columns in (ReadOnlySpan<int>)[5, 4])
            if (Enumerable.Range(0, columns).Sum(c => rows.Max(r => r[c].Length)) + (columns - 1) * Gap <= sheet.Width)
            {
                sheet.Columns([.. rows.Select(r => r[..columns])]);
                return;
            }
        foreach (string[] row in rows[1..])
        {
            sheet.Line(row[0]);
            sheet.Indented($"{row[1]} → {row[2]}{(row[4].Length > 0 ? $", ratio {row[4]}" : "")}");
            sheet.Indented(row[3], 4);
        }
    }

    private static string[] Row(Difference d)
    {
        double u = d.Budget.ExpandedUncertainty;
        string mark = d.IsSignificant switch { true => "*", null => "?", false => " " };
        string ratio = d.Ratio is < 0.995 or > 1.005 ? Short(d.Ratio.Value) : "";
        (string change, string spread, string unit) = Engineering.Parts(d.Change, u, d.ChangeUnit);
        return [mark + d.Quantity.Id, Value(d.Reference, u, d.Unit), Value(d.Value, u, d.Unit), Sheet.Joined(Unit($"{change}{(spread.Length > 0 ? $" ± {spread}" : "")}", unit)), ratio];
    }

    // To the first digit of the difference's uncertainty: the difference itself has one more.
    private static string Value(double value, double uncertainty, string unit)
    {
        // But to three digits of a value that is beyond its own doubt.
        double least = Math.Max(uncertainty, 1e-9 * Math.Abs(value)), spread = Math.Max(least, Math.Min(10 * least, Math.Abs(value) / 10));
        (string number, _, string prefixed) = Engineering.Parts(value, spread, unit);
        return Sheet.Joined(Unit(number, prefixed));
    }

    private static string Short(double ratio) => ratio.ToString(ratio is >= 0.1 and < 9.95 ? "0.00" : "G2", CultureInfo.InvariantCulture);

    private static string Unit(string number, string unit) => unit is "" or "1" ? number : $"{number} {SafeText.Of(unit)}";

    private static void OnOneSide(Sheet sheet, Comparison comparison)
    {
        OneSided[] told = [.. comparison.OneSided.Where(o => !o.Reading.Quantity.Id.StartsWith("ringing-", StringComparison.Ordinal))];
        if (told.Length == 0)
            return;
        sheet.Heading("On one side only");
        foreach (OneSided one in told)
            sheet.Columns([[one.Reading.Quantity.Id, $"{Phrases.Of(one.Reading)}; not in {SafeText.Of(one.File)}{(one.Why is { } why ? ": " + SafeText.Of(why.Reason) : "")}"]]);
    }

    private static void Plot(Sheet sheet, Comparison comparison, Overlay overlay)
    {
        sheet.Heading(overlay.Title.Length > 0 ? char.ToUpperInvariant(overlay.Title[0]) + overlay.Title[1..] : "");
        sheet.Line($"dots: {SafeText.Of(comparison.Reference.Name)}; o: {SafeText.Of(overlay.File)}");
        foreach (string line in OverlayPlot.Draw(overlay, Math.Min(sheet.Width, WidestPlot), PlotRows))
            sheet.AsItIs(line);
    }
}
