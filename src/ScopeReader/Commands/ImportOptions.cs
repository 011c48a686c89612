using System.CommandLine;
using System.Globalization;
using ScopeReader.Files.Plans;

namespace ScopeReader.Commands;

/// <summary>The options that say how captures are read. Each is a key of a plan's [import] table, and is read as that is.</summary>
internal sealed class ImportOptions
{
    private readonly Option<string?>[] _options =
    [
        PlanOptions.Value("--interval", "TIME", "sample interval, such as 2ns, where the file states none"),
        PlanOptions.Value("--rate", "FREQUENCY", "samples a second, such as 500MHz, in place of --interval"),
        PlanOptions.Value("--delimiter", "WORD", "between columns: comma, semicolon, tab, space or bar"),
        PlanOptions.Value("--decimal", "WORD", "the decimal mark: point or comma"),
        PlanOptions.Value("--first-line", "N", "number of the first line of data"),
        PlanOptions.Value("--columns", "LIST", "what each column is: time, frequency, skip or a channel's name, such as time,CH1,skip"),
        PlanOptions.Value("--units", "LIST", "unit of each column, such as ms,mV"),
        PlanOptions.Value("--factor", "NUMBER", "multiplies the values, where the file left that out"),
        PlanOptions.Value("--encoding", "WORD", "the text: utf-8, utf-16, utf-16be or latin-1"),
        PlanOptions.Value("--segment", "N", "read this segment alone"),
    ];

    public void AddTo(Command command)
    {
        foreach (Option option in _options)
            command.Options.Add(option);
    }

    /// <summary>What the command line says about its files.</summary>
    /// <exception cref="UsageException">An option's value is wrong.</exception>
    public ImportTable Read(ParseResult parsed)
    {
        if (parsed.GetValue(_options[0]) is not null && parsed.GetValue(_options[1]) is not null)
            throw new UsageException("--interval and --rate say the same thing; keep one of them");
        Option<string?>[] given = [.. _options.Where(o => parsed.GetValue(o) is not null)];
        string text = "[import]\n" + string.Concat(given.Select(o => $"{KeyOf(o)} = {Toml(o.HelpName!, parsed.GetValue(o)!)}\n"));
        try
        {
            return ImportTable.Parse(text, "");
        }
        catch (PlanException e)
        {
            // Each option has a line of its own under the table's name.
            Option<string?> wrong = given[e.Line is { } line ? Math.Clamp(line - 2, 0, given.Length - 1) : 0];
            string key = KeyOf(wrong) + ": ";
            throw new UsageException($"{wrong.Name}: {(e.Problem.StartsWith(key, StringComparison.Ordinal) ? e.Problem[key.Length..] : e.Problem)}");
        }
    }

    private static string KeyOf(Option option) => option.Name[2..];

    private static string Toml(string kind, string value) => kind switch
    {
        "LIST" => ImportEntry.List(value.Split(',', StringSplitOptions.TrimEntries)),
        "N" when int.TryParse(value, NumberStyles.None, CultureInfo.InvariantCulture, out int number) => number.ToString(CultureInfo.InvariantCulture),
        _ => ImportEntry.Quoted(value),
    };
}
