using System.Globalization;
using System.Text;
using ScopeReader.Archive.Contents;
using ScopeReader.Archive.Exchange;
using ScopeReader.Archive.Storage;

namespace ScopeReader.Archive;

public sealed partial class MeasurementArchive
{
    /// <summary>Writes the whole archive as files that need no program: JSON, CSV and the captures.</summary>
    /// <param name="folder">A folder that is empty or does not exist.</param>
    /// <param name="progress">Told the share done, 0 to 1; may be null.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>The head hash.</returns>
    /// <exception cref="ArchiveException">The folder is not empty, cannot be written, or the archive is damaged.</exception>
    public string Export(string folder, IProgress<double>? progress = null, CancellationToken cancellation = default)
    {
        ArgumentException.ThrowIfNullOrEmpty(folder);
        if (File.Exists(folder) || (Directory.Exists(folder) && Directory.EnumerateFileSystemEntries(folder).Any()))
            throw new ArchiveException(folder, "is not empty; an export overwrites nothing; give another folder");
        return Guard(() => _database.Read(() => GuardFiles(folder, () => WriteExport(folder, progress, cancellation))));
    }

    private string WriteExport(string folder, IProgress<double>? progress, CancellationToken cancellation)
    {
        Directory.CreateDirectory(System.IO.Path.Combine(folder, ExportFolder.Records));
        Directory.CreateDirectory(System.IO.Path.Combine(folder, ExportFolder.Captures));
        File.WriteAllText(System.IO.Path.Combine(folder, ExportFolder.Explanation), ExportFolder.ExplanationText);

        (long last, string head) = _ledger.Head();
        // Written under another name until it is complete: a folder without it is no export.
        string chain = System.IO.Path.Combine(folder, ExportFolder.Chain), part = chain + ".part";
        using (var lines = new StreamWriter(part, false, new UTF8Encoding(false)) { NewLine = "\n" })
        {
            lines.WriteLine(ExportFolder.ChainHeader);
            for (long number = 1; number <= last; number++)
            {
                cancellation.ThrowIfCancellationRequested();
                StoredRecord stored = _ledger.Record(number) ?? throw new ArchiveException(Path, $"record {number} is missing; run archive verify");
                LedgerRecord r = stored.Record;
                File.WriteAllBytes(System.IO.Path.Combine(folder, ExportFolder.RecordFile(number)), Content(stored));
                lines.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{r.Number},{r.Kind},{r.Entry},{r.At},{r.Capture},{r.ContentSha256},{stored.Hash}"));
                progress?.Report((double)number / last);
            }
        }
        WriteTables(folder, cancellation);
        File.Move(part, chain);
        return head;
    }

    private byte[] Content(StoredRecord stored)
    {
        try
        {
            return stored.Content;
        }
        catch (InvalidDataException fault)
        {
            throw new ArchiveException(Path, $"record {stored.Record.Number} is damaged: {fault.Message}; run archive verify", fault);
        }
    }

    private void WriteTables(string folder, CancellationToken cancellation)
    {
        using var entryFile = new StreamWriter(System.IO.Path.Combine(folder, ExportFolder.Entries), false, new UTF8Encoding(false));
        using var readingFile = new StreamWriter(System.IO.Path.Combine(folder, ExportFolder.Readings), false, new UTF8Encoding(false));
        var entries = new SpreadsheetCsv(entryFile);
        var readings = new SpreadsheetCsv(readingFile);
        entries.Row("entry", "file", "sha256", "bytes", "subject", "serial", "operator", "instrument", "calibrationDue", "capturedAt", "addedAt", "outcome", "tags", "conditions", "notes", "records");
        readings.Row("entry", "file", "channel", "segment", "quantity", "value", "unit", "standardUncertainty", "expandedUncertainty", "coverage", "method", "primary", "program");
        int last = _ledger.LastEntry();
        for (int number = 1; number <= last; number++)
        {
            cancellation.ThrowIfCancellationRequested();
            Entry entry = Load(number);
            string file = System.IO.Path.Combine(folder, ExportFolder.CaptureFile(entry.Sha256, entry.File));
            if (!File.Exists(file))
                File.WriteAllBytes(file, Bytes(entry.Sha256, $"the capture of entry {number}"));
            EntryDetails d = entry.Details;
            entries.Number(number).Text(entry.File).Text(entry.Sha256).Number(entry.Bytes).Text(d.Subject).Text(d.Serial).Text(d.Operator).Text(d.Instrument).Text(Text(d.CalibrationDue))
                .Text(LedgerRecord.Stamp(entry.CapturedAt)).Text(LedgerRecord.Stamp(entry.AddedAt)).Text(entry.Measurement.Outcome).Text(string.Join(' ', d.Tags))
                .Text(string.Join("; ", d.Conditions.Select(c => $"{c.Key} {ConditionText.Format(c.Value)}"))).Text(d.Notes).Number(entry.History.Count).End();
            foreach (ChannelContent channel in entry.Measurement.Channels)
                foreach (ReadingContent r in channel.Readings)
                    readings.Number(number).Text(entry.File).Text(channel.Name).Number(channel.Segment).Text(r.Quantity).Number(r.Value).Text(r.Unit).Number(r.StandardUncertainty)
                        .Number(r.ExpandedUncertainty).Number(r.Coverage).Text(r.Method).Text(r.Primary ? "yes" : "no").Text(entry.Measurement.Program).End();
        }
    }
}
