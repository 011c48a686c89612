using Microsoft.Data.Sqlite;
using ScopeReader.Archive.Contents;

namespace ScopeReader.Archive.Storage;

/// <summary>The tables that searches use: each entry as its records leave it.</summary>
internal sealed class SearchTables(Database database)
{
    private const string Main = "entry", Tag = "tag", Condition = "condition", Reading = "reading", Text = "entry_text";

    // One insert and one select a table, their values in the same order.
    private static readonly Dictionary<string, (string Insert, string Select)> Statements = new(StringComparer.Ordinal)
    {
        [Main] = (
            """
            INSERT INTO entry (number, capture, file, subject, serial, operator, instrument, captured_at, added_at, outcome)
            VALUES (@1, (SELECT id FROM capture WHERE sha256 = @2), @3, @4, @5, @6, @7, @8, @9, @10)
            ON CONFLICT (number) DO UPDATE SET subject = excluded.subject, serial = excluded.serial, operator = excluded.operator,
                instrument = excluded.instrument, captured_at = excluded.captured_at, outcome = excluded.outcome
            """,
            "SELECT e.number, c.sha256, e.file, e.subject, e.serial, e.operator, e.instrument, e.captured_at, e.added_at, e.outcome FROM entry e JOIN capture c ON c.id = e.capture WHERE e.number = @1"),
        [Tag] = ("INSERT INTO tag (entry, tag) VALUES (@1, @2)", "SELECT entry, tag FROM tag WHERE entry = @1"),
        [Condition] = ("INSERT INTO condition (entry, name, value, unit) VALUES (@1, @2, @3, @4)", "SELECT entry, name, value, unit FROM condition WHERE entry = @1"),
        [Reading] = (
            """
            INSERT INTO reading (entry, quantity, channel, segment, value, unit, expanded, repeatability, method)
            VALUES (@1, (SELECT id FROM quantity WHERE name = @2), @3, @4, @5, @6, @7, @8, @9)
            """,
            "SELECT r.entry, q.name, r.channel, r.segment, r.value, r.unit, r.expanded, r.repeatability, r.method FROM reading r JOIN quantity q ON q.id = r.quantity WHERE r.entry = @1"),
        [Text] = (
            "INSERT INTO entry_text (rowid, subject, serial, operator, instrument, notes, tags, file, findings) VALUES (@1, @2, @3, @4, @5, @6, @7, @8, @9)",
            "SELECT rowid, subject, serial, operator, instrument, notes, tags, file, findings FROM entry_text WHERE rowid = @1"),
    };

    private readonly HashSet<string> _quantities = new(StringComparer.Ordinal);

    /// <summary>Writes an entry's rows, replacing those it had.</summary>
    public void Write(Entry entry)
    {
        if (entry.History.Count > 1)
            Erase(entry.Number);
        foreach ((string table, object?[] values) in RowsOf(entry))
        {
            if (table == Reading && _quantities.Add((string)values[1]!))
                database.Run("INSERT OR IGNORE INTO quantity (name) VALUES (@1)", values[1]);
            database.Run(Statements[table].Insert, values);
        }
    }

    /// <summary>True where the tables say of an entry what its records say.</summary>
    public bool Agree(Entry entry)
    {
        HashSet<string> expected = [.. RowsOf(entry).Select(r => Line(r.Table, r.Values))], found = [];
        foreach ((string table, (_, string select)) in Statements)
        {
            using SqliteDataReader row = database.Rows(select, entry.Number);
            while (row.Read())
            {
                var values = new object?[row.FieldCount];
                for (int i = 0; i < values.Length; i++)
                    values[i] = row.IsDBNull(i) ? null : row.GetValue(i);
                found.Add(Line(table, values));
            }
        }
        return expected.SetEquals(found);
    }

    /// <summary>Forgets what a rolled-back transaction may have undone.</summary>
    public void Forget() => _quantities.Clear();

    private void Erase(int entry)
    {
        database.Run("DELETE FROM tag WHERE entry = @1", entry);
        database.Run("DELETE FROM condition WHERE entry = @1", entry);
        database.Run("DELETE FROM reading WHERE entry = @1", entry);
        database.Run("DELETE FROM entry_text WHERE rowid = @1", entry);
    }

    private static IEnumerable<(string Table, object?[] Values)> RowsOf(Entry entry)
    {
        long number = entry.Number;
        EntryDetails d = entry.Details;
        yield return (Main, [number, Convert.FromHexString(entry.Sha256), entry.File, d.Subject, d.Serial, d.Operator, d.Instrument,
            LedgerRecord.Stamp(entry.CapturedAt), LedgerRecord.Stamp(entry.AddedAt), entry.Measurement.Outcome]);
        foreach (string tag in d.Tags.Distinct(StringComparer.OrdinalIgnoreCase))
            yield return (Tag, [number, tag]);
        foreach ((string name, Condition condition) in d.Conditions)
            yield return (Condition, [number, name, condition.Value, condition.Unit]);

        // A channel that two readings of one quantity call primary keeps the first, as everywhere.
        var taken = new HashSet<(string, string, int)>();
        foreach (ChannelContent channel in entry.Measurement.Channels)
            foreach (ReadingContent r in channel.Readings)
                if (r.Primary && taken.Add((r.Quantity, channel.Name, channel.Segment)))
                    yield return (Reading, [number, r.Quantity, channel.Name, (long)channel.Segment, r.Value, r.Unit, r.ExpandedUncertainty, r.Repeatability, r.Method]);

        yield return (Text, [number, d.Subject, d.Serial, d.Operator, d.Instrument, d.Notes, string.Join(' ', d.Tags), entry.File,
            string.Join(' ', entry.Measurement.Channels.SelectMany(c => c.Findings).Select(f => f.Text))]);
    }

    private static string Line(string table, object?[] values) => table + "\0" + string.Join('\0', values.Select(v => v switch
    {
        null => "\u2205",
        byte[] bytes => LedgerRecord.Hex(bytes),
        double real => BitConverter.DoubleToInt64Bits(real + 0.0).ToString("x", System.Globalization.CultureInfo.InvariantCulture),
        _ => Convert.ToString(v, System.Globalization.CultureInfo.InvariantCulture),
    }));
}
