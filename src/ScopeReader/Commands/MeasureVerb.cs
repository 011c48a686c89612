using System.CommandLine;
using System.Globalization;
using ScopeReader.Commands.Archive;

namespace ScopeReader.Commands;

/// <summary><c>measure FILE…</c>: reads, measures, judges.</summary>
internal static class MeasureVerb
{
    private const int MostJobs = 256;

    public static Command Create(Surroundings surroundings)
    {
        var files = new Argument<string[]>("FILE") { Description = "captures; - is standard input", Arity = ArgumentArity.OneOrMore };
        var plan = new PlanOptions();
        Option<string?> channel = PlanOptions.Value("--channel", "NAME", "measure only this channel");
        Option<string?> jobs = PlanOptions.Value("--jobs", "N", "files measured at the same time; 1");
        Option<bool> explain = PlanOptions.Flag("--explain", "show each reading's uncertainty budget");
        Option<bool> json = PlanOptions.Flag("--json", "one JSON document"), jsonl = PlanOptions.Flag("--jsonl", "a JSON object a line, as the files finish");
        Option<bool> csv = PlanOptions.Flag("--csv", "CSV, a row a reading"), quiet = PlanOptions.Flag("--quiet", "the verdicts only, a line each");
        Option<bool> noColour = CommandLine.NoColour(), keep = PlanOptions.Flag("--keep", "keep the captures in the archive too, as archive add does");
        Option<string?> archive = ArchiveCommand.Path();

        var command = new Command("measure", "read, measure and judge captures");
        command.Arguments.Add(files);
        plan.AddTo(command);
        foreach (Option option in (Option[])[channel, explain, json, jsonl, csv, quiet, noColour, jobs, keep, archive])
            command.Options.Add(option);

        command.SetAction((parsed, cancellation) =>
        {
            string[] named = CheckedFiles(parsed.GetValue(files)!);
            Option<bool>[] forms = [.. new[] { json, jsonl, csv, quiet }.Where(parsed.GetValue)];
            if (forms.Length > 1)
                throw new UsageException($"{forms[0].Name} and {forms[1].Name} are two forms of the output; keep one of them");
            if (parsed.GetValue(explain) && forms.Length == 1 && (forms[0] == csv || forms[0] == quiet))
                throw new UsageException($"--explain shows budgets in the table and in --json; {forms[0].Name} has no place for them");
            var run = new MeasureRun(surroundings with { Colour = surroundings.Colour && !parsed.GetValue(noColour) }, plan.Read(parsed, surroundings.Today),
                parsed.GetValue(channel), parsed.GetValue(explain));
            IMeasureOutput output = forms switch
            {
                [var form] when form == json => new JsonOutput(run),
                [var form] when form == jsonl => new JsonLinesOutput(run),
                [var form] when form == csv => new CsvOutput(run),
                [_] => new QuietOutput(run),
                _ => new TableOutput(run),
            };
            if (parsed.GetValue(keep))
                return KeepRun.Measure(run, named, plan.Text(parsed), ArchiveCommand.PathOf(parsed, archive), output, cancellation);
            if (parsed.GetValue(archive) is not null)
                throw new UsageException("--archive says where --keep keeps; add --keep or leave it out");
            return run.Measure(named, Jobs(parsed.GetValue(jobs)), output, cancellation);
        });
        return command;
    }

    /// <summary>The files, none of them without a name, and standard input at most once.</summary>
    public static string[] CheckedFiles(string[] files)
    {
        if (files.Any(f => f.Length == 0))
            throw new UsageException("a file's name is empty");
        return files.Count(f => f == "-") > 1 ? throw new UsageException("standard input (-) can be read once") : files;
    }

    private static int Jobs(string? text)
    {
        if (text is null)
            return 1;
        return int.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out int jobs) && jobs is >= 1 and <= MostJobs
            ? jobs
            : throw new UsageException($"--jobs: expected a whole number from 1 to {MostJobs.ToString(CultureInfo.InvariantCulture)}, found \"{text}\"");
    }
}
