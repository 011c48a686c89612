using System.Globalization;
using System.Text;
using ScopeReader.Archive.Storage;

namespace ScopeReader.Archive.Search;

/// <summary>A query as SQL: texts of this program's own, and parameters for everything a person wrote.</summary>
internal sealed class Selection
{
    private readonly StringBuilder _where = new();
    private readonly List<object?> _values = [];

    public Selection(ArchiveQuery query)
    {
        Like("e.subject", query.Subject);
        Like("e.serial", query.Serial);
        foreach (string tag in query.Tags)
            And($"e.number IN (SELECT entry FROM tag WHERE tag = {Value(tag)})");
        if (query.Since is { } since)
            And($"e.captured_at >= {Value(LedgerRecord.Stamp(since))}");
        if (query.Until is { } until)
            And($"e.captured_at < {Value(LedgerRecord.Stamp(until))}");
        if (query.Outcome is { } outcome)
            And($"e.outcome = {Value(outcome)}");
        if (Phrases(query.Text) is { Length: > 0 } phrases)
            And($"e.number IN (SELECT rowid FROM entry_text WHERE entry_text MATCH {Value(phrases)})");
        foreach (Comparison comparison in query.Where)
            And(Bound(comparison));
        if (query.Entries.Count > 0)
            And($"e.number IN (SELECT value FROM json_each({Value("[" + string.Join(',', query.Entries.Select(n => n.ToString(CultureInfo.InvariantCulture))) + "]")}))");
        string limit = Value(Math.Max(0, query.Limit));
        Sql = $"""
            SELECT e.number, e.subject, e.serial, e.file, e.captured_at, e.added_at, e.outcome, c.sha256, count(*) OVER ()
            FROM entry e JOIN capture c ON c.id = e.capture {_where}
            ORDER BY e.captured_at DESC, e.number DESC LIMIT {limit}
            """;
    }

    public string Sql { get; }

    public object?[] Values => [.. _values];

    private string Bound(Comparison comparison)
    {
        string source = comparison.IsQuantity
            ? $"SELECT entry FROM reading WHERE quantity = (SELECT id FROM quantity WHERE name = {Value(comparison.Name)})"
            : $"SELECT entry FROM condition WHERE name = {Value(comparison.Name)}";
        string unit = $" AND unit = {Value(comparison.Unit)}";
        // The operator is one of five texts of Comparison's own. Equal means to twelve digits: prefixes spoil the last bit.
        double slack = 1e-12 * Math.Abs(comparison.Value);
        string bound = comparison.Operator == "="
            ? $" AND {(comparison.IsMagnitude ? "abs(value)" : "value")} BETWEEN {Value(comparison.Value - slack)} AND {Value(comparison.Value + slack)}"
            : comparison.IsMagnitude
            ? comparison.Operator is ">" or ">="
                ? $" AND (value {comparison.Operator} {Value(comparison.Value)} OR value {Mirrored(comparison.Operator)} {Value(-comparison.Value)})"
                : $" AND abs(value) {comparison.Operator} {Value(comparison.Value)}"
            : $" AND value {comparison.Operator} {Value(comparison.Value)}";
        return $"e.number IN ({source}{unit}{bound})";
    }

    private static string Mirrored(string sign) => sign == ">" ? "<" : "<=";

    private void Like(string column, string? pattern)
    {
        if (pattern is null)
            return;
        if (!pattern.Contains('*', StringComparison.Ordinal))
            And($"{column} = {Value(pattern)}");
        else
            And($"{column} LIKE {Value(Escaped(pattern))} ESCAPE '!'");
    }

    private static string Escaped(string pattern) => pattern.Replace("!", "!!", StringComparison.Ordinal).Replace("%", "!%", StringComparison.Ordinal)
        .Replace("_", "!_", StringComparison.Ordinal).Replace('*', '%');

    // Each word as a phrase: nothing that a person writes is an operator of the full-text search.
    private static string Phrases(string? text) => string.Join(' ', (text ?? "").Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries)
        .Select(word => (Word: word.TrimEnd('*'), IsPrefix: word.EndsWith('*')))
        .Where(w => w.Word.Any(char.IsLetterOrDigit))
        .Select(w => $"\"{w.Word.Replace("\"", "\"\"", StringComparison.Ordinal)}\"{(w.IsPrefix ? "*" : "")}"));

    private void And(string condition) => _where.Append(_where.Length == 0 ? "WHERE " : " AND ").Append(condition);

    private string Value(object value)
    {
        _values.Add(value);
        return string.Create(CultureInfo.InvariantCulture, $"?{_values.Count}");
    }
}
