using System.Globalization;
using System.Text.Json;
using ScopeReader.Archive.Contents;
using ScopeReader.Archive.Storage;

namespace ScopeReader.Archive;

public sealed partial class MeasurementArchive
{
    /// <summary>Fields that <see cref="Amend"/> knows, beside conditions (<c>condition supply</c>) and tags.</summary>
    public static IReadOnlyList<string> AmendableFields { get; } =
        ["subject", "serial", "operator", "instrument", EntryFolder.CalibrationDue, "notes", EntryFolder.CapturedAt, EntryFolder.Tag];

    /// <summary>Adds a correction beside what an entry states. Nothing is overwritten.</summary>
    /// <param name="number">The entry.</param>
    /// <param name="wanted">The changes; <see cref="Change.From"/> is filled in here, but for a tag to take away.</param>
    /// <param name="by">Who corrects.</param>
    /// <param name="reason">Why.</param>
    /// <returns>The entry as it stands then.</returns>
    /// <exception cref="ArchiveException">No such entry, a field or a value that does not read, or nothing that would change.</exception>
    public Entry Amend(int number, IReadOnlyList<Change> wanted, string by, string reason)
    {
        ArgumentNullException.ThrowIfNull(wanted);
        ArgumentException.ThrowIfNullOrWhiteSpace(by);
        ArgumentException.ThrowIfNullOrWhiteSpace(reason);
        return Guard(() => _database.Write(() =>
        {
            Entry before = Load(number);
            Change[] changes = [.. wanted.Select(c => Resolve(before, c)).Where(c => c.From != c.To)];
            if (changes.Length == 0)
                throw new ArchiveException(Path, $"entry {number} says so already; nothing was written");
            byte[] content = JsonSerializer.SerializeToUtf8Bytes(new AmendmentContent(by, reason, changes), ArchiveJson.Readable.AmendmentContent);
            return Append(LedgerRecord.AmendmentKind, before, content);
        }));
    }

    /// <summary>Adds a later measurement of an entry's capture beside those it has.</summary>
    /// <param name="number">The entry.</param>
    /// <param name="measurement">The measurement, of the same bytes.</param>
    /// <param name="context">What it came from.</param>
    /// <param name="by">Who measured.</param>
    /// <param name="reason">Why.</param>
    /// <exception cref="ArchiveException">No such entry, or a measurement of other bytes.</exception>
    public Entry Keep(int number, Measurement measurement, MeasurementContext context, string by, string reason)
    {
        ArgumentNullException.ThrowIfNull(measurement);
        ArgumentException.ThrowIfNullOrWhiteSpace(by);
        ArgumentException.ThrowIfNullOrWhiteSpace(reason);
        return Guard(() => _database.Write(() =>
        {
            Entry before = Load(number);
            if (before.Sha256 != measurement.Capture.Sha256)
                throw new ArchiveException(Path, $"the measurement is not of entry {number}'s capture; nothing was written");
            byte[] content = JsonSerializer.SerializeToUtf8Bytes(
                new RemeasurementContent(by, reason, ContentMaker.From(measurement, context)), ArchiveJson.Readable.RemeasurementContent);
            return Append(LedgerRecord.MeasurementKind, before, content);
        }));
    }

    private Change Resolve(Entry entry, Change wanted)
    {
        try
        {
            return wanted.Field switch
            {
                "subject" => wanted with { From = entry.Details.Subject },
                "serial" => wanted with { From = entry.Details.Serial },
                "operator" => wanted with { From = entry.Details.Operator },
                "instrument" => wanted with { From = entry.Details.Instrument },
                "notes" => wanted with { From = entry.Details.Notes },
                EntryFolder.CalibrationDue => new Change(wanted.Field, Text(entry.Details.CalibrationDue),
                    Text(wanted.To is null ? null : DateOnly.ParseExact(wanted.To, "yyyy-MM-dd", CultureInfo.InvariantCulture))),
                EntryFolder.CapturedAt => new Change(wanted.Field, LedgerRecord.Stamp(entry.CapturedAt), LedgerRecord.Stamp(LedgerRecord.ParseStamp(wanted.To!))),
                EntryFolder.Tag => ResolveTag(entry, wanted),
                _ when wanted.Field.StartsWith(EntryFolder.ConditionPrefix, StringComparison.Ordinal) => new Change(wanted.Field,
                    entry.Details.Conditions.TryGetValue(wanted.Field[EntryFolder.ConditionPrefix.Length..], out Condition? now) ? ConditionText.Format(now) : null,
                    wanted.To is null ? null : ConditionText.Format(ConditionText.Parse(wanted.To))),
                _ => throw new FormatException($"expected one of {string.Join(", ", AmendableFields)} or a condition, found \"{wanted.Field}\""),
            };
        }
        catch (Exception fault) when (fault is FormatException or ArgumentNullException)
        {
            throw new ArchiveException(Path, $"{wanted.Field} cannot become \"{wanted.To}\": {fault.Message}", fault);
        }
    }

    // A tag that is there is not added, and one that is not there is not taken away.
    private static Change ResolveTag(Entry entry, Change wanted) => wanted switch
    {
        { To: { } added } when entry.Details.Tags.Contains(added) => new Change(EntryFolder.Tag, added, added),
        { To: not null } => wanted with { From = null },
        { From: { } taken } when entry.Details.Tags.Contains(taken) => wanted,
        _ => new Change(EntryFolder.Tag, null, null),
    };

    private static string? Text(DateOnly? day) => day?.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture);
}
