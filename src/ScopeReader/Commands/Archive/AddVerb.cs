using System.CommandLine;
using ScopeReader.Commands.Tables;
using ScopeReader.Files;

namespace ScopeReader.Commands.Archive;

/// <summary><c>archive add FILE…</c>: measures captures and keeps them.</summary>
internal static class AddVerb
{
    public static Command Create(Surroundings surroundings)
    {
        var files = new Argument<string[]>("FILE") { Description = "captures; - is standard input", Arity = ArgumentArity.OneOrMore };
        var plan = new PlanOptions();
        var details = new AddOptions();
        Option<string?> archive = ArchiveCommand.Path(), channel = PlanOptions.Value("--channel", "NAME", "measure only this channel");
        var command = new Command("add", "measure captures and keep them with everything about them");
        command.Arguments.Add(files);
        plan.AddTo(command);
        details.AddTo(command);
        command.Add(channel, archive);
        command.SetAction((parsed, cancellation) =>
        {
            string[] named = MeasureVerb.CheckedFiles(parsed.GetValue(files)!);
            Plan read = plan.Read(parsed, surroundings.Today);
            string? text = plan.Text(parsed), only = parsed.GetValue(channel);
            Func<KeptFile, ScopeReader.Archive.NewEntry> describe = details.Read(parsed, surroundings.Today);
            return ArchiveCommand.Run(surroundings, () =>
            {
                using var keeper = new Keeper(ArchiveCommand.PathOf(parsed, archive), describe, surroundings.Output);
                return Add(named, file => KeptFile.Read(file, read, text, only, cancellation), keeper, surroundings);
            }, cancellation);
        });
        return command;
    }

    private static int Add(string[] files, Func<string, KeptFile> read, Keeper keeper, Surroundings to)
    {
        int status = ExitStatus.Passed;
        foreach (string file in files)
            try
            {
                keeper.Keep(read(file));
            }
            catch (ImportException fault)
            {
                // The other files are worth keeping all the same.
                to.Error.WriteLine(SafeText.Of(fault.Message));
                status = ExitStatus.Unreadable;
            }
        keeper.Flush();
        return status;
    }
}
