using System.CommandLine;
using System.Globalization;
using ScopeReader.Archive;
using ScopeReader.Archive.Search;
using ScopeReader.Commands.Tables;
using ScopeReader.Files.Output;
using ScopeReader.Files.Plans;
using ScopeReader.Readings;

namespace ScopeReader.Commands.Archive;

/// <summary><c>series</c>: a quantity against a varied condition, from files or from the archive.</summary>
internal static class SeriesVerb
{
    public static Command Create(Surroundings surroundings)
    {
        var files = new Argument<string[]>("FILE") { Description = "captures, one a setting; without any, archive entries that the options choose", Arity = ArgumentArity.ZeroOrMore };
        var plan = new PlanOptions();
        var filters = new ArchiveFilters();
        Option<string?> against = PlanOptions.Value("--against", "CONDITION", "the varied condition, such as supply or load-capacitance"), at = PlanOptions.Value("--at", "VALUES", "its value in each file, such as 4.5V,5V,5.5V");
        Option<string?> quantity = PlanOptions.Value("--quantity", "NAME", "frequency-error where there is a nominal, otherwise frequency"), within = PlanOptions.Value("--within", "VALUE", "a limit about zero, such as 20ppm; otherwise the plan's");
        Option<string?> channel = PlanOptions.Value("--channel", "NAME", "this channel only"), archive = ArchiveCommand.Path();
        var command = new Command("series", "fit a quantity against a varied condition: slope with uncertainty, curvature, settings within a limit");
        command.Arguments.Add(files);
        plan.AddTo(command);
        command.Add(against, at, quantity, within, channel);
        filters.AddTo(command);
        command.Add(archive, CommandLine.NoColour());
        command.SetAction((parsed, cancellation) =>
        {
            string condition = parsed.GetValue(against) ?? throw new UsageException("series needs the varied condition: --against CONDITION");
            string[] named = MeasureVerb.CheckedFiles(parsed.GetValue(files) ?? []);
            Plan read = plan.Read(parsed, surroundings.Today);
            string id = QuantityOf(parsed.GetValue(quantity), named.Length == 0 || read.Nominal is not null);
            Condition[] settings = Settings(parsed.GetValue(at), named);
            (double? low, double? high) = Bounds(id, parsed.GetValue(within), read);
            ArchiveQuery query = filters.Read(parsed, int.MaxValue) with { Quantities = [.. new[] { id, Quantities.Frequency.Id }.Distinct()] };
            string? only = parsed.GetValue(channel);
            return ArchiveCommand.Run(surroundings, () =>
            {
                bool allRead = true;
                Func<string, IReadOnlyList<SeriesPoint>> points = named.Length > 0
                    ? FromFiles(named, settings, read, only, condition, surroundings, out allRead, cancellation)
                    : FromArchive(ArchiveCommand.PathOf(parsed, archive), query, only, condition);
                IReadOnlyList<SeriesPoint> found = points(id);
                if (found.Count < 2 || found.Select(p => p.Setting).Distinct().Count() < 2)
                {
                    surroundings.Error.WriteLine(SafeText.Of($"expected {id} at two settings of {condition} or more, found {found.Count.ToString(CultureInfo.InvariantCulture)}; measure or choose more captures"));
                    return ExitStatus.Unreadable;
                }
                bool load = found[0].SettingUnit == "F" && points(Quantities.Frequency.Id).Count == found.Count;
                surroundings.Output.Write(SeriesReport.Text(id, condition, found, low, high, load ? points(Quantities.Frequency.Id) : null, surroundings));
                return allRead ? ExitStatus.Passed : ExitStatus.Unreadable;
            }, cancellation);
        });
        return command;
    }

    private static string QuantityOf(string? named, bool hasNominal)
    {
        string id = named ?? (hasNominal ? Quantities.FrequencyError.Id : Quantities.Frequency.Id);
        return Quantities.Find(id) is not null ? id : throw new UsageException($"--quantity: unknown quantity \"{id}\"; {NearestWord.Hint(id, [.. Quantities.All.Select(q => q.Id)])}");
    }

    private static Condition[] Settings(string? text, string[] files)
    {
        if (files.Length == 0)
            return text is null ? [] : throw new UsageException("--at gives the settings of files, and there are none; entries have their own conditions");
        string[] values = (text ?? "").Split(',', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries);
        if (values.Length != files.Length)
            throw new UsageException(string.Create(CultureInfo.InvariantCulture, $"--at: expected a value for each of {files.Length} files, such as 4.5V,5V, found {values.Length}"));
        try
        {
            return [.. values.Select(ConditionText.Parse)];
        }
        catch (FormatException problem)
        {
            throw new UsageException($"--at: {problem.Message}");
        }
    }

    private static (double? Low, double? High) Bounds(string quantity, string? within, Plan plan)
    {
        if (within is null)
            return plan.Limits.FirstOrDefault(l => l.Quantity.Id == quantity) is { } limit ? (limit.Low, limit.High) : (null, null);
        if (!Units.TryParse(within, Quantities.Find(quantity)!.Unit, out double bound, out string problem))
            throw new UsageException($"--within: {problem}");
        return bound > 0 ? (-bound, bound) : throw new UsageException($"--within: expected more than zero, found \"{within}\"");
    }

    private static Func<string, IReadOnlyList<SeriesPoint>> FromArchive(string path, ArchiveQuery query, string? channel, string condition)
    {
        using MeasurementArchive archive = MeasurementArchive.OpenToRead(path);
        IReadOnlyList<FoundEntry> entries = archive.Find(query).Entries;
        return quantity => SeriesPoint.From(entries, quantity, channel, condition);
    }

    private static Func<string, IReadOnlyList<SeriesPoint>> FromFiles(string[] files, Condition[] settings, Plan plan, string? channel, string condition, Surroundings to, out bool allRead, CancellationToken cancellation)
    {
        using ProgressLine progress = to.Progress(cancellation);
        MeasuredFile[] measured = [.. files.Select(f => CaptureMeasurer.Measure(f, plan, channel, progress, cancellation))];
        progress.Hide();
        foreach (MeasuredFile file in measured.Where(m => m.Error is not null))
            to.Error.WriteLine(SafeText.Of(file.Error!));
        allRead = measured.All(m => m.Error is null);
        return quantity =>
        {
            var points = new List<SeriesPoint>();
            for (int i = 0; i < measured.Length; i++)
                if (measured[i].Measurement?.Channels.SelectMany(c => c.Readings).FirstOrDefault(r => r.IsPrimary && r.Quantity.Id == quantity) is { } reading)
                    points.Add(new SeriesPoint(Path.GetFileName(measured[i].File), settings[i].Value, settings[i].Unit, ArchiveCommand.Text(settings[i]), reading.Value, reading.Budget.ExpandedUncertainty, reading.Unit));
            return SeriesPoint.InOrder(points, condition);
        };
    }
}
