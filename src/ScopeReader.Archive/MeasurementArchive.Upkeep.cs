using Microsoft.Data.Sqlite;

namespace ScopeReader.Archive;

public sealed partial class MeasurementArchive
{
    /// <summary>Copies the archive while it may be in use.</summary>
    /// <param name="target">A file that does not exist yet.</param>
    /// <returns>The copy's head hash.</returns>
    /// <exception cref="ArchiveException">The target exists or cannot be written.</exception>
    public string Backup(string target)
    {
        ArgumentException.ThrowIfNullOrEmpty(target);
        if (File.Exists(target))
            throw new ArchiveException(target, "exists already; a backup overwrites nothing; give another name");
        string part = target + ".part";
        return Guard(target, () =>
        {
            File.Delete(part);
            using (var copy = new SqliteConnection(new SqliteConnectionStringBuilder { DataSource = part, Pooling = false }.ToString()))
            {
                copy.Open();
                _database.Connection.BackupDatabase(copy);
            }
            File.Move(part, target);
            using MeasurementArchive made = OpenToRead(target);
            return made.Head;
        });
    }

    /// <summary>What the archive holds.</summary>
    public ArchiveStats Stats() => Guard(() => _database.Read(() =>
    {
        (long records, string head) = _ledger.Head();
        var outcomes = new SortedDictionary<string, long>(StringComparer.Ordinal);
        using (SqliteDataReader row = _database.Rows("SELECT outcome, count(*) FROM entry GROUP BY outcome"))
            while (row.Read())
                outcomes.Add(row.GetString(0), row.GetInt64(1));
        return new ArchiveStats
        {
            Path = Path,
            Schema = (int)_database.Number("PRAGMA user_version"),
            Entries = _database.Number("SELECT count(*) FROM entry"),
            Records = records,
            Captures = _database.Number("SELECT count(*) FROM capture"),
            Subjects = _database.Number("SELECT count(DISTINCT subject) FROM entry"),
            CaptureBytes = _database.Number("SELECT sum(length) FROM capture"),
            PackedBytes = _database.Number("SELECT sum(length(packed)) FROM capture"),
            FileBytes = _database.Number("PRAGMA page_count") * _database.Number("PRAGMA page_size"),
            FirstCapturedAt = _database.Value("SELECT min(captured_at) FROM entry") as string,
            LastCapturedAt = _database.Value("SELECT max(captured_at) FROM entry") as string,
            Outcomes = outcomes,
            Head = head,
        };
    }));
}
