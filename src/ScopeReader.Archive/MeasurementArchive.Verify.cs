using Microsoft.Data.Sqlite;
using ScopeReader.Archive.Storage;

namespace ScopeReader.Archive;

public sealed partial class MeasurementArchive
{
    /// <summary>Checks every link of the chain, every hash, and that searches see what the records say.</summary>
    /// <param name="keptHead">A head hash that was kept elsewhere; null where there is none, and then a chain that somebody wrote anew from its start cannot be told.</param>
    /// <param name="progress">Told the share done, 0 to 1; may be null.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <exception cref="ArchiveException">The file cannot be read at all, or <paramref name="keptHead"/> is no hash.</exception>
    public Verification Verify(string? keptHead = null, IProgress<double>? progress = null, CancellationToken cancellation = default)
    {
        if (keptHead is not null && (keptHead.Length != 64 || !keptHead.All(char.IsAsciiHexDigit)))
            throw new ArchiveException(Path, $"expected a head hash of 64 hexadecimal digits, found \"{keptHead}\"");
        return Guard(() =>
        {
            try
            {
                return _database.Read(() => new Verifier(_database, _ledger, _tables, progress, cancellation).Run(keptHead?.ToLowerInvariant()));
            }
            catch (SqliteException fault) when (fault.SqliteErrorCode is Corrupt)
            {
                return new Verification { Records = 0, Captures = 0, Head = LedgerRecord.NoHash, Damages = [new Damage("the file", "the pages that say what is where are damaged: nothing can be read")] };
            }
        });
    }

    private const int Corrupt = 11;

    private sealed class Verifier(Database database, Ledger ledger, SearchTables tables, IProgress<double>? progress, CancellationToken cancellation)
    {
        private readonly List<Damage> _damages = [];

        public Verification Run(string? keptHead)
        {
            Try("the file", () =>
            {
                using SqliteDataReader row = database.Rows("PRAGMA integrity_check(20)");
                while (row.Read())
                    if (row.GetString(0) is not "ok" and string problem)
                        _damages.Add(new Damage("the file", problem));
            });
            (long records, string head, int entries) = Chain();
            long captures = Captures();
            SearchTablesFit(entries);

            long? at = null;
            if (keptHead is not null && keptHead != LedgerRecord.NoHash)
            {
                Try("the records", () => at = ledger.Find(keptHead));
                if (at is null)
                    _damages.Add(new Damage("the chain", "no record has the head hash that you kept: the chain was written anew, cut short, or is another archive's"));
            }
            return new Verification { Records = records, Captures = captures, Head = head, Damages = _damages, KeptHeadIsRecord = at };
        }

        private (long Records, string Head, int Entries) Chain()
        {
            long last = 0;
            int entries = 0;
            string previous = LedgerRecord.NoHash;
            Try("the records", () => last = database.Number("SELECT max(number) FROM record"));
            for (long number = 1; number <= last; number++)
            {
                Step(0.4 * number / last);
                StoredRecord? stored = null;
                Try($"record {number}", () => stored = ledger.Record(number));
                if (stored is null)
                {
                    if (_damages.Count == 0 || _damages[^1].Where != $"record {number}")
                        _damages.Add(new Damage($"record {number}", "is missing"));
                    continue;
                }
                LedgerRecord record = stored.Record;
                string where = $"record {number} (entry {record.Entry})";
                Try(where, () =>
                {
                    if (LedgerRecord.HashOf(stored.Content) != record.ContentSha256)
                        throw new InvalidDataException("its content does not have the hash that was recorded");
                });
                if (record.Hash(previous) != stored.Hash)
                    _damages.Add(new Damage(where, "its hash does not chain to the record before: one of the two was changed, removed or put in"));
                if (record.Kind == LedgerRecord.EntryKind && (record.Entry != ++entries || record.Capture.Length == 0))
                    _damages.Add(new Damage(where, "is not the entry that comes next, or has no capture"));
                previous = stored.Hash;
            }
            return (last, previous, entries);
        }

        private long Captures()
        {
            var ids = new List<long>();
            Try("the captures", () =>
            {
                using SqliteDataReader row = database.Rows("SELECT id FROM capture ORDER BY id");
                while (row.Read())
                    ids.Add(row.GetInt64(0));
            });
            for (int i = 0; i < ids.Count; i++)
            {
                Step(0.4 + 0.4 * i / ids.Count);
                string where = $"capture {ids[i]}";
                Try(where, () =>
                {
                    where = Name(ids[i]);
                    using SqliteDataReader row = database.Rows("SELECT sha256, length, packed FROM capture WHERE id = @1", ids[i]);
                    row.Read();
                    byte[] bytes = Packing.CapturePacker.Unpack(row.GetFieldValue<byte[]>(2));
                    if (bytes.Length != row.GetInt64(1) || LedgerRecord.HashOf(bytes) != LedgerRecord.Hex(row.GetFieldValue<byte[]>(0)))
                        throw new InvalidDataException("its bytes do not have the hash that was recorded");
                }, () => where);
            }
            return ids.Count;
        }

        private string Name(long capture)
        {
            var entries = new List<string>();
            using SqliteDataReader row = database.Rows("SELECT number, file FROM entry WHERE capture = @1 ORDER BY number", capture);
            while (row.Read())
                entries.Add($"entry {row.GetInt64(0)}, {row.GetString(1)}");
            return entries.Count == 0 ? $"capture {capture} (no entry has it)" : $"capture {capture} ({string.Join("; ", entries)})";
        }

        private void SearchTablesFit(int entries)
        {
            if (_damages.Count > 0)
                return; // Damage to what they are made from comes first.
            for (int number = 1; number <= entries; number++)
            {
                Step(0.8 + 0.2 * number / entries);
                Try($"entry {number}", () =>
                {
                    if (EntryFolder.Fold(ledger.OfEntry(number)) is not { } entry || !tables.Agree(entry))
                        throw new InvalidDataException("the search tables do not say what its records say; export the archive and import it to make them anew");
                });
            }
            if (database.Number("SELECT count(*) FROM entry") != entries)
                _damages.Add(new Damage("the search tables", "hold entries that no record makes"));
        }

        private void Step(double share)
        {
            cancellation.ThrowIfCancellationRequested();
            progress?.Report(share);
        }

        // One damaged page must not hide what else is damaged.
        private void Try(string where, Action check, Func<string>? name = null)
        {
            try
            {
                check();
            }
            catch (InvalidDataException fault)
            {
                _damages.Add(new Damage(name?.Invoke() ?? where, fault.Message));
            }
            catch (SqliteException fault) when (fault.SqliteErrorCode is Corrupt)
            {
                _damages.Add(new Damage(name?.Invoke() ?? where, $"cannot be read ({fault.Message.TrimEnd('.')})"));
            }
        }
    }
}
