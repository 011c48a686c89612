using System.Text.Encodings.Web;
using System.Text.Json;
using ScopeReader.Captures;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Files.Output;

/// <summary>Measurements as JSON for programs, version 1.</summary>
/// <remarks>Keeps what it writes and not the samples, so that many captures fit.</remarks>
/// <param name="program">The program and its version.</param>
/// <param name="explain">Whether each reading comes with its budget.</param>
public sealed class MeasurementJson(string program, bool explain)
{
    // Relaxed: ± and µ stay readable. Control characters are escaped all the same, and this JSON never stands inside a page.
    private static readonly MeasurementContext Indented = new(new JsonSerializerOptions(MeasurementContext.Default.Options)
    {
        WriteIndented = true,
        Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping,
    });

    private static readonly MeasurementContext OneLine = new(new JsonSerializerOptions(MeasurementContext.Default.Options) { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping });

    private readonly List<CaptureObject> _captures = [];
    private Outcome _worst;

    /// <summary>Adds a file to the document.</summary>
    public void Add(MeasuredFile file)
    {
        ArgumentNullException.ThrowIfNull(file);
        _captures.Add(Capture(file, explain));
        _worst = MeasuredFile.Worst(_worst, file.Outcome);
    }

    /// <summary>The document of the files so far, in the order in which they were added.</summary>
    public string Document() => JsonSerializer.Serialize(
        new MeasurementDocument("scopereader-measurement", 1, program, OutputWords.Of(_worst), _captures), Indented.MeasurementDocument);

    /// <summary>One file's capture object, on one line.</summary>
    /// <param name="file">The file.</param>
    /// <param name="explain">Whether each reading comes with its budget.</param>
    public static string Line(MeasuredFile file, bool explain)
    {
        ArgumentNullException.ThrowIfNull(file);
        return JsonSerializer.Serialize(Capture(file, explain), OneLine.CaptureObject);
    }

    internal static CaptureObject Capture(MeasuredFile file, bool explain) => file.Measurement is { } m
        ? new CaptureObject(file.File, m.Capture.Sha256, file.Error, m.Cautions, m.Capture.Doubts, [.. m.Channels.Select(c => Channel(c, explain))])
        : new CaptureObject(file.File, null, file.Error, [], [], []);

    private static ChannelObject Channel(ChannelMeasurement measured, bool explain)
    {
        Channel channel = measured.Channel;
        (double start, double? interval) = Axis(channel);
        return new ChannelObject(channel.Name, OutputWords.Kind(channel), channel.Unit, channel.Segment, channel.Count, interval, start,
            [.. measured.Readings.Select(r => Reading(r, explain))],
            [.. measured.NotMeasured.Select(n => new NotMeasuredObject(n.Quantity.Id, n.Code, n.Reason, Finite(n.AtMost), Finite(n.AtLeast)))],
            [.. measured.Findings.Select(f => new FindingObject(f.Code, f.Value, f.Text, f.Level, f.Locked))],
            [.. measured.Verdicts.Select(Verdict)]);
    }

    private static (double Start, double? Interval) Axis(Channel channel) => channel switch
    {
        Waveform { Axis.IsTimed: true } waveform => (waveform.Axis.Start, waveform.Axis.Interval),
        SpectrumTrace trace => (trace.Frequencies[0], trace.EvenStep),
        _ => (0, null),
    };

    internal static ReadingObject Reading(Reading reading, bool explain)
    {
        Budget budget = reading.Budget;
        return new ReadingObject(reading.Quantity.Id, reading.Value, reading.Unit, Finite(budget.StandardUncertainty), Finite(budget.ExpandedUncertainty),
            Budget.Coverage, Finite(budget.CoverageFactor), Finite(budget.DegreesOfFreedom), Finite(budget.Repeatability), budget.Missing,
            reading.Method, reading.IsPrimary, reading.Count, reading.Expected, explain ? [.. budget.Terms.Select(Term)] : null);
    }

    private static BudgetObject Term(BudgetTerm term) =>
        new(term.Name, term.Value, OutputWords.Of(term.Distribution), term.Sensitivity, term.Contribution, Finite(term.DegreesOfFreedom));

    private static VerdictObject Verdict(Verdict verdict) =>
        new(verdict.Limit.Quantity.Id, verdict.Limit.Low, verdict.Limit.High, OutputWords.Unit(verdict), verdict.Reading?.Value,
            Finite(verdict.Reading?.Budget.ExpandedUncertainty), OutputWords.Of(verdict.Limit.Rule), verdict.Limit.Guard, Finite(verdict.Probability),
            OutputWords.Of(verdict.Outcome), verdict.Reason, verdict.Line is { } place ? Line(place) : null);

    private static LimitLineObject Line(LinePlace place) =>
        new(place.Line.Name, OutputWords.Of(place.Line.Side), place.Line.Unit, Finite(place.Frequency), Finite(place.Level), Finite(place.LineLevel));

    // JSON has no infinity: infinitely many degrees of freedom, or an uncertainty that overflowed, is null.
    private static double? Finite(double? value) => value is { } v && double.IsFinite(v) ? v : null;
}
