using Microsoft.Data.Sqlite;
using ScopeReader.Archive.Search;
using ScopeReader.Archive.Storage;

namespace ScopeReader.Archive;

public sealed partial class MeasurementArchive
{
    private const string ReadingRows =
        "SELECT q.name, r.channel, r.segment, r.value, r.unit, r.expanded, r.repeatability, r.method FROM reading r JOIN quantity q ON q.id = r.quantity WHERE r.entry = ?1 ";

    /// <summary>Finds entries.</summary>
    /// <exception cref="ArchiveException">The archive cannot be read.</exception>
    public Found Find(ArchiveQuery query)
    {
        ArgumentNullException.ThrowIfNull(query);
        return Guard(() => _database.Read(() =>
        {
            var selection = new Selection(query);
            var entries = new List<FoundEntry>();
            long matches = 0;
            using (SqliteDataReader row = _database.RowsOnce(selection.Sql, selection.Values))
                while (row.Read())
                {
                    matches = row.GetInt64(8);
                    entries.Add(new FoundEntry
                    {
                        Number = row.GetInt32(0),
                        Subject = row.IsDBNull(1) ? null : row.GetString(1),
                        Serial = row.IsDBNull(2) ? null : row.GetString(2),
                        File = row.GetString(3),
                        CapturedAt = LedgerRecord.ParseStamp(row.GetString(4)),
                        AddedAt = LedgerRecord.ParseStamp(row.GetString(5)),
                        Outcome = row.GetString(6),
                        Sha256 = LedgerRecord.Hex(row.GetFieldValue<byte[]>(7)),
                        Tags = [],
                        Conditions = new Dictionary<string, Condition>(),
                        Readings = [],
                    });
                }
            for (int i = 0; i < entries.Count; i++)
                entries[i] = entries[i] with { Tags = TagsOf(entries[i].Number), Conditions = ConditionsOf(entries[i].Number), Readings = ReadingsOf(entries[i].Number, query.Quantities) };
            return new Found(matches, entries, Doubts(query));
        }));
    }

    private List<string> TagsOf(int entry)
    {
        var tags = new List<string>();
        using SqliteDataReader row = _database.Rows("SELECT tag FROM tag WHERE entry = ?1 ORDER BY tag", entry);
        while (row.Read())
            tags.Add(row.GetString(0));
        return tags;
    }

    private SortedDictionary<string, Condition> ConditionsOf(int entry)
    {
        var conditions = new SortedDictionary<string, Condition>(StringComparer.Ordinal);
        using SqliteDataReader row = _database.Rows("SELECT name, value, unit FROM condition WHERE entry = ?1", entry);
        while (row.Read())
            conditions.Add(row.GetString(0), new Condition(row.GetDouble(1), row.GetString(2)));
        return conditions;
    }

    private List<FoundReading> ReadingsOf(int entry, IReadOnlyList<string>? quantities) => quantities is null
        ? ReadingsOf(ReadingRows + "ORDER BY r.channel, r.segment, r.quantity", entry)
        : [.. quantities.SelectMany(q => ReadingsOf(ReadingRows + "AND q.name = ?2 ORDER BY r.channel, r.segment", entry, q))];

    private List<FoundReading> ReadingsOf(string sql, params ReadOnlySpan<object?> values)
    {
        var readings = new List<FoundReading>();
        using SqliteDataReader row = _database.Rows(sql, values);
        while (row.Read())
            readings.Add(new FoundReading(row.GetString(0), row.GetString(1), row.GetInt32(2), row.GetDouble(3), row.GetString(4), row.GetDouble(5), row.GetDouble(6), row.GetString(7)));
        return readings;
    }

    // A name that nothing has finds nothing, which looks like an answer.
    private List<string> Doubts(ArchiveQuery query) =>
    [
        .. query.Where.Where(w => !w.IsQuantity && _database.Value("SELECT 1 FROM condition WHERE name = ?1", w.Name) is null)
            .Select(w => $"\"{w.Name}\" is neither a quantity nor a condition of any entry"),
    ];
}
