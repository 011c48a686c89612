using System.CommandLine;
using System.Globalization;
using ScopeReader.Archive;
using ScopeReader.Archive.Exchange;
using ScopeReader.Archive.Search;
using ScopeReader.Commands.Tables;
using ScopeReader.Files.Plans;
using ScopeReader.Readings;

namespace ScopeReader.Commands.Archive;

/// <summary><c>archive find</c>: entries by what is known of them.</summary>
internal static class FindVerb
{
    private const int UsualLimit = 100;

    public static Command Create(Surroundings surroundings)
    {
        var filters = new ArchiveFilters();
        Option<string?> archive = ArchiveCommand.Path(), limit = PlanOptions.Value("--limit", "N", "show so many, the latest; 100");
        Option<bool> json = PlanOptions.Flag("--json", "one JSON document"), csv = PlanOptions.Flag("--csv", "CSV, a row an entry");
        var command = new Command("find", "find entries by subject, date, text, verdict, readings or conditions");
        filters.AddTo(command);
        command.Add(limit, json, csv, archive);
        command.SetAction((parsed, cancellation) =>
        {
            ArchiveQuery query = filters.Read(parsed, ArchiveFilters.Limit(parsed.GetValue(limit), UsualLimit));
            if (parsed.GetValue(json) && parsed.GetValue(csv))
                throw new UsageException("--json and --csv are two forms of the output; keep one of them");
            return ArchiveCommand.Run(surroundings, () =>
            {
                using MeasurementArchive opened = MeasurementArchive.OpenToRead(ArchiveCommand.PathOf(parsed, archive));
                Found found = opened.Find(parsed.GetValue(json) ? query : query with { Quantities = QuantitiesOf(query) });
                foreach (string name in found.UnknownNames)
                    surroundings.Error.WriteLine(SafeText.Of($"\"{name}\" is neither a quantity nor a condition of any entry; {NearestWord.Hint(name, [.. Quantities.All.Select(q => q.Id)])}"));
                if (parsed.GetValue(json))
                    surroundings.Output.Write(ArchiveDocuments.Of(found) + "\n");
                else if (parsed.GetValue(csv))
                    Csv(found, QuantitiesOf(query), surroundings.Output);
                else
                    Table(found, query, surroundings);
                return ExitStatus.Passed;
            }, cancellation);
        });
        return command;
    }

    // A table shows the readings that were asked about.
    private static string[] QuantitiesOf(ArchiveQuery query) => [.. query.Where.Where(w => w.IsQuantity).Select(w => w.Name).Distinct()];

    private static void Csv(Found found, string[] quantities, TextWriter output)
    {
        var table = new SpreadsheetCsv(output);
        table.Row(["id", "subject", "serial", "file", "capturedAt", "addedAt", "outcome", "tags", "conditions", "sha256", .. quantities.SelectMany(q => (string[])[q, q + " unit", q + " expandedUncertainty"])]);
        foreach (FoundEntry e in found.Entries)
        {
            table.Number(e.Number).Text(e.Subject).Text(e.Serial).Text(e.File).Text(e.CapturedAt.ToString("O", CultureInfo.InvariantCulture)).Text(e.AddedAt.ToString("O", CultureInfo.InvariantCulture))
                .Text(e.Outcome).Text(string.Join(' ', e.Tags)).Text(ArchiveCommand.Text(e.Conditions)).Text(e.Sha256);
            foreach (FoundReading? r in quantities.Select(q => e.Readings.FirstOrDefault(r => r.Quantity == q)))
                table.Number(r?.Value).Text(r?.Unit).Number(r?.ExpandedUncertainty);
            table.End();
        }
    }

    private static void Table(Found found, ArchiveQuery query, Surroundings to)
    {
        var sheet = new Sheet(to.Width(), to.Colour);
        string[] quantities = QuantitiesOf(query);
        if (found.Entries.Count > 0)
            sheet.Columns([["entry", "captured", "outcome", .. quantities, "subject, file"], .. found.Entries.Select(e => Row(e, quantities))]);
        sheet.Line(found.Matches > found.Entries.Count
            ? string.Create(CultureInfo.InvariantCulture, $"{found.Entries.Count} of {found.Matches} entries, the latest captures; --limit shows more")
            : string.Create(CultureInfo.InvariantCulture, $"{found.Matches} {(found.Matches == 1 ? "entry" : "entries")}"));
        to.Output.Write(sheet.ToString());
    }

    private static string[] Row(FoundEntry entry, string[] quantities) =>
    [
        entry.Number.ToString(CultureInfo.InvariantCulture), ArchiveCommand.Day(entry.CapturedAt), entry.Outcome,
        .. quantities.Select(q => entry.Readings.FirstOrDefault(r => r.Quantity == q) is { } r ? Sheet.Joined(Engineering.Format(r.Value, r.ExpandedUncertainty, r.Unit)) : ""),
        SafeText.Of(string.Join(", ", ((string?[])[entry.Subject, entry.Serial, entry.File]).OfType<string>())),
    ];
}
