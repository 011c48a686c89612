using System.Text;
using Tomlyn.Syntax;

namespace ScopeReader.Files.Plans;

/// <summary>Changes keys of a plan in place: comments, order and layout stay as the person wrote them.</summary>
public static class PlanEditor
{
    /// <summary>Sets keys of [chain].</summary>
    /// <param name="text">The plan, TOML.</param>
    /// <param name="file">Its name in messages.</param>
    /// <param name="values">Keys and their values in TOML, in the order in which new ones are added.</param>
    /// <returns>The changed text, which was read as a plan again.</returns>
    /// <exception cref="PlanException">The plan is wrong, or writes its chain in a way that cannot be added to.</exception>
    public static string SetInChain(string text, string file, params ReadOnlySpan<(string Key, string Value)> values)
    {
        ArgumentNullException.ThrowIfNull(text);
        PlanReader.Parse(text, file);
        DocumentSyntax syntax = PlanDocument.Parse(text, file).Syntax;
        if (syntax.KeyValues.FirstOrDefault(p => p.Key!.ToString().Trim().Split('.')[0] == PlanKeyList.Chain) is { } inline)
            throw new PlanException(file, inline.Span.Start.Line + 1, "the chain is written on one line; write it as a table, [chain], so that keys can be added to it");
        string newLine = text.Contains("\r\n", StringComparison.Ordinal) ? "\r\n" : "\n";
        var edits = new List<(int Start, int End, string With)>();
        var added = new StringBuilder();
        TableSyntaxBase? chain = syntax.Tables.FirstOrDefault(t => t is TableSyntax && t.Name!.ToString().Trim() == PlanKeyList.Chain);
        foreach ((string key, string value) in values)
        {
            if (chain?.Items.FirstOrDefault(p => p.Key!.ToString().Trim().Trim('"', '\'') == key)?.Value is { } old)
                edits.Add((old.Span.Start.Offset, old.Span.End.Offset + 1, value));
            else
                added.Append(key).Append(" = ").Append(value).Append(newLine);
        }
        if (added.Length > 0)
            edits.Add(Addition(text, syntax, chain, added.ToString(), newLine));
        var changed = new StringBuilder(text);
        foreach ((int start, int end, string with) in edits.OrderByDescending(e => e.Start))
            changed.Remove(start, end - start).Insert(start, with);
        PlanReader.Parse(changed.ToString(), file);
        return changed.ToString();
    }

    // New keys go behind the last of the chain's; a new table in front of the first other one.
    private static (int Start, int End, string With) Addition(string text, DocumentSyntax syntax, TableSyntaxBase? chain, string lines, string newLine)
    {
        if (chain is not null)
        {
            int last = chain.Items.LastOrDefault()?.Span.End.Offset ?? chain.Name!.Span.End.Offset, at = LineEnd(text, last);
            return (at, at, (at == 0 || text[at - 1] == '\n' ? "" : newLine) + lines);
        }
        string table = "[" + PlanKeyList.Chain + "]" + newLine + lines;
        if (syntax.Tables.FirstOrDefault() is { } first)
        {
            int start = first.Span.Start.Offset;
            return (start, start, table + newLine);
        }
        return (text.Length, text.Length, (text.Length == 0 || text[^1] == '\n' ? "" : newLine) + (text.Length == 0 ? "" : newLine) + table);
    }

    // Behind the line's end, so that a comment stays with its key.
    private static int LineEnd(string text, int offset)
    {
        int end = text.IndexOf('\n', Math.Min(offset, Math.Max(0, text.Length - 1)));
        return end < 0 ? text.Length : end + 1;
    }
}
