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
        if (StrayOption(parsed) is { } option)
            throw new UsageException($"unknown option \"{option}\"; the nearest is {NearestWord.Of(option, Options(parsed))}");
        if (OptionWithoutValue(parsed) is { } hungry)
            throw new UsageException(NeedsValue(hungry));
        if (parsed.UnmatchedTokens is [var word, ..])
            throw new UsageException($"unexpected \"{word}\" after {parsed.CommandResult.Command.Name}");
        if (parsed.Errors is [var error, ..])
            throw new UsageException(Words(error, parsed.CommandResult.Command));
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
        ArgumentResult argument => $"{command.Name} needs {Article(argument.Argument.Name)}: scopereader {command.Name} {argument.Argument.Name}",
        _ => char.ToLowerInvariant(error.Message[0]) + error.Message[1..].TrimEnd('.'),
    };

    private static string Article(string name) => $"a {name.ToLowerInvariant()}";
}
