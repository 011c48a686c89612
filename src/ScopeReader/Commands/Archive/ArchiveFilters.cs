using System.CommandLine;
using System.Globalization;
using ScopeReader.Archive.Search;

namespace ScopeReader.Commands.Archive;

/// <summary>The options that say which entries are meant.</summary>
internal sealed class ArchiveFilters
{
    private static readonly string[] Outcomes = ["pass", "fail", "undecided", "error", "unjudged"];

    private readonly Option<string?> _subject = PlanOptions.Value("--subject", "TEXT", "what was measured; * stands for anything");
    private readonly Option<string?> _serial = PlanOptions.Value("--serial", "TEXT", "its serial number; * stands for anything");
    private readonly Option<string[]> _tags = ArchiveCommand.Several("--tag", "TAG", "has this tag; may be given again");
    private readonly Option<string?> _since = PlanOptions.Value("--since", "DATE", "captured on this day or later");
    private readonly Option<string?> _until = PlanOptions.Value("--until", "DATE", "captured before this day");
    private readonly Option<string?> _text = PlanOptions.Value("--text", "WORDS", "has these words anywhere in its texts; a * at a word's end");
    private readonly Option<string?> _verdict = PlanOptions.Value("--verdict", "OUTCOME", "pass, fail, undecided, error or unjudged");
    private readonly Option<string[]> _where = ArchiveCommand.Several("--where", "BOUND", "such as 'frequency-error > 20 ppm', '|frequency-error| < 5 ppm', 'supply = 5 V'");
    private readonly Option<string?> _entries = PlanOptions.Value("--entries", "NUMBERS", "these entries, such as 3,7,12");

    public void AddTo(Command command) => command.Add(_subject, _serial, _tags, _since, _until, _text, _verdict, _where, _entries);

    /// <exception cref="UsageException">An option's value is wrong.</exception>
    public ArchiveQuery Read(ParseResult parsed, int limit)
    {
        string? outcome = parsed.GetValue(_verdict);
        if (outcome is not null && !Outcomes.Contains(outcome))
            throw new UsageException($"--verdict: expected one of {string.Join(", ", Outcomes)}, found \"{outcome}\"");
        (DateTimeOffset? since, DateTimeOffset? until) = (ArchiveCommand.Date(parsed, _since), ArchiveCommand.Date(parsed, _until));
        if (since >= until)
            throw new UsageException($"--until: expected a date after that of --since, {parsed.GetValue(_since)}, found \"{parsed.GetValue(_until)}\"");
        return new ArchiveQuery
        {
            Subject = parsed.GetValue(_subject),
            Serial = parsed.GetValue(_serial),
            Tags = parsed.GetValue(_tags) ?? [],
            Since = since,
            Until = until,
            Text = parsed.GetValue(_text),
            Outcome = outcome,
            Where = [.. (parsed.GetValue(_where) ?? []).Select(Comparison)],
            Entries = [.. (parsed.GetValue(_entries) ?? "").Split(',', StringSplitOptions.RemoveEmptyEntries | StringSplitOptions.TrimEntries).Select(ArchiveCommand.Number)],
            Limit = limit,
        };
    }

    public static int Limit(string? text, int otherwise)
    {
        if (text is null)
            return otherwise;
        return int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out int limit) && limit > 0
            ? limit
            : throw new UsageException($"--limit: expected a whole number above zero, found \"{text}\"");
    }

    private static Comparison Comparison(string text) =>
        ScopeReader.Archive.Search.Comparison.TryParse(text, out Comparison? comparison, out string problem) ? comparison! : throw new UsageException($"--where: {problem}");
}
