using System.CommandLine;
using ScopeReader.Comparing;
using ScopeReader.Readings;

namespace ScopeReader.Commands;

/// <summary><c>compare FILE… [--with FILE…]</c>: the same node before and after.</summary>
internal static class CompareVerb
{
    public static Command Create(Surroundings surroundings)
    {
        var files = new Argument<string[]>("FILE") { Description = "captures; the first is the reference, or with --with all of them are repeats of it", Arity = ArgumentArity.OneOrMore };
        var with = new Option<string[]>("--with") { HelpName = "FILE…", Description = "repeats of the state that is compared: several a side show reproducibility", Arity = ArgumentArity.OneOrMore, AllowMultipleArgumentsPerToken = true };
        var plan = new PlanOptions();
        Option<string?> otherPlan = PlanOptions.Value("--with-plan", "FILE", "the plan of what is compared, where it was taken through another chain");
        Option<string?> channel = PlanOptions.Value("--channel", "NAME", "compare only this channel");
        Option<string?> added = PlanOptions.Value("--added", "CAPACITANCE", "a known capacitor, such as 47pF, that is across the node in the second capture only");
        Option<string?> tolerance = PlanOptions.Value("--added-tolerance", "PERCENT", "its tolerance, such as 5%");
        Option<bool> json = PlanOptions.Flag("--json", "one JSON document"), csv = PlanOptions.Flag("--csv", "CSV, a row a difference"), noColour = CommandLine.NoColour();

        var command = new Command("compare", "hold captures of one node against each other: differences, whether they are more than noise, and what they mean");
        command.Arguments.Add(files);
        command.Options.Add(with);
        plan.AddTo(command);
        foreach (Option option in (Option[])[otherPlan, channel, added, tolerance, json, csv, noColour])
            command.Options.Add(option);
        command.SetAction((parsed, cancellation) =>
        {
            string[] named = MeasureVerb.CheckedFiles(parsed.GetValue(files)!), others = MeasureVerb.CheckedFiles(parsed.GetValue(with) ?? []);
            if (named.Length + others.Length < 2)
                throw new UsageException("compare needs two captures or more: scopereader compare BEFORE AFTER");
            MeasureVerb.CheckedFiles([.. named, .. others]);
            if (parsed.GetValue(json) && parsed.GetValue(csv))
                throw new UsageException("--json and --csv are two forms of the output; keep one of them");
            string[][] sides = others.Length > 0 ? [named, others] : [.. named.Select(f => new[] { f })];
            Plan reference = plan.Read(parsed, surroundings.Today);
            var run = new CompareRun(surroundings with { Colour = surroundings.Colour && !parsed.GetValue(noColour) }, reference,
                parsed.GetValue(otherPlan) is { } file ? plan.Read(parsed, surroundings.Today, file) : null, parsed.GetValue(channel),
                Capacitor(parsed.GetValue(added), parsed.GetValue(tolerance), sides.Length));
            CompareForm form = parsed.GetValue(json) ? CompareForm.Json : parsed.GetValue(csv) ? CompareForm.Csv : CompareForm.Table;
            // On a thread of the pool, so that Ctrl-C finds somebody who listens.
            return Task.Run(() => run.Compare(sides, form, cancellation), cancellation);
        });
        return command;
    }

    private static AddedCapacitor? Capacitor(string? added, string? tolerance, int sides)
    {
        if (added is null)
            return tolerance is null ? null : throw new UsageException("--added-tolerance is the tolerance of --added, which is not given");
        if (sides != 2)
            throw new UsageException("--added compares two states, without and with the capacitor; give repeats of the second with --with");
        if (!Units.TryParse(added, "F", out double farad, out string problem))
            throw new UsageException($"--added: {problem}");
        if (farad <= 0)
            throw new UsageException($"--added: expected more than zero, found \"{added}\"");
        if (tolerance is null)
            return new AddedCapacitor(farad, null);
        if (!Units.TryParse(tolerance, "%", out double percent, out problem))
            throw new UsageException($"--added-tolerance: {problem}");
        return percent is >= 0 and < 100 ? new AddedCapacitor(farad, percent / 100) : throw new UsageException($"--added-tolerance: expected 0 to 100 %, found \"{tolerance}\"");
    }
}
