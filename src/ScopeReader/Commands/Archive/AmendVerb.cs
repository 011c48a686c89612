using System.CommandLine;
using System.Globalization;
using ScopeReader.Archive;
using ScopeReader.Archive.Contents;
using ScopeReader.Commands.Tables;

namespace ScopeReader.Commands.Archive;

/// <summary><c>archive amend ENTRY</c>: a correction beside what an entry states.</summary>
internal static class AmendVerb
{
    private static readonly string[] Texts = ["subject", "serial", "operator", "instrument", "notes"];

    public static Command Create(Surroundings surroundings)
    {
        Argument<string> entry = ArchiveCommand.EntryNumber();
        Option<string?>[] texts = [.. Texts.Select(f => PlanOptions.Value("--" + f, "TEXT", $"the right {f}; empty for none"))];
        Option<string?> due = PlanOptions.Value("--calibration-due", "DATE", "the day the instrument's calibration runs out; empty for none"), captured = PlanOptions.Value("--captured", "DATE", "when it was captured");
        Option<string[]> set = ArchiveCommand.Several("--set", "NAME=VALUE", "the right condition"), unset = ArchiveCommand.Several("--unset", "NAME", "a condition to take away");
        Option<string[]> tag = ArchiveCommand.Several("--tag", "TAG", "a tag to add"), untag = ArchiveCommand.Several("--untag", "TAG", "a tag to take away");
        Option<string?> archive = ArchiveCommand.Path(), by = ArchiveCommand.By(), reason = ArchiveCommand.Reason();
        var command = new Command("amend", "correct an entry; what it said before stays in its history");
        command.Arguments.Add(entry);
        command.Add([.. texts, due, captured, set, unset, tag, untag, reason, by, archive]);
        command.SetAction((parsed, cancellation) =>
        {
            int number = ArchiveCommand.Number(parsed.GetValue(entry)!);
            Change[] changes =
            [
                .. texts.Where(f => parsed.GetValue(f) is not null).Select(f => new Change(f.Name[2..], null, parsed.GetValue(f) is { Length: > 0 } text ? text : null)),
                .. parsed.GetValue(due) switch
                {
                    null => (Change[])[],
                    "" => [new Change("calibration-due", null, null)],
                    _ => [new Change("calibration-due", null, ArchiveCommand.DayOf(parsed, due)!.Value.ToString("yyyy-MM-dd", CultureInfo.InvariantCulture))],
                },
                .. ArchiveCommand.PastDate(parsed, captured, surroundings.Today) is { } date ? (Change[])[new Change("captured-at", null, date.ToString("O", CultureInfo.InvariantCulture))] : [],
                .. (parsed.GetValue(set) ?? []).Select(ArchiveCommand.Condition).Select(c => new Change("condition " + c.Name, null, ConditionText.Format(c.Value))),
                .. (parsed.GetValue(unset) ?? []).Select(name => new Change("condition " + name, null, null)),
                .. (parsed.GetValue(tag) ?? []).Select(t => new Change("tag", null, t)),
                .. (parsed.GetValue(untag) ?? []).Select(t => new Change("tag", t, null)),
            ];
            if (changes.Length == 0)
                throw new UsageException("amend needs what to correct, such as --subject or --set supply=5V");
            string why = parsed.GetValue(reason) is { } given && !string.IsNullOrWhiteSpace(given) ? given : throw new UsageException("amend needs a reason, kept with the correction: --reason TEXT");
            return ArchiveCommand.Run(surroundings, () =>
            {
                // Reading first: a mistyped path must not make a new archive.
                string path = ArchiveCommand.PathOf(parsed, archive);
                MeasurementArchive.OpenToRead(path).Dispose();
                using MeasurementArchive opened = MeasurementArchive.Open(path);
                EntryEvent made = opened.Amend(number, changes, ArchiveCommand.ByOf(parsed, by), why).History[^1];
                foreach (Change change in made.Changes)
                    surroundings.Output.WriteLine(SafeText.Of($"entry {number}: {change.Field} from {change.From ?? "nothing"} to {change.To ?? "nothing"}"));
                return ExitStatus.Passed;
            }, cancellation);
        });
        return command;
    }
}
