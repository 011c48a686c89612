using System.Globalization;
using ScopeReader.Captures;

namespace ScopeReader.Files.Plans;

/// <summary>An [import] table without a plan round it: a folder's memory, or what a command line says about its files.</summary>
/// <param name="Settings">What it says.</param>
/// <param name="Entries">Its keys with their values as written, in the text's order.</param>
public sealed record ImportTable(ImportSettings Settings, IReadOnlyList<ImportEntry> Entries)
{
    /// <summary>A table that says nothing.</summary>
    public static ImportTable Empty { get; } = new(ImportSettings.Automatic, []);

    /// <summary>Reads a text that holds an [import] table and nothing else.</summary>
    /// <param name="text">TOML.</param>
    /// <param name="file">Its name in messages.</param>
    /// <exception cref="PlanException">The text is no TOML, holds another table, or says something that [import] cannot say.</exception>
    public static ImportTable Parse(string text, string file)
    {
        ArgumentNullException.ThrowIfNull(text);
        ArgumentNullException.ThrowIfNull(file);
        Plan plan = Plan.Empty;
        var entries = new List<ImportEntry>();
        foreach (PlanSection section in PlanDocument.Parse(text, file).Sections.Where(s => s.Name != PlanDocument.Top || s.Entries.Count > 0))
        {
            if (section.Name != PlanKeyList.Import || section.IsList)
                throw new PlanException(file, section.Name == PlanDocument.Top ? section.Entries[0].Value.Line : section.Line, $"expected nothing but [import], found {Found(section)}");
            foreach ((string key, PlanValue value) in section.Entries)
            {
                PlanKey known = PlanKeyList.Find(PlanKeyList.Import, key) ?? throw value.Unknown("key", key, PlanKeyList.NamesIn(PlanKeyList.Import));
                plan = known.Apply!(plan, value);
                entries.Add(new ImportEntry(key, value.Written, value.Said));
            }
        }
        return new ImportTable(plan.Import, entries);
    }

    /// <summary>Settings as an [import] table's text; null where they say nothing.</summary>
    public static string? TextOf(ImportSettings settings)
    {
        ArgumentNullException.ThrowIfNull(settings);
        var lines = new List<string>();
        Add("delimiter", settings.Delimiter is { } delimiter ? ImportEntry.Quoted(delimiter.ToString()) : null);
        Add("decimal", settings.DecimalMark is { } mark ? ImportEntry.Quoted(mark.ToString()) : null);
        Add("first-line", settings.FirstLine?.ToString(CultureInfo.InvariantCulture));
        Add("encoding", settings.Encoding is { } encoding ? ImportEntry.Quoted(encoding) : null);
        Add("interval", settings.Interval is { } interval ? ImportEntry.Quoted(interval.ToString("R", CultureInfo.InvariantCulture) + " s") : null);
        Add("columns", settings.Columns is { } columns ? ImportEntry.List(columns) : null);
        Add("units", settings.Units is { } units ? ImportEntry.List(units) : null);
        Add("segment", settings.Segment?.ToString(CultureInfo.InvariantCulture));
        Add("factor", settings.Factor is { } factor ? ImportEntry.Quoted(factor.ToString("R", CultureInfo.InvariantCulture)) : null);
        return lines.Count == 0 ? null : $"[{PlanKeyList.Import}]\n{string.Join('\n', lines)}\n";

        void Add(string key, string? value)
        {
            if (value is not null)
                lines.Add($"{key} = {value}");
        }
    }

    private static string Found(PlanSection section) => section.Name == PlanDocument.Top ? $"{section.Entries[0].Key} above it" : section.IsList ? $"[[{section.Name}]]" : $"[{section.Name}]";
}
