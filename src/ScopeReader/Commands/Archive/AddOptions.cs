using System.CommandLine;
using ScopeReader.Archive;

namespace ScopeReader.Commands.Archive;

/// <summary>The options that say what an entry is, beside what its plan says.</summary>
internal sealed class AddOptions
{
    private readonly Option<string?> _subject = PlanOptions.Value("--subject", "TEXT", "what was measured; before the plan's");
    private readonly Option<string?> _serial = PlanOptions.Value("--serial", "TEXT", "its serial number");
    private readonly Option<string?> _operator = PlanOptions.Value("--operator", "NAME", "who measured");
    private readonly Option<string?> _notes = PlanOptions.Value("--notes", "TEXT", "anything worth keeping");
    private readonly Option<string[]> _tags = ArchiveCommand.Several("--tag", "TAG", "a word to find it by; may be given again");
    private readonly Option<string[]> _set = ArchiveCommand.Several("--set", "NAME=VALUE", "a condition, such as supply=5V; may be given again");
    private readonly Option<string?> _captured = PlanOptions.Value("--captured", "DATE", "when it was captured; the file's date by default");
    private readonly Option<string?> _by = ArchiveCommand.By();
    private readonly Option<bool> _again = PlanOptions.Flag("--again", "a further entry, although the capture has one");

    public void AddTo(Command command) => command.Add(_subject, _serial, _operator, _notes, _tags, _set, _captured, _by, _again);

    /// <exception cref="UsageException">An option's value is wrong.</exception>
    public Func<KeptFile, NewEntry> Read(ParseResult parsed, DateOnly today)
    {
        (string Name, Condition Value)[] set = [.. (parsed.GetValue(_set) ?? []).Select(ArchiveCommand.Condition)];
        DateTimeOffset? captured = ArchiveCommand.PastDate(parsed, _captured, today);
        return file =>
        {
            EntryDetails planned = EntryDetails.From(file.Plan);
            var conditions = new SortedDictionary<string, Condition>(planned.Conditions.ToDictionary(), StringComparer.Ordinal);
            foreach ((string name, Condition value) in set)
                conditions[name] = value;
            return new NewEntry
            {
                File = file.Name,
                Bytes = file.Bytes,
                Measurement = file.Measurement,
                Context = file.Context,
                CapturedAt = captured ?? file.Date,
                CapturedAtIsGiven = captured is not null,
                By = ArchiveCommand.ByOf(parsed, _by),
                Again = parsed.GetValue(_again),
                Details = planned with
                {
                    Subject = parsed.GetValue(_subject) ?? planned.Subject,
                    Serial = parsed.GetValue(_serial) ?? planned.Serial,
                    Operator = parsed.GetValue(_operator) ?? planned.Operator,
                    Notes = parsed.GetValue(_notes) ?? planned.Notes,
                    Tags = parsed.GetValue(_tags) ?? [],
                    Conditions = conditions,
                },
            };
        };
    }
}
