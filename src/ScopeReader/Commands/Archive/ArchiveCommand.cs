using System.CommandLine;
using System.Globalization;
using ScopeReader.Archive;
using ScopeReader.Commands.Tables;

namespace ScopeReader.Commands.Archive;

/// <summary>What the archive's verbs share: the archive's place, who works, dates, and one line for what goes wrong.</summary>
internal static class ArchiveCommand
{
    public static Option<string?> Path() => PlanOptions.Value("--archive", "PATH", "the archive's file; by default one in your data folder");

    public static Option<string?> By() => PlanOptions.Value("--by", "NAME", "who does this; your user name by default");

    public static Option<string?> Reason() => PlanOptions.Value("--reason", "TEXT", "why, kept with the change");

    public static Option<string[]> Several(string name, string value, string description) =>
        new(name) { HelpName = value, Description = description, Arity = ArgumentArity.OneOrMore, AllowMultipleArgumentsPerToken = false };

    public static Argument<string> EntryNumber() => new("ENTRY") { Description = "the entry's number, as archive find shows it" };

    public static void Add(this Command command, params ReadOnlySpan<Option> options)
    {
        foreach (Option option in options)
            command.Options.Add(option);
    }

    public static string PathOf(ParseResult parsed, Option<string?> path) => parsed.GetValue(path) ?? MeasurementArchive.DefaultPath;

    public static string ByOf(ParseResult parsed, Option<string?> by) => parsed.GetValue(by) ?? Environment.UserName;

    /// <summary>Runs work on a thread of the pool; an archive that cannot be used is one line and status 3.</summary>
    public static Task<int> Run(Surroundings surroundings, Func<int> work, CancellationToken cancellation) => Task.Run(() =>
    {
        try
        {
            int status = work();
            surroundings.Output.Flush();
            return status;
        }
        catch (ArchiveException fault)
        {
            surroundings.Error.WriteLine(SafeText.Of(fault.Message));
            return ExitStatus.Unreadable;
        }
    }, cancellation);

    public static int Number(string text) => int.TryParse(text.TrimStart('#'), NumberStyles.None, CultureInfo.InvariantCulture, out int number) && number > 0
        ? number
        : throw new UsageException($"expected an entry's number, such as 12, found \"{text}\"");

    /// <summary>A day, or an instant, of UTC unless it says otherwise.</summary>
    public static DateTimeOffset? Date(ParseResult parsed, Option<string?> option)
    {
        if (parsed.GetValue(option) is not { } text)
            return null;
        return DateTimeOffset.TryParseExact(text, ["yyyy-MM-dd", "yyyy-MM-ddTHH:mm", "yyyy-MM-ddTHH:mm:ss", "yyyy-MM-ddTHH:mmK", "yyyy-MM-ddTHH:mm:ssK", "yyyy"],
            CultureInfo.InvariantCulture, DateTimeStyles.AssumeUniversal, out DateTimeOffset date)
            ? date
            : throw new UsageException($"{option.Name}: expected a date, such as 2026-11-30 or 2026-11-30T14:05, found \"{text}\"");
    }

    /// <summary>When a capture was taken: no later than today, wherever on earth.</summary>
    public static DateTimeOffset? PastDate(ParseResult parsed, Option<string?> option, DateOnly today)
    {
        DateTimeOffset? date = Date(parsed, option);
        return date is null || DateOnly.FromDateTime(date.Value.UtcDateTime) <= today.AddDays(1)
            ? date
            : throw new UsageException($"{option.Name}: {parsed.GetValue(option)} is in the future");
    }

    /// <summary>A day.</summary>
    public static DateOnly? DayOf(ParseResult parsed, Option<string?> option)
    {
        if (parsed.GetValue(option) is not { } text)
            return null;
        return DateOnly.TryParseExact(text, "yyyy-MM-dd", CultureInfo.InvariantCulture, DateTimeStyles.None, out DateOnly day)
            ? day
            : throw new UsageException($"{option.Name}: expected a day, such as 2026-11-30, found \"{text}\"");
    }

    /// <summary>NAME=VALUE, the value with its unit.</summary>
    public static (string Name, Condition Value) Condition(string text)
    {
        int at = text.IndexOf('=', StringComparison.Ordinal);
        string name = at < 0 ? "" : text[..at].Trim();
        if (name.Length == 0)
            throw new UsageException($"--set: expected a name and a value, such as supply=5V, found \"{text}\"");
        try
        {
            return (name, ConditionText.Parse(text[(at + 1)..]));
        }
        catch (FormatException problem)
        {
            throw new UsageException($"--set: {name}: {problem.Message}");
        }
    }

    public static string Day(DateTimeOffset at) => at.UtcDateTime.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture);

    public static string Minute(DateTimeOffset at) => at.UtcDateTime.ToString("yyyy-MM-dd HH:mm 'UTC'", CultureInfo.InvariantCulture);

    /// <summary>A condition as people read it: it was set, so zeros at its end say nothing.</summary>
    public static string Text(Condition condition)
    {
        string text = Readings.Engineering.Format(condition.Value, condition.Unit, 6);
        int end = text.IndexOf(' ', StringComparison.Ordinal) is var space and >= 0 ? space : text.Length;
        return text.AsSpan(0, end).Contains('.') ? string.Concat(text.AsSpan(0, end).TrimEnd('0').TrimEnd('.'), text.AsSpan(end)) : text;
    }

    /// <summary>Conditions in a line.</summary>
    public static string Text(IReadOnlyDictionary<string, Condition> conditions) => string.Join(", ", conditions.Select(c => $"{c.Key} {Text(c.Value)}"));
}
