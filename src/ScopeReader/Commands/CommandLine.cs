using System.CommandLine;
using System.CommandLine.Help;
using ScopeReader.Commands.Archive;
using ScopeReader.Commands.Tables;
using ScopeReader.Files.Plans;

namespace ScopeReader.Commands;

/// <summary>Opens the bench.</summary>
/// <param name="files">The captures to open.</param>
/// <param name="plan">What they are measured against.</param>
/// <param name="planPath">The plan's file; null without one.</param>
/// <param name="noColour">True to draw without any colour.</param>
internal delegate int OpenBench(IReadOnlyList<string> files, Plan plan, string? planPath, bool noColour);

/// <summary>The command line: from arguments to an exit status.</summary>
internal static class CommandLine
{
    // In the order of the help, which wants an example of each in HelpByExample.
    private static readonly Func<Surroundings, Command>[] Verbs =
    [
        MeasureVerb.Create,
        InspectVerb.Create,
        CompareVerb.Create,
        SeriesVerb.Create,
        CalibrateVerb.Create,
        ArchiveVerb.Create,
        ExplainVerb.Create,
    ];

    /// <summary>Name and version, as outputs carry them.</summary>
    public static string ProgramAndVersion { get; } = $"scopereader {typeof(CommandLine).Assembly.GetName().Version!.ToString(3)}";

    // How long work that was told to stop may take to do so; a read of a pipe that nobody writes to would take for ever.
    private static readonly TimeSpan Moment = TimeSpan.FromSeconds(0.5);

    /// <summary>Runs the program.</summary>
    /// <param name="arguments">The arguments, without the program's own name.</param>
    /// <param name="surroundings">What it writes to.</param>
    /// <param name="bench">Opens the bench where no verb is given.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <returns>The exit status.</returns>
    public static async Task<int> Run(IReadOnlyList<string> arguments, Surroundings surroundings, OpenBench bench, CancellationToken cancellation = default)
    {
        try
        {
            // Any verb may be told; its own part of the command line need not know.
            bool noColour = arguments.TakeWhile(a => a != "--").Any(a => a is "--no-colour" or "--no-color");
            RootCommand root = Root(surroundings with { Colour = surroundings.Colour && !noColour }, bench);
            // An argument that starts with @ is a file's name here and no list of arguments.
            ParseResult parsed = root.Parse(arguments, new ParserConfiguration { ResponseFileTokenReplacer = null });
            if (parsed.Action is not HelpAction and not HelpByExample and not VersionAction)
                UsageCheck.Check(parsed);
            return await parsed.InvokeAsync(new InvocationConfiguration { EnableDefaultExceptionHandler = false, ProcessTerminationTimeout = Moment, Output = surroundings.Output, Error = surroundings.Error }, cancellation);
        }
        catch (UsageException e)
        {
            surroundings.Error.WriteLine(SafeText.Of($"scopereader: {e.Message}"));
            return ExitStatus.Usage;
        }
        catch (PlanException e)
        {
            surroundings.Error.WriteLine(SafeText.Of(e.Message));
            return ExitStatus.Usage;
        }
        catch (OperationCanceledException)
        {
            return ExitStatus.Interrupted;
        }
        catch (IOException e)
        {
            // Captures and plans have their own exceptions: this is the output, a full disk for one.
            surroundings.Error.WriteLine(SafeText.Of($"scopereader: the output could not be written: {e.Message}"));
            return ExitStatus.Unreadable;
        }
        catch (Exception e)
        {
            // The last word before the process ends: whatever it was, the person gets a line and a script its status.
            surroundings.Error.WriteLine(SafeText.Of($"scopereader: a fault of this program, not of your files: {e.GetType().Name}: {e.Message}"));
            return ExitStatus.Fault;
        }
    }

    private static RootCommand Root(Surroundings surroundings, OpenBench bench)
    {
        var files = new Argument<string[]>("FILE") { Description = "captures to open on the bench", Arity = ArgumentArity.ZeroOrMore };
        var options = new PlanOptions();
        Option<bool> noColour = NoColour();
        var root = new RootCommand("Measures captures of oscillators, logic edges and small RF sources, with uncertainty, and judges them against your limits. Without a verb it opens the bench, a screen for the terminal.");
        root.Arguments.Add(files);
        options.AddTo(root);
        root.Options.Add(noColour);
        foreach (Func<Surroundings, Command> verb in Verbs)
            root.Subcommands.Add(verb(surroundings));
        root.SetAction(parsed => bench(parsed.GetValue(files) ?? [], options.Read(parsed, surroundings.Today), parsed.GetValue(options.Plan), parsed.GetValue(noColour)));

        root.Directives.Clear();
        foreach (Option built in root.Options.Where(o => o is HelpOption or VersionOption).ToArray())
            root.Options.Remove(built);
        root.Options.Add(new HelpOption("--help", "-h") { Description = "show this help", Action = new HelpByExample(surroundings) });
        root.Options.Add(new VersionOption("--version") { Description = "show the version", Action = new VersionAction() });
        return root;
    }

    /// <summary>The option that takes the colours away.</summary>
    public static Option<bool> NoColour() => PlanOptions.Flag("--no-colour", "no colours; NO_COLOR in the environment does the same", "--no-color");

    private sealed class VersionAction : System.CommandLine.Invocation.SynchronousCommandLineAction
    {
        public override bool ClearsParseErrors => true;

        public override int Invoke(ParseResult parseResult)
        {
            parseResult.InvocationConfiguration.Output.WriteLine(ProgramAndVersion);
            return ExitStatus.Passed;
        }
    }
}
