using System.CommandLine;
using ScopeReader.Files.Plans;
using ScopeReader.Readings;

namespace ScopeReader.Commands;

/// <summary>The options that say how captures are read and judged, and the plan that they make.</summary>
internal sealed class PlanOptions
{
    private readonly Option<string?> _plan = Value("--plan", "FILE", "the plan: nominal, measuring chain, limits (TOML)");
    private readonly Option<string?> _nominal = Value("--nominal", "FREQUENCY", "nominal frequency, such as 455kHz; before the plan's");

    public Option<string?> Plan => _plan;

    /// <summary>Those of them that say how files are read.</summary>
    public ImportOptions Import { get; } = new();

    public void AddTo(Command command)
    {
        command.Options.Add(_plan);
        command.Options.Add(_nominal);
        Import.AddTo(command);
    }

    /// <summary>The plan, with what the command line says in it.</summary>
    /// <exception cref="UsageException">An option's value is wrong.</exception>
    /// <exception cref="PlanException">The plan is wrong or missing.</exception>
    public Plan Read(ParseResult parsed, DateOnly today) => Read(parsed, today, parsed.GetValue(_plan));

    /// <summary>Another plan's file with the same options in it.</summary>
    /// <exception cref="UsageException">An option's value is wrong.</exception>
    /// <exception cref="PlanException">The plan is wrong or missing.</exception>
    public Plan Read(ParseResult parsed, DateOnly today, string? file)
    {
        double? nominal = Positive(parsed, _nominal, "Hz");
        ImportTable said = Import.Read(parsed);
        Plan plan = file is not null ? PlanReader.ReadFile(file) : ScopeReader.Plan.Empty;
        return plan with
        {
            Nominal = nominal ?? plan.Nominal,
            Import = said.Settings.Or(plan.Import),
            AsOf = today,
        };
    }

    /// <summary>The plan's text, to be kept with what was measured; null without a plan.</summary>
    /// <exception cref="PlanException">The plan is missing.</exception>
    public string? Text(ParseResult parsed)
    {
        if (parsed.GetValue(_plan) is not { } file)
            return null;
        try
        {
            return File.ReadAllText(file);
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            throw new PlanException(file, null, $"the plan could not be read: {e.Message}");
        }
    }

    /// <summary>An option that takes a value.</summary>
    public static Option<string?> Value(string name, string value, string description) => new(name) { HelpName = value, Description = description, Arity = ArgumentArity.ExactlyOne };

    /// <summary>An option that is there or not.</summary>
    public static Option<bool> Flag(string name, string description, params string[] aliases) => new(name, aliases) { Description = description, Arity = ArgumentArity.Zero };

    private static double? Positive(ParseResult parsed, Option<string?> option, string unit)
    {
        if (parsed.GetValue(option) is not { } text)
            return null;
        if (!Units.TryParse(text, unit, out double value, out string problem))
            throw new UsageException($"{option.Name}: {problem}");
        return value > 0 ? value : throw new UsageException($"{option.Name}: expected more than zero, found \"{text}\"");
    }
}
