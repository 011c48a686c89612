using System.CommandLine;
using System.Globalization;
using ScopeReader.Archive;
using ScopeReader.Archive.Contents;
using ScopeReader.Archive.Search;
using ScopeReader.Captures;
using ScopeReader.Commands.Tables;
using ScopeReader.Files;
using ScopeReader.Files.Plans;
using ScopeReader.Readings;

namespace ScopeReader.Commands.Archive;

/// <summary><c>archive remeasure</c>: today's methods on yesterday's bytes, and what changed.</summary>
internal static class RemeasureVerb
{
    public static Command Create(Surroundings surroundings)
    {
        var entries = new Argument<string[]>("ENTRY") { Description = "entries; without any, those that the options choose", Arity = ArgumentArity.ZeroOrMore };
        var filters = new ArchiveFilters();
        Option<string?> archive = ArchiveCommand.Path(), by = ArchiveCommand.By(), reason = ArchiveCommand.Reason();
        Option<bool> keep = PlanOptions.Flag("--keep", "keep the new measurement beside the old");
        var command = new Command("remeasure", "measure kept captures again, with the plan and chain of their time, and say what changed");
        command.Arguments.Add(entries);
        filters.AddTo(command);
        command.Add(keep, reason, by, archive);
        command.SetAction((parsed, cancellation) =>
        {
            int[] named = [.. (parsed.GetValue(entries) ?? []).Select(ArchiveCommand.Number)];
            ArchiveQuery query = filters.Read(parsed, int.MaxValue) with { Quantities = [] };
            bool kept = parsed.GetValue(keep);
            string why = parsed.GetValue(reason) ?? "measured again with " + CommandLine.ProgramAndVersion;
            return ArchiveCommand.Run(surroundings, () =>
            {
                string path = ArchiveCommand.PathOf(parsed, archive);
                using MeasurementArchive read = MeasurementArchive.OpenToRead(path);
                using MeasurementArchive? write = kept ? MeasurementArchive.Open(path) : null;
                int status = ExitStatus.Passed;
                int[] chosen = named.Length > 0 ? named : [.. read.Find(query).Entries.Select(e => e.Number).Order()];
                foreach (int number in chosen)
                {
                    Entry entry = read.Show(number);
                    try
                    {
                        (Measurement measurement, MeasurementContext context) = Measure(entry, read.Extract(number), cancellation);
                        Report(entry, ContentMaker.From(measurement, context), surroundings.Output);
                        if (write?.Keep(number, measurement, context, ArchiveCommand.ByOf(parsed, by), why).History[^1] is { } made)
                            surroundings.Output.WriteLine(SafeText.Of(string.Create(CultureInfo.InvariantCulture, $"  kept as record {made.Record}")));
                    }
                    catch (Exception fault) when (fault is ImportException or PlanException)
                    {
                        surroundings.Error.WriteLine(SafeText.Of($"entry {number.ToString(CultureInfo.InvariantCulture)} cannot be measured again: {fault.Message}"));
                        status = ExitStatus.Unreadable;
                    }
                }
                return status;
            }, cancellation);
        });
        return command;
    }

    // The plan, the options and the day of ageing as they were.
    private static (Measurement, MeasurementContext) Measure(Entry entry, byte[] bytes, CancellationToken cancellation)
    {
        MeasurementContent before = entry.Measurement;
        MeasurementSettings settings = before.Settings;
        Plan plan = before.Plan is { } text ? PlanReader.Parse(text, $"the plan of entry {entry.Number.ToString(CultureInfo.InvariantCulture)}") : Plan.Empty;
        plan = plan with { Nominal = settings.Nominal, AsOf = settings.AsOf, Import = HowRead(settings, plan) };
        (Measurement measurement, ImportReport report) = CaptureMeasurer.Measure(bytes, entry.File, plan, ImportTable.Empty, settings.Channel, cancellation);
        return (measurement, KeptFile.ContextOf(plan, before.Plan, settings.Channel, report));
    }

    // Entries of earlier versions have two of the settings alone.
    private static ImportSettings HowRead(MeasurementSettings settings, Plan plan) => settings.HowRead is { } table ? ImportTable.Parse(table, "how it was read").Settings
        : plan.Import with { Interval = settings.Interval, Segment = settings.Segment };

    private static void Report(Entry entry, MeasurementContent now, TextWriter output)
    {
        IReadOnlyList<MeasurementChange> changes = MeasurementChange.Between(entry.Measurement, now);
        string name = SafeText.Of($"entry {entry.Number.ToString(CultureInfo.InvariantCulture)}, {entry.File}");
        output.WriteLine(changes.Count == 0
            ? $"{name}: nothing changed, {now.Outcome}"
            : $"{name}: {entry.Measurement.Program} said {entry.Measurement.Outcome}, {now.Program} says {now.Outcome}");
        foreach (MeasurementChange change in changes)
            output.WriteLine(SafeText.Of($"  {change.Channel} {change.Quantity}: {Text(change.Before)} before, {Text(change.After)} now"));
    }

    private static string Text(ReadingContent? reading) => reading is null ? "not measured" : Engineering.Format(reading.Value, reading.ExpandedUncertainty, reading.Unit);
}
