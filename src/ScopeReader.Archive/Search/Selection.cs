using System.Globalization;
using ScopeReader.Archive.Storage;

namespace ScopeReader.Archive.Search;

/// <summary>A query as SQL: texts of this program's own, and parameters for everything a person wrote.</summary>
/// <remarks>
/// Entries are gone through from the condition that fewest meet; each other condition either is looked up entry by entry or, where
/// few meet it too, is a list to be in. SQLite itself cannot know which: it has no statistics of ranges.
/// </remarks>
internal sealed class Selection
{
    // Counting further would take as long as going through them.
    private const int MostCounted = 20_000;

    // A look-up costs as much as so many steps along an index.
    private const int StepsALookup = 8;

    private readonly List<string> _own = [];
    private readonly List<Condition> _conditions = [];
    private readonly List<object?> _values = [];
    private readonly int _limit;

    public Selection(ArchiveQuery query)
    {
        Like("e.subject", query.Subject);
        Like("e.serial", query.Serial);
        if (query.Since is { } since)
            _own.Add($"e.captured_at >= {Value(LedgerRecord.Stamp(since))}");
        if (query.Until is { } until)
            _own.Add($"e.captured_at < {Value(LedgerRecord.Stamp(until))}");
        if (query.Outcome is { } outcome)
            _own.Add($"e.outcome = {Value(outcome)}");
        foreach (string tag in query.Tags)
        {
            string test = $"tag = {Value(tag)}";
            _conditions.Add(new Condition("tag", "entry", test, test));
        }
        if (Phrases(query.Text) is { Length: > 0 } phrases)
            _conditions.Add(new Condition("entry_text", "rowid", $"entry_text MATCH {Value(phrases)}", null));
        foreach (Comparison comparison in query.Where)
            _conditions.Add(Bound(comparison));
        if (query.Entries.Count > 0)
            _conditions.Add(new Condition($"json_each({Value("[" + string.Join(',', query.Entries.Select(n => n.ToString(CultureInfo.InvariantCulture))) + "]")})", "value", "1", null));
        _limit = Math.Max(0, query.Limit);
    }

    public object?[] Values => [.. _values];

    /// <summary>The numbers of the entries, latest capture first, and how many there are in all.</summary>
    /// <param name="database">Counts how many entries meet each condition.</param>
    public string Sql(Database database)
    {
        // A pattern has to be looked for in every entry: anything else goes first.
        long own = _own.Count == 0 ? long.MaxValue : _own.Exists(o => o.Contains(" LIKE ", StringComparison.Ordinal)) ? MostCounted : Count(database, $"entry e WHERE {string.Join(" AND ", _own)}");
        (Condition Condition, long Count)[] others = [.. _conditions.Select(c => (c, Count(database, $"{c.Table} WHERE {c.Test}"))).OrderBy(c => c.Item2)];
        bool ownFirst = others.Length == 0 || own < others[0].Count;
        long first = ownFirst ? own : others[0].Count;
        IEnumerable<string> tests = others.Skip(ownFirst ? 0 : 1).Select(o => o.Condition.For(Number(ownFirst), o.Count < MostCounted && o.Count / StepsALookup < first)).Concat(_own);
        string from = ownFirst ? "entry e" : $"(SELECT DISTINCT {others[0].Condition.Key} AS number FROM {others[0].Condition.Table} WHERE {others[0].Condition.Test}) d CROSS JOIN entry e ON e.number = d.number";
        string where = string.Join(" AND ", tests);
        return $"""
            WITH m AS MATERIALIZED (SELECT e.number, e.captured_at FROM {from}{(where.Length > 0 ? " WHERE " : "")}{where})
            SELECT number, (SELECT count(*) FROM m) FROM m ORDER BY captured_at DESC, number DESC LIMIT {_limit.ToString(CultureInfo.InvariantCulture)}
            """;
    }

    private static string Number(bool ownFirst) => ownFirst ? "e.number" : "d.number";

    private long Count(Database database, string rows) =>
        database.NumberOnce($"SELECT count(*) FROM (SELECT 1 FROM {rows} LIMIT {MostCounted.ToString(CultureInfo.InvariantCulture)})", Values);

    private Condition Bound(Comparison comparison)
    {
        string source = comparison.IsQuantity ? $"quantity = (SELECT id FROM quantity WHERE name = {Value(comparison.Name)})" : $"name = {Value(comparison.Name)}";
        // The operator is one of five texts of Comparison's own. Equal means to twelve digits: prefixes spoil the last bit.
        double slack = 1e-12 * Math.Abs(comparison.Value);
        string bound = (comparison.Operator, comparison.IsMagnitude) switch
        {
            ("=", _) => $"{(comparison.IsMagnitude ? "abs(value)" : "value")} BETWEEN {Value(comparison.Value - slack)} AND {Value(comparison.Value + slack)}",
            (">" or ">=", true) => $"(value {comparison.Operator} {Value(comparison.Value)} OR value {Mirrored(comparison.Operator)} {Value(-comparison.Value)})",
            (_, true) => $"abs(value) {comparison.Operator} {Value(comparison.Value)}",
            _ => $"value {comparison.Operator} {Value(comparison.Value)}",
        };
        string test = $"{source} AND unit = {Value(comparison.Unit)} AND {bound}";
        // A plus sign keeps the look-up of one entry off the index of all values.
        string lookUp = test.Replace("unit = ", "+unit = ", StringComparison.Ordinal).Replace("value ", "+value ", StringComparison.Ordinal);
        return new Condition(comparison.IsQuantity ? "reading" : "condition", "entry", test, lookUp);
    }

    private static string Mirrored(string sign) => sign == ">" ? "<" : "<=";

    private void Like(string column, string? pattern)
    {
        if (pattern is null)
            return;
        if (!pattern.Contains('*', StringComparison.Ordinal))
            _own.Add($"{column} = {Value(pattern)}");
        else
            _own.Add($"{column} LIKE {Value(Escaped(pattern))} ESCAPE '!'");
    }

    private static string Escaped(string pattern) => pattern.Replace("!", "!!", StringComparison.Ordinal).Replace("%", "!%", StringComparison.Ordinal)
        .Replace("_", "!_", StringComparison.Ordinal).Replace('*', '%');

    // Each word as a phrase: nothing that a person writes is an operator of the full-text search.
    private static string Phrases(string? text) => string.Join(' ', (text ?? "").Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries)
        .Select(word => (Word: word.TrimEnd('*'), IsPrefix: word.EndsWith('*')))
        .Where(w => w.Word.Any(char.IsLetterOrDigit))
        .Select(w => $"\"{w.Word.Replace("\"", "\"\"", StringComparison.Ordinal)}\"{(w.IsPrefix ? "*" : "")}"));

    private string Value(object value)
    {
        _values.Add(value);
        return string.Create(CultureInfo.InvariantCulture, $"@{_values.Count}");
    }

    // Rows of another table that name the entries: the test for all of them, and for one, where that is quick.
    private sealed record Condition(string Table, string Key, string Test, string? LookUp)
    {
        public string For(string number, bool isList) => isList || LookUp is null
            ? $"{number} IN (SELECT {Key} FROM {Table} WHERE {Test})"
            : $"EXISTS (SELECT 1 FROM {Table} WHERE {Key} = {number} AND {LookUp})";
    }
}
