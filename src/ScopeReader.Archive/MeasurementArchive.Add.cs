using System.Runtime.ExceptionServices;
using System.Security.Cryptography;
using System.Text.Json;
using ScopeReader.Archive.Contents;
using ScopeReader.Archive.Packing;
using ScopeReader.Archive.Storage;

namespace ScopeReader.Archive;

public sealed partial class MeasurementArchive
{
    /// <summary>The most entries that one transaction takes.</summary>
    public const int LargestBatch = 100;

    /// <summary>Adds a measured capture. When this returns, it is on the disk.</summary>
    /// <exception cref="ArchiveException">Nothing was written.</exception>
    public Added Add(NewEntry entry) => Add([entry])[0];

    /// <summary>Adds measured captures, all or none. When this returns, they are on the disk.</summary>
    /// <param name="entries">At most <see cref="LargestBatch"/>.</param>
    /// <exception cref="ArchiveException">Nothing was written.</exception>
    public IReadOnlyList<Added> Add(IReadOnlyList<NewEntry> entries) => Add(Prepare(entries));

    /// <summary>Adds what <c>Prepare</c> made ready.</summary>
    /// <exception cref="ArchiveException">Nothing was written.</exception>
    public IReadOnlyList<Added> Add(PreparedEntries prepared)
    {
        ArgumentNullException.ThrowIfNull(prepared);
        return Guard(() => _database.Write(() => (IReadOnlyList<Added>)[.. prepared.Entries.Select(Write)]));
    }

    /// <summary>Does the work of adding that needs no archive: hashing, compressing. Any thread may do it; it uses all cores.</summary>
    /// <param name="entries">At most <see cref="LargestBatch"/>.</param>
    /// <exception cref="ArgumentException">Too many, or a measurement of other bytes.</exception>
    public static PreparedEntries Prepare(IReadOnlyList<NewEntry> entries)
    {
        ArgumentNullException.ThrowIfNull(entries);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(entries.Count, LargestBatch);
        var prepared = new PreparedEntry[entries.Count];
        try
        {
            Parallel.For(0, prepared.Length, i => prepared[i] = Prepare(entries[i]));
        }
        catch (AggregateException faults)
        {
            ExceptionDispatchInfo.Throw(faults.InnerExceptions[0]);
        }
        return new PreparedEntries(prepared);
    }

    private static PreparedEntry Prepare(NewEntry entry)
    {
        byte[] sha256 = SHA256.HashData(entry.Bytes.Span);
        string hash = LedgerRecord.Hex(sha256);
        if (entry.Measurement.Capture.Sha256 != hash)
            throw new ArgumentException($"{entry.File}: the file changed after it was measured; measure it again", nameof(entry));
        EntryDetails details = entry.Details with { Tags = [.. entry.Details.Tags.Distinct().Order(StringComparer.Ordinal)] };
        var content = new EntryContent
        {
            By = entry.By,
            File = System.IO.Path.GetFileName(entry.File),
            Sha256 = hash,
            Bytes = entry.Bytes.Length,
            CapturedAt = entry.CapturedAt,
            CapturedAtSource = entry.CapturedAtIsGiven ? "given" : "file",
            Details = details,
            Measurement = ContentMaker.From(entry.Measurement, entry.Context),
        };
        byte[] json = JsonSerializer.SerializeToUtf8Bytes(content, ArchiveJson.Readable.EntryContent);
        return new PreparedEntry(sha256, entry.Bytes.Length, CapturePacker.Pack(entry.Bytes.Span), content, json, ContentPacker.Pack(json), entry.Again);
    }

    private Added Write(PreparedEntry prepared)
    {
        if (_ledger.HasCapture(prepared.Sha256))
        {
            if (!prepared.Again && EntryOf(prepared.Sha256) is { } kept)
                return kept;
        }
        else
        {
            _ledger.AddCapture(prepared.Sha256, prepared.Length, prepared.Packed);
        }
        (LedgerRecord record, string hash) = Append(LedgerRecord.EntryKind, _ledger.LastEntry() + 1, LedgerRecord.Hex(prepared.Sha256), prepared.Json, prepared.PackedJson);
        Entry entry = EntryFolder.Begin(prepared.Content, record, hash);
        _tables.Write(entry);
        return new Added(entry.Number, true, entry.AddedAt);
    }

    private Added? EntryOf(byte[] sha256)
    {
        using var row = _database.Rows("SELECT e.number, e.added_at FROM entry e JOIN capture c ON c.id = e.capture WHERE c.sha256 = @1 ORDER BY e.number LIMIT 1", sha256);
        return row.Read() ? new Added(row.GetInt32(0), false, LedgerRecord.ParseStamp(row.GetString(1))) : null;
    }

    // Writes a record that concerns an entry and what searches need of it. Inside a write transaction only.
    private Entry Append(string kind, Entry before, byte[] json)
    {
        (LedgerRecord record, string hash) = Append(kind, before.Number, "", json, ContentPacker.Pack(json));
        Entry entry = EntryFolder.Apply(before, record, hash, json);
        _tables.Write(entry);
        return entry;
    }

    private (LedgerRecord Record, string Hash) Append(string kind, int number, string capture, byte[] json, byte[] packedJson)
    {
        (long last, string previous) = _ledger.Head();
        var record = new LedgerRecord(last + 1, kind, number, LedgerRecord.Stamp(_clock.GetUtcNow()), capture, LedgerRecord.HashOf(json));
        string hash = record.Hash(previous);
        _ledger.Append(record, hash, packedJson);
        return (record, hash);
    }
}
