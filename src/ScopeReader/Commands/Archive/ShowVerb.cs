using System.CommandLine;
using System.Globalization;
using ScopeReader.Archive;
using ScopeReader.Archive.Contents;
using ScopeReader.Commands.Tables;
using ScopeReader.Readings;

namespace ScopeReader.Commands.Archive;

/// <summary><c>archive show ENTRY</c>: an entry with its history.</summary>
internal static class ShowVerb
{
    public static Command Create(Surroundings surroundings)
    {
        Argument<string> entry = ArchiveCommand.EntryNumber();
        Option<string?> archive = ArchiveCommand.Path();
        Option<bool> json = PlanOptions.Flag("--json", "one JSON document, budgets and earlier measurements in it");
        var command = new Command("show", "show an entry: what, when, with what, its readings, verdicts and history");
        command.Arguments.Add(entry);
        command.Add(json, archive);
        command.SetAction((parsed, cancellation) =>
        {
            int number = ArchiveCommand.Number(parsed.GetValue(entry)!);
            return ArchiveCommand.Run(surroundings, () =>
            {
                using MeasurementArchive opened = MeasurementArchive.OpenToRead(ArchiveCommand.PathOf(parsed, archive));
                Entry shown = opened.Show(number);
                surroundings.Output.Write(parsed.GetValue(json) ? ArchiveDocuments.Of(shown) + "\n" : Sheet(shown, surroundings));
                return ExitStatus.Passed;
            }, cancellation);
        });
        return command;
    }

    /// <summary>A kept reading as people read it.</summary>
    public static string Text(ReadingContent r) => Engineering.Format(r.Value, r.ExpandedUncertainty, r.Unit) + (r.Missing.Count > 0 ? " as indicated" : "");

    private static string Sheet(Entry entry, Surroundings to)
    {
        var sheet = new Sheet(to.Width(), to.Colour);
        EntryDetails d = entry.Details;
        sheet.Heading(SafeText.Of($"Entry {entry.Number.ToString(CultureInfo.InvariantCulture)}: {d.Subject ?? entry.File}"));
        (string Name, string? Value)[] rows =
        [
            ("file", string.Create(CultureInfo.InvariantCulture, $"{entry.File}, {entry.Bytes} bytes")), ("sha-256", entry.Sha256), ("serial", d.Serial), ("operator", d.Operator),
            ("instrument", d.Instrument), ("calibration due", d.CalibrationDue?.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture)),
            ("captured", ArchiveCommand.Minute(entry.CapturedAt) + (entry.CapturedAtSource == "file" ? ", the file's date" : "")), ("added", ArchiveCommand.Minute(entry.AddedAt)),
            ("conditions", ArchiveCommand.Text(d.Conditions)), ("tags", string.Join(", ", d.Tags)), ("notes", d.Notes),
            ("measured by", entry.Measurement.Program), ("outcome", entry.Measurement.Outcome),
        ];
        sheet.Columns([.. rows.Where(r => !string.IsNullOrEmpty(r.Value)).Select(r => new[] { r.Name, SafeText.Of(r.Value!) })]);
        foreach (ChannelContent channel in entry.Measurement.Channels)
            Channel(sheet, channel);
        sheet.Heading("History");
        sheet.Columns([.. entry.History.Select(h => new[] { ArchiveCommand.Minute(h.At), SafeText.Of(Event(h)) })]);
        return sheet.ToString();
    }

    private static void Channel(Sheet sheet, ChannelContent channel)
    {
        sheet.Heading(SafeText.Of($"{channel.Name}: {channel.Kind}"));
        sheet.Columns([.. channel.Readings.Select(r => new[] { r.Quantity, Tables.Sheet.Joined(Text(r)), r.Method + (r.Primary ? "" : ", not primary") })]);
        foreach (VerdictContent v in channel.Verdicts)
            sheet.Line(SafeText.Of($"{v.Quantity}: {v.Outcome}, {v.Reason}"));
        foreach (FindingContent finding in channel.Findings)
            sheet.Line(SafeText.Of(finding.Text));
    }

    private static string Event(EntryEvent e) => e.Kind switch
    {
        "amendment" => $"{e.By}: {string.Join("; ", e.Changes.Select(c => $"{c.Field} from {c.From ?? "nothing"} to {c.To ?? "nothing"}"))} ({e.Reason})",
        "measurement" => $"{e.By}: measured again by {e.Measurement!.Program}, {e.Measurement.Outcome} ({e.Reason})",
        _ => $"{e.By}: added, {e.Measurement!.Outcome}",
    };
}
