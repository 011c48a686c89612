using System.Globalization;
using System.Security.Cryptography;
using ScopeReader.Archive.Exchange;
using ScopeReader.Archive.Packing;
using ScopeReader.Archive.Storage;

namespace ScopeReader.Archive;

public sealed partial class MeasurementArchive
{
    private const int RecordsATransaction = 500;

    /// <summary>Makes a new archive of an export: the same records, and so the same head hash. Every hash is checked on the way.</summary>
    /// <param name="folder">What <see cref="Export"/> wrote.</param>
    /// <param name="path">The new archive: no file may be there.</param>
    /// <param name="progress">Told the share done, 0 to 1; may be null.</param>
    /// <param name="cancellation">Stops the work; then no archive is left.</param>
    /// <returns>The head hash.</returns>
    /// <exception cref="ArchiveException">There is an archive already, or the export is incomplete or changed.</exception>
    public static string Import(string folder, string path, IProgress<double>? progress = null, CancellationToken cancellation = default)
    {
        ArgumentException.ThrowIfNullOrEmpty(folder);
        ArgumentException.ThrowIfNullOrEmpty(path);
        if (File.Exists(path))
            throw new ArchiveException(path, "exists already; an import makes a new archive; give another path with --archive");
        if (!File.Exists(System.IO.Path.Combine(folder, ExportFolder.Chain)))
            throw new ArchiveException(folder, $"not a complete export: it has no {ExportFolder.Chain}");
        string part = path + ".part";
        return Guard(path, () =>
        {
            try
            {
                Remove(part);
                string head;
                using (MeasurementArchive archive = Open(part))
                    head = GuardFiles(folder, () => archive.ReadExport(folder, progress, cancellation));
                File.Move(part, path);
                return head;
            }
            finally
            {
                Remove(part);
            }
        });
    }

    private static void Remove(string path)
    {
        foreach (string file in (string[])[path, path + "-wal", path + "-shm"])
            File.Delete(file);
    }

    private string ReadExport(string folder, IProgress<double>? progress, CancellationToken cancellation)
    {
        string[] lines = File.ReadAllLines(System.IO.Path.Combine(folder, ExportFolder.Chain));
        if (lines.Length == 0 || lines[0] != ExportFolder.ChainHeader)
            throw Changed(folder, 1, "the header is another");
        Dictionary<string, string> captures = Directory.EnumerateFiles(System.IO.Path.Combine(folder, ExportFolder.Captures))
            .GroupBy(f => System.IO.Path.GetFileName(f).Split('.')[0]).ToDictionary(g => g.Key, g => g.First());
        string previous = LedgerRecord.NoHash;
        for (int i = 1; i < lines.Length; i += RecordsATransaction)
        {
            int first = i, end = Math.Min(lines.Length, i + RecordsATransaction);
            previous = _database.Write(() =>
            {
                string hash = previous;
                for (int line = first; line < end; line++)
                {
                    cancellation.ThrowIfCancellationRequested();
                    hash = ReadRecord(folder, line + 1, lines[line], hash, captures);
                }
                return hash;
            });
            progress?.Report((double)(end - 1) / (lines.Length - 1));
        }
        return previous;
    }

    private string ReadRecord(string folder, int line, string text, string previous, Dictionary<string, string> captures)
    {
        string[] cells = text.Split(',');
        if (cells.Length != 7 || !long.TryParse(cells[0], NumberStyles.None, CultureInfo.InvariantCulture, out long number)
            || !int.TryParse(cells[2], NumberStyles.None, CultureInfo.InvariantCulture, out int entry) || number != line - 1)
            throw Changed(folder, line, $"expected record {line - 1} in 7 cells, found \"{text}\"");
        var record = new LedgerRecord(number, cells[1], entry, cells[3], cells[4], cells[5]);
        string file = System.IO.Path.Combine(folder, ExportFolder.RecordFile(number));
        byte[] content = File.Exists(file) ? File.ReadAllBytes(file) : throw Changed(folder, line, $"{ExportFolder.RecordFile(number)} is missing");
        if (LedgerRecord.HashOf(content) != record.ContentSha256)
            throw Changed(folder, line, $"{ExportFolder.RecordFile(number)} does not have the hash that this line states");
        if (record.Hash(previous) != cells[6])
            throw Changed(folder, line, "the record's hash does not chain to the line before");
        if (record.Capture.Length > 0)
            ReadCapture(folder, line, record.Capture, captures);
        _ledger.Append(record, cells[6], ContentPacker.Pack(content));
        Entry? before = record.Kind == LedgerRecord.EntryKind ? null : Load(entry, upTo: number);
        _tables.Write(EntryFolder.Apply(before, record, cells[6], content));
        return cells[6];
    }

    private void ReadCapture(string folder, int line, string sha256, Dictionary<string, string> captures)
    {
        byte[] hash = Convert.FromHexString(sha256);
        if (_ledger.HasCapture(hash))
            return;
        if (!captures.TryGetValue(sha256, out string? file))
            throw Changed(folder, line, $"{ExportFolder.Captures} holds no file with this hash");
        byte[] bytes = File.ReadAllBytes(file);
        if (!SHA256.HashData(bytes).AsSpan().SequenceEqual(hash))
            throw Changed(folder, line, $"the bytes of {System.IO.Path.GetFileName(file)} do not have the hash that names them");
        _ledger.AddCapture(hash, bytes.Length, CapturePacker.Pack(bytes));
    }

    private static ArchiveException Changed(string folder, int line, string what) =>
        new(System.IO.Path.Combine(folder, ExportFolder.Chain), $"line {line}: {what}; the export was changed or is incomplete; no archive was made");
}
