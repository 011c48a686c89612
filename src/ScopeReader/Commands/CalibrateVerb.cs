using System.CommandLine;
using ScopeReader.Readings;

namespace ScopeReader.Commands;

/// <summary><c>calibrate FILE --reference 10MHz --reference-uncertainty 0.01ppm</c>: the timebase's error from a capture of a known source.</summary>
internal static class CalibrateVerb
{
    public static Command Create(Surroundings surroundings)
    {
        var file = new Argument<string>("FILE") { Description = "a capture of the reference, taken as the others will be" };
        var plan = new PlanOptions();
        Option<string?> reference = PlanOptions.Value("--reference", "FREQUENCY", "the reference's true frequency, such as 10MHz");
        Option<string?> uncertainty = PlanOptions.Value("--reference-uncertainty", "PPM", "its standard uncertainty, such as 0.01ppm");
        Option<string?> ageing = PlanOptions.Value("--ageing", "PPM/YEAR", "bound of the timebase's change with time, such as 1ppm/year");
        Option<string?> channel = PlanOptions.Value("--channel", "NAME", "the channel that the reference is on");
        Option<string?> into = PlanOptions.Value("--into", "PLAN", "write the keys into this plan; its comments stay");
        var command = new Command("calibrate", "find the timebase's error from a capture of a known source, as keys for a plan");
        command.Arguments.Add(file);
        plan.AddTo(command);
        foreach (Option option in (Option[])[reference, uncertainty, ageing, channel, into])
            command.Options.Add(option);
        command.SetAction((parsed, cancellation) =>
        {
            double frequency = Needed(parsed, reference, "Hz"), ppm = Needed(parsed, uncertainty, "ppm");
            if (frequency <= 0)
                throw new UsageException($"--reference: expected more than zero, found \"{parsed.GetValue(reference)}\"");
            double? perYear = parsed.GetValue(ageing) is null ? null : Needed(parsed, ageing, "ppm/year");
            var run = new CalibrateRun(surroundings, plan.Read(parsed, surroundings.Today), parsed.GetValue(channel), frequency, ppm, perYear, parsed.GetValue(into));
            string named = MeasureVerb.CheckedFiles([parsed.GetValue(file)!])[0];
            // On a thread of the pool, so that Ctrl-C finds somebody who listens.
            return Task.Run(() => run.Calibrate(named, cancellation), cancellation);
        });
        return command;
    }

    private static double Needed(ParseResult parsed, Option<string?> option, string unit)
    {
        string text = parsed.GetValue(option) ?? throw new UsageException($"calibrate needs {option.Name}: {option.Description}");
        if (!Units.TryParse(text, unit, out double value, out string problem))
            throw new UsageException($"{option.Name}: {problem}");
        return value >= 0 ? value : throw new UsageException($"{option.Name}: expected zero or more, found \"{text}\"");
    }
}
