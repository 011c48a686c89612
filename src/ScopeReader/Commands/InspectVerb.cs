using System.CommandLine;
using ScopeReader.Commands.Tables;
using ScopeReader.Files;
using ScopeReader.Files.Output;
using ScopeReader.Files.Plans;

namespace ScopeReader.Commands;

/// <summary><c>inspect FILE…</c>: how files were understood.</summary>
internal static class InspectVerb
{
    public static Command Create(Surroundings surroundings)
    {
        var files = new Argument<string[]>("FILE") { Description = "captures; - is standard input", Arity = ArgumentArity.OneOrMore };
        var plan = new PlanOptions();
        Option<bool> json = PlanOptions.Flag("--json", "one JSON document"), remember = PlanOptions.Flag("--remember", "keep what the options say about the files for their folder"), noColour = CommandLine.NoColour();
        var command = new Command("inspect", "show how a file was understood: encoding, columns, axis, channels, doubts");
        command.Arguments.Add(files);
        plan.AddTo(command);
        command.Options.Add(json);
        command.Options.Add(remember);
        command.Options.Add(noColour);
        command.SetAction((parsed, cancellation) =>
        {
            string[] named = MeasureVerb.CheckedFiles(parsed.GetValue(files)!);
            Plan settings = plan.Read(parsed, surroundings.Today);
            ImportTable? kept = parsed.GetValue(remember) ? ToRemember(plan.Import.Read(parsed), named) : null;
            bool colour = surroundings.Colour && !parsed.GetValue(noColour);
            // On a thread of the pool, so that Ctrl-C finds somebody who listens.
            return Task.Run(() => Inspect(named, settings, kept, parsed.GetValue(json), surroundings with { Colour = colour }, cancellation), cancellation);
        });
        return command;
    }

    private static int Inspect(string[] files, Plan plan, ImportTable? kept, bool asJson, Surroundings to, CancellationToken cancellation)
    {
        var json = new InspectionJson(CommandLine.ProgramAndVersion);
        int status = ExitStatus.Passed;
        bool started = false;
        using ProgressLine progress = to.Progress(cancellation);
        foreach (string file in files)
            try
            {
                ImportReport report = CaptureReader.Read(file, plan.Import, plan.Chain.Scale, progress.Reading(file), cancellation).Report;
                progress.Hide();
                if (asJson)
                    json.Add(report);
                else
                    to.Output.Write((started ? "\n" : "") + InspectionTable.Of(report, to.Width(), to.Colour));
                started = true;
                if (kept is not null)
                    status = Math.Max(status, Remember(file, kept, to));
            }
            catch (ImportException e)
            {
                progress.Hide();
                json.Add(file, e.Message);
                to.Error.WriteLine(SafeText.Of(e.Message));
                status = ExitStatus.Unreadable;
            }
        if (asJson)
            to.Output.Write(json.Document() + "\n");
        to.Output.Flush();
        return status;
    }

    private static ImportTable ToRemember(ImportTable said, string[] files)
    {
        if (said.Entries.Count == 0)
            throw new UsageException("--remember keeps what the command line says about the files, such as --decimal comma, and it says nothing");
        return files.Contains("-") ? throw new UsageException("--remember keeps it in the file's folder, and standard input has none") : said;
    }

    private static int Remember(string file, ImportTable kept, Surroundings to)
    {
        try
        {
            string memory = FolderMemoryWriter.Remember(file, kept.Entries);
            to.Error.WriteLine(SafeText.Of($"{memory} now remembers: {string.Join("; ", kept.Entries)}"));
            return ExitStatus.Passed;
        }
        catch (PlanException e)
        {
            to.Error.WriteLine(SafeText.Of(e.Message));
            return ExitStatus.Unreadable;
        }
    }
}
