using ScopeReader.Readings;

namespace ScopeReader.Commands.Tables;

/// <summary>A measurement for people: the answer first, then the numbers behind it, then what to know and to mind.</summary>
internal static class MeasurementTable
{
    /// <summary>The whole of a file's measurement as text.</summary>
    /// <param name="measurement">What was measured.</param>
    /// <param name="plan">The plan.</param>
    /// <param name="explain">Whether each reading's budget is shown.</param>
    /// <param name="width">Columns of a line.</param>
    /// <param name="colour">Whether it shows colours.</param>
    public static string Of(Measurement measurement, Plan plan, bool explain, int width, bool colour)
    {
        var sheet = new Sheet(width, colour);
        bool several = measurement.Channels.Count > 1;
        sheet.Heading(SafeText.Of(measurement.Capture.File));
        if (Subject(plan) is { Length: > 0 } subject)
            sheet.Line(subject);
        if (NoneApplied(measurement, plan) is { } none)
            sheet.Line(none);
        foreach (ChannelMeasurement channel in measurement.Channels)
        {
            sheet.Line($"{Phrases.Name(channel.Channel)}: {Phrases.Of(channel.Channel)}");
            VerdictSection.Write(sheet, channel.Verdicts);
        }
        foreach (ChannelMeasurement channel in measurement.Channels)
            Channel(sheet, channel, several, explain);
        Sentences(sheet, "Doubts", measurement.Capture.Doubts);
        Sentences(sheet, "Take care", measurement.Cautions);
        return sheet.ToString();
    }

    /// <summary>Why no limit of the plan concerned the capture; null where one did, or none is set.</summary>
    public static string? NoneApplied(Measurement measurement, Plan plan)
    {
        if (!plan.HasLimits || measurement.Channels.Any(c => c.Verdicts.Any(v => v.Outcome != Limits.VerdictOutcome.NotApplicable)))
            return null;
        string[] wanted = [.. plan.Limits.Select(l => l.Channel ?? plan.Channel).Append(plan.LimitLines.Count > 0 ? plan.Channel : null).OfType<string>().Distinct().Where(n => measurement.Channels.All(c => c.Channel.Name != n))];
        return wanted.Length == 0
            ? "NOT JUDGED  none of the plan's limits is on a quantity that this kind of capture has"
            : $"NOT JUDGED  the plan's limits are for {SafeText.Of(string.Join(", ", wanted))}, and this capture has {SafeText.Of(string.Join(", ", measurement.Channels.Select(c => c.Channel.Name)))}";
    }

    private static void Channel(Sheet sheet, ChannelMeasurement channel, bool several, bool explain)
    {
        if (several)
            sheet.Heading($"— {Phrases.Name(channel.Channel)} —");
        if (channel.Findings.Count > 0)
            Sentences(sheet, "Findings", [.. channel.Findings.Select(f => f.Text)]);
        ReadingSection.Write(sheet, channel.Readings);
        if (channel.NotMeasured.Count > 0)
        {
            sheet.Heading("Not measured");
            // Each harmonic's reason may name its own frequency: one of them stands for all that share the code.
            foreach (IGrouping<string, NotMeasured> same in channel.NotMeasured.GroupBy(n => Phrases.HarmonicNumber(n.Quantity) > 0 ? n.Code : n.Reason))
            {
                string reason = same.First().Reason;
                sheet.Line(Phrases.List(same.Select(n => n.Quantity)));
                sheet.Indented(SafeText.Of(same.All(n => n.Reason == reason) ? reason : $"{reason}; likewise the others"));
            }
        }
        if (explain)
            BudgetSection.Write(sheet, channel.Readings);
    }

    private static string Subject(Plan plan)
    {
        var parts = new List<string>();
        if (plan.Subject is { } subject)
            parts.Add(SafeText.Of(subject));
        if (plan.Serial is { } serial)
            parts.Add($"serial {SafeText.Of(serial)}");
        if (plan.Nominal is { } nominal)
            parts.Add($"nominal {Phrases.Number(nominal, "Hz", 9)}");
        return string.Join(", ", parts);
    }

    private static void Sentences(Sheet sheet, string heading, IReadOnlyList<string> sentences)
    {
        if (sentences.Count == 0)
            return;
        sheet.Heading(heading);
        foreach (string sentence in sentences)
            sheet.Columns([["-", SafeText.Of(sentence)]]);
    }
}
