using ScopeReader.Captures;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Archive.Contents;

/// <summary>Turns a measurement into what is kept of it.</summary>
public static class ContentMaker
{
    /// <summary>What is kept of a measurement.</summary>
    public static MeasurementContent From(Measurement measurement, MeasurementContext context)
    {
        ArgumentNullException.ThrowIfNull(measurement);
        ArgumentNullException.ThrowIfNull(context);
        return new MeasurementContent
        {
            Program = context.Program,
            Plan = context.PlanText,
            Settings = context.Settings,
            Chain = context.Chain,
            Import = context.Import,
            Outcome = OutputWords.Of(measurement.Outcome),
            Cautions = measurement.Cautions,
            Doubts = measurement.Capture.Doubts,
            Channels = [.. measurement.Channels.Select(From)],
        };
    }

    private static ChannelContent From(ChannelMeasurement found)
    {
        var content = new ChannelContent
        {
            Name = found.Channel.Name,
            Kind = OutputWords.Kind(found.Channel),
            Unit = found.Channel.Unit,
            Segment = found.Channel.Segment,
            Samples = found.Channel.Count,
            Axis = "none",
            Readings = [.. found.Readings.Select(From)],
            NotMeasured = [.. found.NotMeasured.Select(n => new NotMeasuredContent(n.Quantity.Id, n.Code, n.Reason, n.AtMost, n.AtLeast))],
            Findings = [.. found.Findings.Select(f => new FindingContent(f.Code, f.Value, f.Text))],
            Verdicts = [.. found.Verdicts.Select(From)],
        };
        return found.Channel switch
        {
            Waveform { Axis: { IsTimed: true } axis } => content with
            {
                Axis = OutputWords.Of(axis.Source),
                Start = axis.Start,
                Interval = axis.Interval,
                IntervalLow = axis.IntervalLow,
                IntervalHigh = axis.IntervalHigh,
            },
            SpectrumTrace trace => content with { Axis = OutputWords.Of(trace.Source), Start = trace.Frequencies[0], Interval = trace.EvenStep },
            _ => content,
        };
    }

    private static ReadingContent From(Reading reading) => new()
    {
        Quantity = reading.Quantity.Id,
        Value = reading.Value,
        Unit = reading.Unit,
        StandardUncertainty = reading.Budget.StandardUncertainty,
        ExpandedUncertainty = reading.Budget.ExpandedUncertainty,
        CoverageFactor = reading.Budget.CoverageFactor,
        DegreesOfFreedom = reading.Budget.DegreesOfFreedom,
        Repeatability = reading.Budget.Repeatability,
        Missing = reading.Budget.Missing,
        Method = reading.Method,
        Primary = reading.IsPrimary,
        Count = reading.Count,
        Expected = reading.Expected,
        Note = reading.Note,
        Budget = [.. reading.Budget.Terms.Select(t => new BudgetTermContent(
            t.Name, t.Value, OutputWords.Of(t.Distribution), t.Sensitivity, t.Contribution, t.DegreesOfFreedom, t.OfChain))],
    };

    private static VerdictContent From(Verdict verdict) => new()
    {
        Quantity = verdict.Limit.Quantity.Id,
        Low = verdict.Limit.Low,
        High = verdict.Limit.High,
        Unit = OutputWords.Unit(verdict),
        Value = verdict.Reading?.Value,
        ExpandedUncertainty = verdict.Reading?.Budget.ExpandedUncertainty,
        Rule = OutputWords.Of(verdict.Limit.Rule),
        Guard = verdict.Limit.Guard,
        Probability = verdict.Probability,
        Outcome = OutputWords.Of(verdict.Outcome),
        Reason = verdict.Reason,
        LimitLine = verdict.Line is { } place ? new LimitLineContent(place.Line.Name, OutputWords.Of(place.Line.Side), place.Line.Unit, place.Frequency, place.Level, place.LineLevel) : null,
    };
}
