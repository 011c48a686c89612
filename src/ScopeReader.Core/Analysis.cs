using ScopeReader.Captures;
using ScopeReader.Edges;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader;

/// <summary>The one way from a capture and a plan to a measurement.</summary>
public static class Analysis
{
    /// <summary>Measures and judges every channel of a capture.</summary>
    /// <param name="capture">The capture.</param>
    /// <param name="plan">The plan; <see cref="Plan.Empty"/> for none.</param>
    /// <param name="progress">Told the share done, 0 to 1; may be null.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public static Measurement Measure(Capture capture, Plan plan, IProgress<double>? progress = null, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(capture);
        ArgumentNullException.ThrowIfNull(plan);
        var channels = new List<ChannelMeasurement>(capture.Channels.Count);
        foreach (Channel channel in capture.Channels)
        {
            cancellation.ThrowIfCancellationRequested();
            var sheet = new ReadingSheet();
            IReadOnlyList<MeasuredEdge> edges = [];
            switch (channel)
            {
                case Waveform waveform:
                    edges = WaveformAnalysis.Measure(new WaveformJob(waveform, plan, new ChainErrors(plan, waveform.Axis), sheet, cancellation));
                    break;
                case SpectrumTrace trace:
                    SpectrumAnalysis.Measure(trace, plan, sheet);
                    break;
            }
            channels.Add(new ChannelMeasurement(channel, sheet.Readings, sheet.NotMeasured, sheet.Findings, Judge.Channel(plan, channel, sheet)) { Edges = edges });
            progress?.Report((double)channels.Count / capture.Channels.Count);
        }
        return new Measurement(capture, channels, Cautions.For(capture, plan, channels), Summary(plan, channels));
    }

    private static Outcome Summary(Plan plan, List<ChannelMeasurement> channels)
    {
        if (!plan.HasLimits)
            return Outcome.Unjudged;
        HashSet<VerdictOutcome> outcomes = [.. channels.SelectMany(c => c.Verdicts).Select(v => v.Outcome)];
        outcomes.Remove(VerdictOutcome.NotApplicable);
        // Of several answers the one that needs attention first: unmeasured, failed, undecided, passed.
        return outcomes.Count == 0 || outcomes.Contains(VerdictOutcome.NotMeasured) ? Outcome.Error
            : outcomes.Contains(VerdictOutcome.Fail) ? Outcome.Fail
            : outcomes.Contains(VerdictOutcome.Undecided) ? Outcome.Undecided
            : Outcome.Pass;
    }
}
