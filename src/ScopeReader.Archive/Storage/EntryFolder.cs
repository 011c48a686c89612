using System.Globalization;
using System.Text.Json;
using ScopeReader.Archive.Contents;

namespace ScopeReader.Archive.Storage;

/// <summary>Works an entry's records, oldest first, into the entry as it stands.</summary>
internal static class EntryFolder
{
    public const string CapturedAt = "captured-at", CalibrationDue = "calibration-due", Tag = "tag", ConditionPrefix = "condition ";

    /// <exception cref="InvalidDataException">A record does not unpack or does not read.</exception>
    public static Entry? Fold(IEnumerable<StoredRecord> records)
    {
        Entry? entry = null;
        foreach (StoredRecord stored in records)
            entry = Apply(entry, stored.Record, stored.Hash, stored.Content);
        return entry;
    }

    /// <summary>The entry after one more record.</summary>
    public static Entry Apply(Entry? entry, LedgerRecord record, string hash, byte[] content)
    {
        try
        {
            DateTimeOffset at = LedgerRecord.ParseStamp(record.At);
            switch (record.Kind)
            {
                case LedgerRecord.EntryKind:
                    return Begin(JsonSerializer.Deserialize(content, ArchiveJson.Readable.EntryContent)!, record, hash);
                case LedgerRecord.AmendmentKind:
                    AmendmentContent amendment = JsonSerializer.Deserialize(content, ArchiveJson.Readable.AmendmentContent)!;
                    return Amended(Existing(entry, record), amendment.Changes) with
                    {
                        History = [.. entry!.History, new EntryEvent(record.Number, record.Kind, at, amendment.By, amendment.Reason, hash, amendment.Changes, null)],
                    };
                case LedgerRecord.MeasurementKind:
                    RemeasurementContent again = JsonSerializer.Deserialize(content, ArchiveJson.Readable.RemeasurementContent)!;
                    return Existing(entry, record) with
                    {
                        Measurement = again.Measurement,
                        History = [.. entry!.History, new EntryEvent(record.Number, record.Kind, at, again.By, again.Reason, hash, [], again.Measurement)],
                    };
                default:
                    throw new InvalidDataException($"record {record.Number} is of an unknown kind");
            }
        }
        catch (Exception fault) when (fault is JsonException or FormatException or NotSupportedException)
        {
            throw new InvalidDataException(string.Create(CultureInfo.InvariantCulture, $"record {record.Number} does not read ({fault.Message})"), fault);
        }
    }

    /// <summary>The entry after its first record.</summary>
    public static Entry Begin(EntryContent content, LedgerRecord record, string hash) => new()
    {
        Number = record.Entry,
        File = content.File,
        Sha256 = content.Sha256,
        Bytes = content.Bytes,
        CapturedAt = content.CapturedAt,
        CapturedAtSource = content.CapturedAtSource,
        AddedAt = LedgerRecord.ParseStamp(record.At),
        Details = content.Details,
        Measurement = content.Measurement,
        History = [new EntryEvent(record.Number, record.Kind, LedgerRecord.ParseStamp(record.At), content.By, "", hash, [], content.Measurement)],
    };

    private static Entry Existing(Entry? entry, LedgerRecord record) =>
        entry ?? throw new InvalidDataException(string.Create(CultureInfo.InvariantCulture, $"record {record.Number} concerns entry {record.Entry}, which no record makes"));

    private static Entry Amended(Entry entry, IReadOnlyList<Change> changes)
    {
        foreach (Change change in changes)
            entry = change.Field == CapturedAt
                ? entry with { CapturedAt = LedgerRecord.ParseStamp(change.To!), CapturedAtSource = "given" }
                : entry with { Details = Amended(entry.Details, change) };
        return entry;
    }

    private static EntryDetails Amended(EntryDetails details, Change change) => change.Field switch
    {
        "subject" => details with { Subject = change.To },
        "serial" => details with { Serial = change.To },
        "operator" => details with { Operator = change.To },
        "instrument" => details with { Instrument = change.To },
        "notes" => details with { Notes = change.To },
        CalibrationDue => details with { CalibrationDue = change.To is null ? null : DateOnly.ParseExact(change.To, "yyyy-MM-dd", CultureInfo.InvariantCulture) },
        Tag => details with { Tags = [.. details.Tags.Where(t => t != change.From).Concat(change.To is null ? [] : [change.To]).Distinct().Order(StringComparer.Ordinal)] },
        _ when change.Field.StartsWith(ConditionPrefix, StringComparison.Ordinal) => details with { Conditions = Amended(details.Conditions, change) },
        _ => throw new InvalidDataException($"an amendment of an unknown field, {change.Field}"),
    };

    private static SortedDictionary<string, Condition> Amended(IReadOnlyDictionary<string, Condition> conditions, Change change)
    {
        var amended = new SortedDictionary<string, Condition>(conditions.ToDictionary(), StringComparer.Ordinal);
        string name = change.Field[ConditionPrefix.Length..];
        if (change.To is null)
            amended.Remove(name);
        else
            amended[name] = ConditionText.Parse(change.To);
        return amended;
    }
}
