using Microsoft.Data.Sqlite;

namespace ScopeReader.Archive.Storage;

/// <summary>The records, in order, each chained to the one before; and the captures' bytes.</summary>
internal sealed class Ledger(Database database)
{
    private const string Columns = "SELECT r.number, r.kind, r.entry, r.at, c.sha256, r.content_sha256, r.hash, r.content FROM record r LEFT JOIN capture c ON c.id = r.capture ";

    /// <summary>Number and hash of the last record; 0 and <see cref="LedgerRecord.NoHash"/> where there is none.</summary>
    public (long Number, string Hash) Head()
    {
        using SqliteDataReader row = database.Rows("SELECT number, hash FROM record ORDER BY number DESC LIMIT 1");
        return row.Read() ? (row.GetInt64(0), LedgerRecord.Hex(row.GetFieldValue<byte[]>(1))) : (0, LedgerRecord.NoHash);
    }

    public int LastEntry() => (int)database.Number("SELECT max(number) FROM entry");

    /// <summary>Writes the next record.</summary>
    /// <param name="record">Its number is one more than the head's.</param>
    /// <param name="hash">Its hash.</param>
    /// <param name="packed">Its content, compressed.</param>
    public void Append(LedgerRecord record, string hash, byte[] packed) => database.Run(
        "INSERT INTO record (number, kind, entry, at, capture, content_sha256, hash, content) VALUES (@1, @2, @3, @4, (SELECT id FROM capture WHERE sha256 = @5), @6, @7, @8)",
        record.Number, record.Kind, record.Entry, record.At, record.Capture.Length == 0 ? null : Convert.FromHexString(record.Capture),
        Convert.FromHexString(record.ContentSha256), Convert.FromHexString(hash), packed);

    public StoredRecord? Record(long number)
    {
        using SqliteDataReader row = database.Rows(Columns + "WHERE r.number = @1", number);
        return row.Read() ? Read(row) : null;
    }

    public long? Find(string hash) => database.Value("SELECT number FROM record WHERE hash = @1", Convert.FromHexString(hash)) as long?;

    /// <summary>The records of an entry, oldest first.</summary>
    public List<StoredRecord> OfEntry(int entry)
    {
        var records = new List<StoredRecord>();
        using SqliteDataReader row = database.Rows(Columns + "WHERE r.entry = @1 ORDER BY r.number", entry);
        while (row.Read())
            records.Add(Read(row));
        return records;
    }

    public void AddCapture(byte[] sha256, long length, byte[] packed) =>
        database.Run("INSERT INTO capture (sha256, length, packed) VALUES (@1, @2, @3)", sha256, length, packed);

    public bool HasCapture(byte[] sha256) => database.Value("SELECT 1 FROM capture WHERE sha256 = @1", sha256) is not null;

    /// <summary>The packed bytes of a capture, or null.</summary>
    public byte[]? Capture(byte[] sha256) => database.Value("SELECT packed FROM capture WHERE sha256 = @1", sha256) as byte[];

    private static StoredRecord Read(SqliteDataReader row) => new(
        new LedgerRecord(row.GetInt64(0), row.GetString(1), row.GetInt32(2), row.GetString(3),
            row.IsDBNull(4) ? "" : LedgerRecord.Hex(row.GetFieldValue<byte[]>(4)), LedgerRecord.Hex(row.GetFieldValue<byte[]>(5))),
        LedgerRecord.Hex(row.GetFieldValue<byte[]>(6)), row.GetFieldValue<byte[]>(7));
}
