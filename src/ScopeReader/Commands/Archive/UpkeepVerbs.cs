using System.CommandLine;
using System.Globalization;
using ScopeReader.Archive;
using ScopeReader.Commands.Tables;
using ScopeReader.Readings;

namespace ScopeReader.Commands.Archive;

/// <summary>The verbs that look after an archive: extract, export, import, verify, backup, stats.</summary>
internal static class UpkeepVerbs
{
    private const int HashLength = 64;

    public static Command Extract(Surroundings surroundings)
    {
        Argument<string> entry = ArchiveCommand.EntryNumber();
        Option<string?> archive = ArchiveCommand.Path(), output = PlanOptions.Value("--output", "FILE", "where it goes; under its own name here by default, - for standard output");
        var command = new Command("extract", "give back an entry's original file, byte for byte");
        command.Arguments.Add(entry);
        command.Add(output, archive);
        command.SetAction((parsed, cancellation) =>
        {
            int number = ArchiveCommand.Number(parsed.GetValue(entry)!);
            return ArchiveCommand.Run(surroundings, () =>
            {
                using MeasurementArchive opened = MeasurementArchive.OpenToRead(ArchiveCommand.PathOf(parsed, archive));
                byte[] bytes = opened.Extract(number);
                // An archive that somebody else made may name a file in any folder.
                string target = parsed.GetValue(output) ?? Path.GetFileName(opened.Show(number).File.Replace('\\', '/'));
                if (target == "-")
                {
                    using Stream standard = Console.OpenStandardOutput();
                    standard.Write(bytes);
                    return ExitStatus.Passed;
                }
                return Write(target, bytes, surroundings);
            }, cancellation);
        });
        return command;
    }

    public static Command Export(Surroundings surroundings)
    {
        var folder = new Argument<string>("FOLDER") { Description = "a folder that is empty or does not exist" };
        Option<string?> archive = ArchiveCommand.Path();
        var command = new Command("export", "write the whole archive as JSON, CSV and the captures, readable without this program");
        command.Arguments.Add(folder);
        command.Add(archive);
        command.SetAction((parsed, cancellation) => ArchiveCommand.Run(surroundings, () =>
        {
            using MeasurementArchive opened = MeasurementArchive.OpenToRead(ArchiveCommand.PathOf(parsed, archive));
            string head = opened.Export(parsed.GetValue(folder)!, null, cancellation);
            surroundings.Output.WriteLine($"head {head}");
            return ExitStatus.Passed;
        }, cancellation));
        return command;
    }

    public static Command Import(Surroundings surroundings)
    {
        var folder = new Argument<string>("FOLDER") { Description = "what archive export wrote" };
        Option<string?> archive = PlanOptions.Value("--archive", "PATH", "the new archive; no file may be there");
        var command = new Command("import", "make an archive of an export, with the same head hash");
        command.Arguments.Add(folder);
        command.Add(archive);
        command.SetAction((parsed, cancellation) => ArchiveCommand.Run(surroundings, () =>
        {
            string head = MeasurementArchive.Import(parsed.GetValue(folder)!, ArchiveCommand.PathOf(parsed, archive), null, cancellation);
            surroundings.Output.WriteLine($"head {head}");
            return ExitStatus.Passed;
        }, cancellation));
        return command;
    }

    public static Command Verify(Surroundings surroundings)
    {
        Option<string?> archive = ArchiveCommand.Path(), head = PlanOptions.Value("--head", "HASH", "a head hash that you kept elsewhere");
        Option<bool> json = PlanOptions.Flag("--json", "one JSON document");
        var command = new Command("verify", "check every link of the chain and every capture's hash");
        command.Add(head, json, archive);
        command.SetAction((parsed, cancellation) =>
        {
            string? kept = parsed.GetValue(head)?.Trim();
            if (kept is not null && (kept.Length != HashLength || !kept.All(char.IsAsciiHexDigit)))
                throw new UsageException($"--head: expected the {HashLength.ToString(CultureInfo.InvariantCulture)} hexadecimal digits of a hash, found \"{kept}\"");
            return ArchiveCommand.Run(surroundings, () =>
            {
                using MeasurementArchive opened = MeasurementArchive.OpenToRead(ArchiveCommand.PathOf(parsed, archive));
                Verification check = opened.Verify(kept, null, cancellation);
                if (parsed.GetValue(json))
                    surroundings.Output.Write(ArchiveDocuments.Of(check) + "\n");
                else
                    Report(check, kept is not null, surroundings);
                return check.IsSound ? ExitStatus.Passed : ExitStatus.Failed;
            }, cancellation);
        });
        return command;
    }

