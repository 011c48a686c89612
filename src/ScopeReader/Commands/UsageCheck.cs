using System.CommandLine;
using System.CommandLine.Parsing;
using ScopeReader.Files.Plans;

namespace ScopeReader.Commands;

/// <summary>What is wrong with a command line, in one line of our own words.</summary>
internal static class UsageCheck
{
    /// <exception cref="UsageException">The command line is wrong.</exception>
    public static void Check(ParseResult parsed)
    {
        if (IsMistakenForVerb(parsed, out string mistaken))
            throw new UsageException(UnknownVerb(mistaken, parsed.CommandResult.Command));
        if (StrayOption(parsed) is { } option)
            throw new UsageException($"unknown option \"{option}\"; the nearest is {NearestWord.Of(option, Options(parsed))}");
        if (OptionWithoutValue(parsed) is { } hungry)
            throw new UsageException(NeedsValue(hungry));
        if (parsed.UnmatchedTokens is [var word, ..])
            throw new UsageException($"unexpected \"{word}\" after {parsed.CommandResult.Command.Name}");
        if (parsed.Errors is [var error, ..])
            throw new UsageException(Words(error, parsed.CommandResult.Command));
    }

    // Without a verb the first word is a file; a mistyped verb must not end up as one that is not there. A name with a dot
    // or a slash is a file's for certain: the bench tells that it is missing.
    private static bool IsMistakenForVerb(ParseResult parsed, out string word)
    {
        bool isRoot = parsed.CommandResult.Command is RootCommand;
        IEnumerable<string> words = isRoot ? parsed.CommandResult.Children.OfType<ArgumentResult>().SelectMany(a => a.Tokens).Select(t => t.Value) : parsed.UnmatchedTokens;
        word = words.FirstOrDefault("");
        return parsed.CommandResult.Command.Subcommands.Count > 0 && word.Length > 0 && word[0] != '-'
            && (!isRoot || (word.All(c => char.IsAsciiLetter(c) || c == '-') && !Path.Exists(word)));
    }

    private static string UnknownVerb(string word, Command command)
    {
        string nearest = NearestWord.Of(word, command.Subcommands.Select(c => c.Name))!;
        bool isNear = NearestWord.Distance(word, nearest) <= 2 && 2 * NearestWord.Distance(word, nearest) < word.Length;
        string help = command is RootCommand ? "scopereader --help" : $"scopereader {command.Name} --help";
        return $"unknown verb \"{word}\"; {(isNear ? $"the nearest is {nearest}" : $"{help} lists the verbs")}";
    }

    // The parser takes an option that it does not know for a file's name. After -- it is one.
    private static string? StrayOption(ParseResult parsed)
    {
        HashSet<Token> values = [.. parsed.CommandResult.Children.OfType<OptionResult>().SelectMany(o => o.Tokens)];
        foreach (Token token in parsed.Tokens)
        {
            if (token.Type == TokenType.DoubleDash)
                break;
            if (token.Type == TokenType.Argument && token.Value is ['-', _, ..] && !values.Contains(token))
                return token.Value.Split('=')[0];
        }
        return null;
    }

    // The parser takes the next option for the value that is not there: --plan --json.
    private static Option? OptionWithoutValue(ParseResult parsed)
    {
        string[] names = [.. Options(parsed)];
        return parsed.CommandResult.Children.OfType<OptionResult>().FirstOrDefault(o => o.Tokens.Any(t => names.Contains(t.Value)))?.Option;
    }

    private static string NeedsValue(Option option) => $"{option.Name} needs a value: {option.Name} {option.HelpName}";

    private static IEnumerable<string> Options(ParseResult parsed)
    {
        IEnumerable<Option> here = parsed.CommandResult.Command.Options;
        if (parsed.CommandResult.Command != parsed.RootCommandResult.Command)
            here = here.Concat(parsed.RootCommandResult.Command.Options.Where(o => o.Recursive));
        return here.Select(o => o.Name);
    }

    private static string Words(ParseError error, Command command) => error.SymbolResult switch
    {
        OptionResult { Tokens.Count: 0 } option => NeedsValue(option.Option),
        OptionResult { Option: Option<bool> } flag => $"{flag.Option.Name} takes no value",
        OptionResult option => $"{option.Option.Name} is given more than once",
        ArgumentResult argument => $"{command.Name} needs {Article(argument.Argument.Name)}: scopereader {HelpByExample.Path(command)} {argument.Argument.Name}",
        _ => char.ToLowerInvariant(error.Message[0]) + error.Message[1..].TrimEnd('.'),
    };

    private static string Article(string name) => $"{("AEIOU".Contains(name[0], StringComparison.Ordinal) ? "an" : "a")} {name.ToLowerInvariant()}";
}
