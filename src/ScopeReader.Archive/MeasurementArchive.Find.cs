using System.Globalization;
using Microsoft.Data.Sqlite;
using ScopeReader.Archive.Search;
using ScopeReader.Archive.Storage;

namespace ScopeReader.Archive;

public sealed partial class MeasurementArchive
{
    private const string Listed = "IN (SELECT value FROM json_each(@1))";

    /// <summary>Finds entries.</summary>
    /// <exception cref="ArchiveException">The archive cannot be read.</exception>
    public Found Find(ArchiveQuery query)
    {
        ArgumentNullException.ThrowIfNull(query);
        return Guard(() => _database.Read(() =>
        {
            var selection = new Selection(query);
            var numbers = new List<int>();
            long matches = 0;
            using (SqliteDataReader row = _database.RowsOnce(selection.Sql(_database), selection.Values))
                while (row.Read())
                {
                    numbers.Add(row.GetInt32(0));
                    matches = row.GetInt64(1);
                }
            return new Found(matches, Summaries(numbers, query.Quantities), UnknownNames(query));
        }));
    }

    // In the order of the numbers; a query for all of them costs less than one for each.
    private FoundEntry[] Summaries(List<int> numbers, IReadOnlyList<string>? quantities)
    {
        string list = JsonList(numbers.Select(n => n.ToString(CultureInfo.InvariantCulture)));
        ILookup<int, string> tags = Rows($"SELECT entry, tag FROM tag WHERE entry {Listed} ORDER BY entry, tag", r => r.GetString(1), list);
        ILookup<int, (string Name, Condition Value)> conditions = Rows($"SELECT entry, name, value, unit FROM condition WHERE entry {Listed}",
            r => (r.GetString(1), new Condition(r.GetDouble(2), r.GetString(3))), list);
        ILookup<int, FoundReading> readings = ReadingsOf(list, quantities);
        Dictionary<int, FoundEntry> entries = Rows($"SELECT e.number, e.subject, e.serial, e.file, e.captured_at, e.added_at, e.outcome, c.sha256 FROM entry e JOIN capture c ON c.id = e.capture WHERE e.number {Listed}",
            r => new FoundEntry
            {
                Number = r.GetInt32(0),
                Subject = r.IsDBNull(1) ? null : r.GetString(1),
                Serial = r.IsDBNull(2) ? null : r.GetString(2),
                File = r.GetString(3),
                CapturedAt = LedgerRecord.ParseStamp(r.GetString(4)),
                AddedAt = LedgerRecord.ParseStamp(r.GetString(5)),
                Outcome = r.GetString(6),
                Sha256 = LedgerRecord.Hex(r.GetFieldValue<byte[]>(7)),
                Tags = [.. tags[r.GetInt32(0)]],
                Conditions = new SortedDictionary<string, Condition>(conditions[r.GetInt32(0)].ToDictionary(c => c.Name, c => c.Value), StringComparer.Ordinal),
                Readings = [.. readings[r.GetInt32(0)]],
            }, list).ToDictionary(e => e.Key, e => e.First());
        return [.. numbers.Select(n => entries[n])];
    }

    private ILookup<int, FoundReading> ReadingsOf(string list, IReadOnlyList<string>? quantities)
    {
        string chosen = quantities is null ? "" : "AND q.name IN (SELECT value FROM json_each(@2)) ";
        return Rows($"SELECT r.entry, q.name, r.channel, r.segment, r.value, r.unit, r.expanded, r.repeatability, r.method FROM reading r JOIN quantity q ON q.id = r.quantity WHERE r.entry {Listed} {chosen}ORDER BY r.entry, r.channel, r.segment, r.quantity",
            r => new FoundReading(r.GetString(1), r.GetString(2), r.GetInt32(3), r.GetDouble(4), r.GetString(5), r.GetDouble(6), r.GetDouble(7), r.GetString(8)),
            [list, .. quantities is null ? (string[])[] : [JsonList(quantities.Select(q => $"\"{q}\""))]]);
    }

    private ILookup<int, T> Rows<T>(string sql, Func<SqliteDataReader, T> make, params string[] values)
    {
        var rows = new List<(int Entry, T Value)>();
        using SqliteDataReader row = _database.Rows(sql, values);
        while (row.Read())
            rows.Add((row.GetInt32(0), make(row)));
        return rows.ToLookup(r => r.Entry, r => r.Value);
    }

    // Of numbers, or of identifiers that this program knows: neither has anything to escape.
    private static string JsonList(IEnumerable<string> items) => $"[{string.Join(',', items)}]";

    // A name that nothing has finds nothing, which looks like an answer.
    private List<string> UnknownNames(ArchiveQuery query) =>
        [.. query.Where.Where(w => !w.IsQuantity && _database.Value("SELECT 1 FROM condition WHERE name = @1", w.Name) is null).Select(w => w.Name)];
}