    public static Command Backup(Surroundings surroundings)
    {
        var target = new Argument<string>("FILE") { Description = "the copy; no file may be there" };
        Option<string?> archive = ArchiveCommand.Path();
        var command = new Command("backup", "copy the archive, even while others add to it");
        command.Arguments.Add(target);
        command.Add(archive);
        command.SetAction((parsed, cancellation) => ArchiveCommand.Run(surroundings, () =>
        {
            using MeasurementArchive opened = MeasurementArchive.OpenToRead(ArchiveCommand.PathOf(parsed, archive));
            surroundings.Output.WriteLine($"head {opened.Backup(parsed.GetValue(target)!)}");
            return ExitStatus.Passed;
        }, cancellation));
        return command;
    }

    public static Command Stats(Surroundings surroundings)
    {
        Option<string?> archive = ArchiveCommand.Path();
        Option<bool> json = PlanOptions.Flag("--json", "one JSON document");
        var command = new Command("stats", "show what the archive holds, how large it is, and its head hash");
        command.Add(json, archive);
        command.SetAction((parsed, cancellation) => ArchiveCommand.Run(surroundings, () =>
        {
            using MeasurementArchive opened = MeasurementArchive.OpenToRead(ArchiveCommand.PathOf(parsed, archive));
            ArchiveStats stats = opened.Stats();
            surroundings.Output.Write(parsed.GetValue(json) ? ArchiveDocuments.Of(stats) + "\n" : Text(stats, surroundings));
            return ExitStatus.Passed;
        }, cancellation));
        return command;
    }

    private static int Write(string target, byte[] bytes, Surroundings to)
    {
        try
        {
            using var file = new FileStream(target, FileMode.CreateNew);
            file.Write(bytes);
        }
        catch (Exception fault) when (fault is IOException or UnauthorizedAccessException or ArgumentException)
        {
            to.Error.WriteLine(SafeText.Of(File.Exists(target) ? $"{target}: exists already; nothing was overwritten; give another name with --output" : $"{target}: {fault.Message}"));
            return ExitStatus.Unreadable;
        }
        to.Output.WriteLine(SafeText.Of(string.Create(CultureInfo.InvariantCulture, $"{target}: {bytes.Length} bytes")));
        return ExitStatus.Passed;
    }

    private static void Report(Verification check, bool headGiven, Surroundings to)
    {
        foreach (Damage damage in check.Damages)
            to.Output.WriteLine(SafeText.Of($"{damage.Where}: {damage.What}"));
        to.Output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{Counted(check.Records, "record")}, {Counted(check.Captures, "capture")}: {(check.IsSound ? "every link and every hash fits" : $"{Counted(check.Damages.Count, "thing")} above {(check.Damages.Count == 1 ? "does" : "do")} not fit")}"));
        to.Output.WriteLine($"head {check.Head}");
        if (check.KeptHeadIsRecord is { } at)
            to.Output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"the head that you kept is record {at}'s: {(check.IsSound ? "nothing up to it was changed" : "what was changed is named above")}, and {Counted(check.Records - at, "record")} came after"));
        else if (!headGiven)
            to.Output.WriteLine("a chain that somebody wrote wholly anew fits too: keep the head elsewhere, and give it with --head");
    }

    private static string Text(ArchiveStats stats, Surroundings to)
    {
        var sheet = new Sheet(to.Width(), to.Colour);
        string Count(long n) => n.ToString(CultureInfo.InvariantCulture);
        sheet.Columns(
        [
            ["archive", SafeText.Of(stats.Path)],
            ["entries", $"{Count(stats.Entries)}, {Counted(stats.Subjects, "subject")}: {string.Join(", ", stats.Outcomes.Select(o => $"{Count(o.Value)} {o.Key}"))}"],
            ["records", Count(stats.Records)],
            ["captures", $"{Count(stats.Captures)}, {Size(stats.CaptureBytes)} kept in {Size(stats.PackedBytes)}"],
            ["captured", stats.FirstCapturedAt is null ? "" : $"{stats.FirstCapturedAt[..10]} to {stats.LastCapturedAt![..10]}"],
            ["file", $"{Size(stats.FileBytes)}, schema {Count(stats.Schema)}"],
            ["head", stats.Head],
        ]);
        return sheet.ToString();
    }

    private static string Counted(long count, string what) => string.Create(CultureInfo.InvariantCulture, $"{count} {what}{(count == 1 ? "" : "s")}");

    private static string Size(long bytes) => bytes < 1000 ? $"{bytes.ToString(CultureInfo.InvariantCulture)} B" : Engineering.Format(bytes, "B", 3);
}
