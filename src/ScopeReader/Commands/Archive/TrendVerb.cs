using System.CommandLine;
using System.Globalization;
using ScopeReader.Archive;
using ScopeReader.Archive.Search;
using ScopeReader.Commands.Tables;
using ScopeReader.Comparing;
using ScopeReader.Files.Plans;
using ScopeReader.Readings;

namespace ScopeReader.Commands.Archive;

/// <summary><c>archive trend QUANTITY</c>: a quantity over date or over a condition.</summary>
internal static class TrendVerb
{
    private const double DaysPerYear = 365.25;

    public static Command Create(Surroundings surroundings)
    {
        var quantity = new Argument<string>("QUANTITY") { Description = "such as frequency-error" };
        var filters = new ArchiveFilters();
        Option<string?> archive = ArchiveCommand.Path(), against = PlanOptions.Value("--against", "CONDITION", "a condition's name in place of the date"), channel = PlanOptions.Value("--channel", "NAME", "this channel only");
        var command = new Command("trend", "show a quantity over date or a condition: drift, control limits, points out of them");
        command.Arguments.Add(quantity);
        filters.AddTo(command);
        command.Add(against, channel, archive);
        command.SetAction((parsed, cancellation) =>
        {
            string id = parsed.GetValue(quantity)!;
            if (Quantities.Find(id) is null)
                throw new UsageException($"unknown quantity \"{id}\"; {NearestWord.Hint(id, [.. Quantities.All.Select(q => q.Id)])}");
            ArchiveQuery query = filters.Read(parsed, int.MaxValue) with { Quantities = [id] };
            return ArchiveCommand.Run(surroundings, () =>
            {
                using MeasurementArchive opened = MeasurementArchive.OpenToRead(ArchiveCommand.PathOf(parsed, archive));
                IReadOnlyList<FoundEntry> entries = opened.Find(query).Entries;
                if (entries.Select(e => (e.Subject, e.Serial)).Distinct().Count() is > 1 and int subjects)
                    surroundings.Error.WriteLine($"these entries are of {subjects.ToString(CultureInfo.InvariantCulture)} subjects or serial numbers; --subject and --serial choose one");
                IReadOnlyList<SeriesPoint> points = SeriesPoint.From(entries, id, parsed.GetValue(channel), parsed.GetValue(against));
                if (points.Count == 0)
                {
                    surroundings.Error.WriteLine(SafeText.Of($"no entry has {id}{(parsed.GetValue(against) is { } name ? $" and a condition {name}" : "")}; archive find lists them"));
                    return ExitStatus.Unreadable;
                }
                surroundings.Output.Write(Text(id, points, parsed.GetValue(against), surroundings));
                return ExitStatus.Passed;
            }, cancellation);
        });
        return command;
    }

    private static string Text(string quantity, IReadOnlyList<SeriesPoint> points, string? against, Surroundings to)
    {
        var sheet = new Sheet(to.Width(), to.Colour);
        double[] x = [.. points.Select(p => p.Setting)], y = [.. points.Select(p => p.Value)];
        string unit = points[0].Unit;
        // The chart is of readings in the order they were taken, and that order is the date's.
        ControlChart? chart = against is null ? ControlChart.Of(y) : null;
        sheet.Heading(SafeText.Of($"{quantity} over {against ?? "date"}"));
        sheet.Columns([.. points.Select((p, i) => new[] { p.Label, against is null ? p.SettingText : Sheet.Joined(p.SettingText), Sheet.Joined(Engineering.Format(p.Value, p.ExpandedUncertainty, unit)), chart?.Outside.Contains(i) == true ? "outside the control limits" : "" })]);
        if (points.Count > 1 && x.Distinct().Count() > 1)
            foreach (string line in TextPlot.Lines(x, y, unit, chart is null ? [] : [chart.Low, chart.Centre, chart.High], chart?.Outside ?? [], to.Width()))
                sheet.AsItIs(line);
        if (chart is not null)
            sheet.Line(string.Create(CultureInfo.InvariantCulture, $"mean {Engineering.Format(chart.Centre, unit, 5)}; control limits {Engineering.Format(chart.Low, unit, 5)} to {Engineering.Format(chart.High, unit, 5)} (three sigma of the moving range); {chart.Outside.Count} of {points.Count} outside"));
        foreach (string line in Slope(x, y, unit, against, points[0].SettingUnit))
            sheet.Line(line);
        return sheet.ToString();
    }

    private static IEnumerable<string> Slope(double[] x, double[] y, string unit, string? against, string settingUnit)
    {
        if (x.Length < 3 || x.Distinct().Count() < 2)
        {
            yield return "three readings or more, at two settings or more, are needed for a slope with its uncertainty";
            yield break;
        }
        if (against is null && x.Max() - x.Min() < 1)
        {
            yield return "the captures lie within a day: no drift per year";
            yield break;
        }
        ConditionFit fit = ConditionFit.Of(x, y);
        double scale = against is null ? DaysPerYear : SeriesReport.Scale(settingUnit);
        string per = against is null ? $"{unit}/year" : $"{unit}/{SeriesReport.ScaledUnit(settingUnit)}", what = against is null ? "drift" : "slope";
        double slope = fit.Line.Coefficients[1] * scale, uncertainty = fit.SlopeExpandedUncertainty * scale;
        yield return $"{what} {Engineering.Format(slope, uncertainty, per)} (95 %, straight line, {x.Length.ToString(CultureInfo.InvariantCulture)} readings): "
            + (Math.Abs(slope) > uncertainty ? "more than their scatter explains" : "within their scatter");
        if (against is null)
            yield return "an instrument's own ageing is in it; what its timebase is off by throughout is not";
    }
}
