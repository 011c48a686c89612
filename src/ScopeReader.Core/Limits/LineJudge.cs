using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Harmonics;
using ScopeReader.Readings;

namespace ScopeReader.Limits;

/// <summary>Holds spectrum traces against limit lines: the least margin, where it is, and the verdict on it.</summary>
/// <remarks>
/// The margin is a reading like another: its uncertainty holds noise, level steps, the chain's gain and flatness, and what the
/// frequency's uncertainty makes of a slope. It is judged as a limit of 0 dB, under the line's rule and guard.
/// </remarks>
internal static class LineJudge
{
    private const string Method = "limit-line";

    /// <summary>The verdicts of one channel; the margins are written on the sheet.</summary>
    public static IEnumerable<Verdict> Channel(Plan plan, Channel channel, ReadingSheet sheet)
    {
        if (plan.LimitLines.Count == 0 || (plan.Channel ?? channel.Name) != channel.Name)
            return [];
        if (channel is not SpectrumTrace trace)
            return [.. plan.LimitLines.Select(line => Without(line, VerdictOutcome.NotApplicable, "limit lines are for spectrum traces"))];
        TraceLevels? levels = TraceLevels.Of(trace);
        var verdicts = new List<Verdict>();
        foreach (LimitLine line in plan.LimitLines)
            verdicts.Add(levels is null ? Without(line, VerdictOutcome.NotMeasured, $"the trace has {(trace.Unit.Length == 0 ? "no unit" : "the unit " + trace.Unit)}; expected dBm, dBV, dBµV, V or W") : Judged(line, levels, plan));
        if (verdicts.Where(v => v.Reading is not null).MinBy(v => v.Reading!.Value) is { } least)
            for (int i = 0; i < verdicts.Count; i++)
                if (verdicts[i].Reading is { } reading)
                {
                    verdicts[i] = verdicts[i] with { Reading = reading with { IsPrimary = ReferenceEquals(reading, least.Reading) } };
                    sheet.Add(verdicts[i].Reading!);
                }
        return verdicts;
    }

    private static Verdict Judged(LimitLine line, TraceLevels levels, Plan plan)
    {
        if (line.Stop < levels.Start || line.Start > levels.Stop)
            return Without(line, VerdictOutcome.NotMeasured, $"the line runs from {Hz(line.Start)} to {Hz(line.Stop)}, and the trace from {Hz(levels.Start)} to {Hz(levels.Stop)}");
        if (LineScale.Of(line, levels, plan) is not { } scale)
            return Without(line, VerdictOutcome.NotMeasured, line.Unit == "dBc"
                ? "the line is in dBc, and no carrier stands out of the noise"
                : $"the line is in {line.Unit} and the trace in {levels.Unit}: add impedance to [chain]");
        LineMargin worst = LineMargin.Worst(line, levels, scale);
        var reading = new Reading(Quantities.LimitLineMargin, worst.Margin, "dB", scale.Budget(worst.Terms), Method)
        {
            Note = string.Create(CultureInfo.InvariantCulture, $"{line.Name}: {worst.Level:F2} {line.Unit} at {Hz(worst.Frequency)}, where the line has {worst.LineLevel:F2} {line.Unit}"),
        };
        Verdict verdict = Judge.Reading(Bound(line), reading) with { Line = new LinePlace(line, worst.Frequency, worst.Level, worst.LineLevel) };
        if (verdict.Outcome == VerdictOutcome.Fail && worst.IsNoise && line.Side == LineSide.Upper)
            return verdict with { Outcome = VerdictOutcome.Undecided, Reason = "the trace's own noise reaches the line there: a narrower resolution bandwidth, or less attenuation, would decide it" };
        if (verdict.Outcome == VerdictOutcome.Pass && (levels.Start > line.Start || levels.Stop < line.Stop))
            return verdict with { Outcome = VerdictOutcome.Undecided, Reason = $"inside the line where the trace has it, and the trace covers {Hz(Math.Max(levels.Start, line.Start))} to {Hz(Math.Min(levels.Stop, line.Stop))} of {Hz(line.Start)} to {Hz(line.Stop)}" };
        return verdict;
    }

    private static Verdict Without(LimitLine line, VerdictOutcome outcome, string reason) =>
        new(Bound(line), outcome, null, null, reason) { Line = new LinePlace(line, double.NaN, double.NaN, double.NaN) };

    private static Limit Bound(LimitLine line) => new(Quantities.LimitLineMargin, 0, null) { Rule = line.Rule, Guard = line.Guard };

    private static string Hz(double frequency) => Engineering.Given(frequency, "Hz", 5);
}
