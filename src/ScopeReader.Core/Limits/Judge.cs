using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader.Limits;

/// <summary>Holds readings against limits.</summary>
/// <remarks>
/// Guarded rule: JCGM 106:2012, clause 8 (guard bands), with ISO 14253-1's proof of conformance and of non-conformance at
/// guard 1. Conformance probability: JCGM 106:2012, 7.4, from the reading's own error distribution.
/// </remarks>
public static class Judge
{
    /// <summary>The verdicts on one channel.</summary>
    /// <param name="plan">The plan, whose limits are judged.</param>
    /// <param name="channel">The channel.</param>
    /// <param name="sheet">What was measured on it.</param>
    public static IReadOnlyList<Verdict> Channel(Plan plan, Channel channel, ReadingSheet sheet)
    {
        ArgumentNullException.ThrowIfNull(plan);
        ArgumentNullException.ThrowIfNull(channel);
        ArgumentNullException.ThrowIfNull(sheet);
        CaptureKinds kind = channel is Waveform ? CaptureKinds.Waveform : CaptureKinds.Spectrum;
        // First, for a limit may be set on the margins that they give.
        IEnumerable<Verdict> lines = LineJudge.Channel(plan, channel, sheet);
        var verdicts = new List<Verdict>();
        foreach (Limit limit in plan.Limits)
            if ((limit.Channel ?? plan.Channel ?? channel.Name) == channel.Name)
                verdicts.Add(limit.Against(plan.Nominal) is { } absolute
                    ? Limit(absolute, kind, sheet)
                    : new Verdict(limit, VerdictOutcome.NotMeasured, null, null, "the limit is relative to a nominal frequency that nobody stated; add nominal to the plan, or give --nominal"));
        foreach (Verdict verdict in verdicts)
            if (Prospect.TooTight(verdict) is { } warning)
                sheet.Add(new Finding("limit-too-tight", warning, verdict.Limit.Quantity.Id));
        verdicts.AddRange(lines);
        return verdicts;
    }

    private static Verdict Limit(Limit limit, CaptureKinds kind, ReadingSheet sheet)
    {
        if (!limit.Quantity.Kinds.HasFlag(kind))
            return new Verdict(limit, VerdictOutcome.NotApplicable, null, null, kind == CaptureKinds.Waveform ? "a waveform does not have it" : "a spectrum trace does not have it");
        if (sheet.Primary(limit.Quantity) is { } reading)
            return Reading(limit, reading);
        NotMeasured? why = sheet.NotMeasured.FirstOrDefault(n => n.Quantity == limit.Quantity);
        // Too small to resolve is small enough for an upper limit that lies higher than what could have been resolved.
        if (why is { AtMost: { } bound } && limit.Low is null && bound <= limit.High)
            return new Verdict(limit, VerdictOutcome.Pass, null, null, $"too small to resolve, and so inside: {why.Reason}");
        if (why is { AtLeast: { } least } && limit.High is null && least >= limit.Low)
            return new Verdict(limit, VerdictOutcome.Pass, null, null, $"too large to resolve, and so inside: {why.Reason}");
        return new Verdict(limit, VerdictOutcome.NotMeasured, null, null, why?.Reason ?? "this capture does not show it");
    }

    /// <summary>The verdict on one reading.</summary>
    /// <param name="limit">The limit, in the reading's unit.</param>
    /// <param name="reading">A reading of the limit's quantity.</param>
    public static Verdict Reading(Limit limit, Reading reading)
    {
        ArgumentNullException.ThrowIfNull(limit);
        ArgumentNullException.ThrowIfNull(reading);
        if (reading.Quantity.Unit != reading.Unit && !IsUnstated(reading))
            return new Verdict(limit, VerdictOutcome.NotMeasured, reading, null,
                $"the limit is in {reading.Quantity.Unit} and the reading in {reading.Unit}" + (reading.Unit.Contains("sample", StringComparison.Ordinal) ? ": state the sample interval with --interval or --rate" : ""));

        Budget budget = reading.Budget;
        double value = reading.Value, low = limit.Low ?? double.NegativeInfinity, high = limit.High ?? double.PositiveInfinity;
        bool inside = value >= low && value <= high, complete = budget.Missing.Count == 0;
        // The true value is the reading less its error.
        double? probability = complete ? budget.Probability(value - low) - budget.Probability(value - high) : null;

        if (limit.Rule == DecisionRule.Simple)
            return new Verdict(limit, inside ? VerdictOutcome.Pass : VerdictOutcome.Fail, reading, probability,
                complete ? "on the value alone" : $"on the value as indicated: {Unstated(budget)}");
        if (!complete)
            return new Verdict(limit, VerdictOutcome.Undecided, reading, null, Unstated(budget));

        double guard = limit.Guard * budget.ExpandedUncertainty;
        if (value >= low + guard && value <= high - guard)
            return new Verdict(limit, VerdictOutcome.Pass, reading, probability, "inside the limit by the guard band or more");
        if (value < low - guard || value > high + guard)
            return new Verdict(limit, VerdictOutcome.Fail, reading, probability, "beyond the limit by more than the guard band");
        return new Verdict(limit, VerdictOutcome.Undecided, reading, probability, Prospect.OfDecision(reading, low, high, limit.Guard));
    }

    // A channel of a file without units is taken in the limit's.
    private static bool IsUnstated(Reading reading) => reading is { Quantity.Unit: "V", Unit: "" } or { Quantity.Unit: "V/s", Unit: "/s" };

    private static string Unstated(Budget budget) =>
        "not stated in the plan: " + string.Join(", ", budget.Missing.Select(name => $"{name} (add {PlanKeys.For(name)} to {PlanKeys.TableOf(name)})"));
}
