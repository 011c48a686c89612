using System.CommandLine;
using System.CommandLine.Invocation;
using ScopeReader.Commands.Tables;

namespace ScopeReader.Commands;

/// <summary>The help: commands to start from, and what there is.</summary>
internal sealed class HelpByExample(Surroundings surroundings) : SynchronousCommandLineAction
{
    private const string Source = "captures-demo/if-source-7.csv", Plan = "captures-demo/if-source.toml", Export = "captures-demo/logger-export.csv";

    /// <summary>The examples of each verb; of the empty name, those of the program.</summary>
    public static IReadOnlyDictionary<string, string[]> Examples { get; } = new Dictionary<string, string[]>(StringComparer.Ordinal)
    {
        [""] = [$"scopereader measure {Source} --plan {Plan}", $"scopereader inspect {Export}", "scopereader explain rise-time", $"scopereader {Source} --plan {Plan}"],
        ["measure"] =
        [
            $"scopereader measure {Source} --plan {Plan}",
            $"scopereader measure {Source} --nominal 455kHz --explain",
            "scopereader measure captures-demo/*.csv --jobs 2 --csv > readings.csv",
            "scopereader measure captures-demo/no-interval.csv --interval 20ns --json",
        ],
        ["inspect"] = [$"scopereader inspect {Export}", "scopereader inspect captures-demo/*.csv --json"],
        ["compare"] =
        [
            "scopereader compare captures-demo/node-breadboard.csv captures-demo/node-soldered.csv --plan captures-demo/node.toml",
            "scopereader compare before-1.csv before-2.csv before-3.csv --with after-1.csv after-2.csv after-3.csv",
            "scopereader compare bare.csv with-47pF.csv --added 47pF --added-tolerance 5%",
        ],
        ["series"] =
        [
            "scopereader series a.csv b.csv c.csv --against supply --at 4.5V,5V,5.5V --nominal 455kHz --within 20ppm",
            "scopereader series --subject 'IF source*' --against load-capacitance",
        ],
        ["calibrate"] = ["scopereader calibrate reference.csv --reference 10MHz --reference-uncertainty 0.01ppm", "scopereader calibrate reference.csv --reference 10MHz --reference-uncertainty 0.01ppm --into source.toml"],
        ["archive"] = [$"scopereader archive add {Source} --plan {Plan}", "scopereader archive find --where 'frequency-error > 20 ppm'", "scopereader archive verify"],
        ["add"] = [$"scopereader archive add {Source} --plan {Plan} --set supply=5V --tag soldered"],
        ["find"] = ["scopereader archive find --subject 'IF source*' --where '|frequency-error| > 20 ppm'", "scopereader archive find --since 2026-01-01 --verdict fail --json"],
        ["show"] = ["scopereader archive show 12"],
        ["amend"] = ["scopereader archive amend 12 --serial A-0012 --set supply=5.1V --reason 'label misread'"],
        ["trend"] = ["scopereader archive trend frequency-error --subject 'IF source*'", "scopereader archive trend frequency-error --against supply"],
        ["remeasure"] = ["scopereader archive remeasure 12", "scopereader archive remeasure --since 2025-01-01 --keep --reason 'new release'"],
        ["extract"] = ["scopereader archive extract 12 --output original.csv"],
        ["export"] = ["scopereader archive export archive-2026"],
        ["import"] = ["scopereader archive import archive-2026 --archive rebuilt.db"],
        ["verify"] = ["scopereader archive verify --head 3f1c…"],
        ["backup"] = ["scopereader archive backup /media/copy/archive.db"],
        ["stats"] = ["scopereader archive stats"],
        ["explain"] = ["scopereader explain frequency-error", "scopereader explain plan", "scopereader explain"],
    };

    public override bool ClearsParseErrors => true;

    public override int Invoke(ParseResult parseResult)
    {
        Command command = parseResult.CommandResult.Command;
        bool isRoot = command is RootCommand;
        var sheet = new Sheet(surroundings.Width(), colour: false);
        sheet.Line(Capitalised(command.Description!));

        sheet.Heading("Usage");
        if (isRoot)
            sheet.Indented("scopereader VERB FILE… [options]");
        sheet.Indented(string.Join(' ', ((string[])["scopereader", isRoot ? "" : Path(command), .. command.Arguments.Select(Named), "[options]"]).Where(w => w.Length > 0)));

        sheet.Heading("Examples");
        foreach (string example in Examples[isRoot ? "" : command.Name])
            sheet.AsItIs("  " + example);

        Rows(sheet, "Verbs", [.. command.Subcommands.Select(c => (c.Name, c.Description!))]);
        Rows(sheet, "Arguments", [.. command.Arguments.Select(a => (a.Name, a.Description!))]);
        Rows(sheet, "Options", [.. command.Options.Concat(isRoot ? [] : parseResult.RootCommandResult.Command.Options.Where(o => o.Recursive)).Select(o => (Form(o), o.Description!))]);
        if (command.Name == "measure")
            Rows(sheet, "Exit status",
            [
                ("0", "every limit passed, or none was set"),
                ("1", "a limit failed"),
                ("2", "none failed, one is undecided"),
                ("3", "a file could not be read, or a limited quantity not measured"),
                ("64", "the command line or the plan is wrong"),
                ("70", "a fault of this program"),
                ("130", "interrupted"),
            ]);
        surroundings.Output.Write(sheet.ToString());
        return ExitStatus.Passed;
    }

    private static void Rows(Sheet sheet, string heading, IReadOnlyList<(string Name, string Meaning)> rows)
    {
        if (rows.Count == 0)
            return;
        sheet.Heading(heading);
        sheet.Columns([.. rows.Select(r => new[] { "  " + r.Name, r.Meaning })]);
    }

    private static string Form(Option option) => string.Join(' ', ((string?[])[string.Join(", ", option.Aliases.Where(a => a.Length == 2).Prepend(option.Name)), option.HelpName]).OfType<string>());

    private static string Named(Argument argument)
    {
        string name = argument.Arity.MaximumNumberOfValues > 1 ? argument.Name + "…" : argument.Name;
        return argument.Arity.MinimumNumberOfValues == 0 ? $"[{name}]" : name;
    }

    /// <summary>A verb as it is typed: archive find.</summary>
    public static string Path(Command command) => string.Join(' ', command.Parents.OfType<Command>().Where(c => c is not RootCommand).Append(command).Select(c => c.Name));

    private static string Capitalised(string text) => char.ToUpperInvariant(text[0]) + text[1..] + (text.EndsWith('.') ? "" : ".");
}
