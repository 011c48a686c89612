using System.Text;
using Tomlyn;
using Tomlyn.Parsing;
using Tomlyn.Syntax;

namespace ScopeReader.Files.Plans;

/// <summary>A plan's text as tables of keys, each with its place.</summary>
/// <remarks>The places make it possible to change a value and leave comments and layout as they are.</remarks>
internal sealed class PlanDocument
{
    /// <summary>Name of the keys above the first table.</summary>
    public const string Top = "";

    private readonly List<PlanSection> _sections = [];

    private PlanDocument(string text, string file, DocumentSyntax syntax) => (Text, File, Syntax) = (text, file, syntax);

    public string Text { get; }

    public string File { get; }

    /// <summary>The text's own tree, for what changes it in place.</summary>
    public DocumentSyntax Syntax { get; }

    /// <summary>The tables in the file's order; the keys above the first table come first.</summary>
    public IReadOnlyList<PlanSection> Sections => _sections;

    /// <exception cref="PlanException">The text is not TOML.</exception>
    public static PlanDocument Parse(string text, string file)
    {
        DocumentSyntax syntax = Read(text, file);
        if (syntax.HasErrors)
        {
            DiagnosticMessage first = syntax.Diagnostics.Where(d => d.Kind == DiagnosticMessageKind.Error).MinBy(d => d.Span.Start.Offset)!;
            throw new PlanException(file, first.Span.Start.Line + 1, $"not readable as TOML: {Decapitalised(first.Message)}");
        }
        var document = new PlanDocument(text, file, syntax);
        var top = new PlanSection(Top, IsList: false, Line: 1);
        document._sections.Add(top);
        foreach (KeyValueSyntax pair in syntax.KeyValues)
            document.AddTop(top, pair);
        foreach (TableSyntaxBase table in syntax.Tables)
        {
            var section = new PlanSection(Name(table.Name!), table is TableArraySyntax, Line(table), table.CloseBracket!.Span.End.Offset + 1);
            document._sections.Add(section);
            foreach (KeyValueSyntax pair in table.Items)
                section.Add(Name(pair.Key!), document.Value(Name(pair.Key!), pair));
        }
        return document;
    }

    private static DocumentSyntax Read(string text, string file)
    {
        try
        {
            return SyntaxParser.Parse(text, file, validate: true);
        }
        catch (ArgumentOutOfRangeException)
        {
            // The parser's lexer trips over an escape that stands for no character, and does not say where: the first may be it.
            throw new PlanException(file, text.AsSpan(0, Math.Max(0, text.IndexOf('\\'))).Count('\n') + 1, "not readable as TOML: a text in it has a backslash that begins no escape; write \\\\ for a backslash");
        }
        catch (TomlException)
        {
            throw new PlanException(file, null, "not readable as TOML: its lists and tables are nested deeper than any plan's");
        }
    }

    // "chain.impedance = …", "chain = { … }" and "limit = [{ … }]" are the same tables, written on one line.
    private void AddTop(PlanSection top, KeyValueSyntax pair)
    {
        string[] names = [.. Names(pair.Key!)];
        if (names.Length == 2)
            Inline(names[0], isList: false, Line(pair)).Add(names[1], Value(names[1], pair));
        else if (names.Length == 1 && pair.Value is InlineTableSyntax table)
            AddInline(names[0], isList: false, table);
        else if (names.Length == 1 && pair.Value is ArraySyntax array && array.Items.ChildrenCount > 0 && array.Items.All(i => i.Value is InlineTableSyntax))
            foreach (ArrayItemSyntax item in array.Items)
                AddInline(names[0], isList: true, (InlineTableSyntax)item.Value!);
        else
            top.Add(Name(pair.Key!), Value(Name(pair.Key!), pair));
    }

    private void AddInline(string name, bool isList, InlineTableSyntax table)
    {
        PlanSection section = Inline(name, isList, Line(table));
        foreach (InlineTableItemSyntax item in table.Items)
            section.Add(Name(item.KeyValue!.Key!), Value(Name(item.KeyValue.Key!), item.KeyValue));
    }

    private PlanSection Inline(string name, bool isList, int line)
    {
        var section = new PlanSection(name, isList, line);
        _sections.Add(section);
        return section;
    }

    private PlanValue Value(string key, KeyValueSyntax pair) => new(this, key, Line(pair), pair.Value!);

    private static int Line(SyntaxNodeBase node) => node.Span.Start.Line + 1;

    private static string Name(KeySyntax key) => string.Join('.', Names(key));

    private static IEnumerable<string> Names(KeySyntax key)
    {
        yield return Word(key.Key!);
        foreach (DottedKeyItemSyntax more in key.DotKeys)
            yield return Word(more.Key!);
    }

    private static string Word(BareKeyOrStringValueSyntax key) =>
        key is StringValueSyntax quoted ? quoted.Value ?? "" : ((BareKeySyntax)key).Key?.Text ?? "";

    private static string Decapitalised(string message) => new StringBuilder(message) { [0] = char.ToLowerInvariant(message[0]) }.ToString();
}

/// <summary>One table of a plan.</summary>
internal sealed record PlanSection(string Name, bool IsList, int Line, int NameEnd = 0)
{
    private readonly List<(string Key, PlanValue Value)> _entries = [];

    public IReadOnlyList<(string Key, PlanValue Value)> Entries => _entries;

    public void Add(string key, PlanValue value) => _entries.Add((key, value));
}
