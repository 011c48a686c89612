using System.CommandLine;

namespace ScopeReader.Commands.Archive;

/// <summary><c>archive …</c>: everything about the archive.</summary>
internal static class ArchiveVerb
{
    public static Command Create(Surroundings surroundings)
    {
        var command = new Command("archive", "keep captures and their measurements, find and trust them years later");
        foreach (Command verb in (Command[])[AddVerb.Create(surroundings), FindVerb.Create(surroundings), ShowVerb.Create(surroundings), AmendVerb.Create(surroundings),
            TrendVerb.Create(surroundings), RemeasureVerb.Create(surroundings), UpkeepVerbs.Extract(surroundings), UpkeepVerbs.Export(surroundings), UpkeepVerbs.Import(surroundings),
            UpkeepVerbs.Verify(surroundings), UpkeepVerbs.Backup(surroundings), UpkeepVerbs.Stats(surroundings)])
        {
            verb.Options.Add(CommandLine.NoColour());
            command.Subcommands.Add(verb);
        }
        command.SetAction(_ => VerbMissing(command));
        return command;
    }

    private static int VerbMissing(Command command) =>
        throw new UsageException($"archive needs a verb: {string.Join(", ", command.Subcommands.Select(c => c.Name))}");
}
