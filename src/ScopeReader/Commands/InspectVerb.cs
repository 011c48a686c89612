using System.CommandLine;
using ScopeReader.Commands.Tables;
using ScopeReader.Files;
using ScopeReader.Files.Output;

namespace ScopeReader.Commands;

/// <summary><c>inspect FILE…</c>: how files were understood.</summary>
internal static class InspectVerb
{
    public static Command Create(Surroundings surroundings)
    {
        var files = new Argument<string[]>("FILE") { Description = "captures; - is standard input", Arity = ArgumentArity.OneOrMore };
        var plan = new PlanOptions();
        Option<bool> json = PlanOptions.Flag("--json", "one JSON document"), noColour = CommandLine.NoColour();
        var command = new Command("inspect", "show how a file was understood: encoding, columns, axis, channels, doubts");
        command.Arguments.Add(files);
        plan.AddTo(command);
        command.Options.Add(json);
        command.Options.Add(noColour);
        command.SetAction((parsed, cancellation) =>
        {
            string[] named = MeasureVerb.CheckedFiles(parsed.GetValue(files)!);
            Plan settings = plan.Read(parsed, surroundings.Today);
            bool colour = surroundings.Colour && !parsed.GetValue(noColour);
            // On a thread of the pool, so that Ctrl-C finds somebody who listens.
            return Task.Run(() => Inspect(named, settings, parsed.GetValue(json), surroundings with { Colour = colour }, cancellation), cancellation);
        });
        return command;
    }

    private static int Inspect(string[] files, Plan plan, bool asJson, Surroundings to, CancellationToken cancellation)
    {
        var json = new InspectionJson(CommandLine.ProgramAndVersion);
        int status = ExitStatus.Passed;
        bool started = false;
        foreach (string file in files)
            try
            {
                ImportReport report = CaptureReader.Read(file, plan.Import, plan.Chain.Scale, cancellation).Report;
                if (asJson)
                    json.Add(report);
                else
                    to.Output.Write((started ? "\n" : "") + InspectionTable.Of(report, to.Width(), to.Colour));
                started = true;
            }
            catch (ImportException e)
            {
                json.Add(file, e.Message);
                to.Error.WriteLine(SafeText.Of(e.Message));
                status = ExitStatus.Unreadable;
            }
        if (asJson)
            to.Output.Write(json.Document() + "\n");
        to.Output.Flush();
        return status;
    }
}
