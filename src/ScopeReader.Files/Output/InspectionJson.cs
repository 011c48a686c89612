using System.Text.Encodings.Web;
using System.Text.Json;

namespace ScopeReader.Files.Output;

/// <summary>How files were understood, as JSON for programs, version 1.</summary>
/// <param name="program">The program and its version.</param>
public sealed class InspectionJson(string program)
{
    private static readonly InspectionContext Indented = new(new JsonSerializerOptions(InspectionContext.Default.Options) { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping });

    private readonly List<InspectionObject> _captures = [];

    /// <summary>Adds a file that was read.</summary>
    public void Add(ImportReport report)
    {
        ArgumentNullException.ThrowIfNull(report);
        AxisReport axis = report.Axis;
        _captures.Add(new InspectionObject(report.File, null, report.Encoding, report.Delimiter, report.DecimalMark, report.PreambleLines, report.HeaderRows,
            new AxisObject(OutputWords.Of(axis.Source), axis.Unit, axis.Interval, axis.IntervalLow, axis.IntervalHigh, axis.WorstDeviation),
            [.. report.Channels.Select(c => new InspectedChannelObject(c.Name, c.Kind, c.Unit, c.Segment, c.Samples, c.Minimum, c.Maximum, c.Clipped, c.Missing))],
            report.Doubts, report.Remembered));
    }

    /// <summary>Adds a file that could not be read.</summary>
    /// <param name="file">The file as the person named it.</param>
    /// <param name="error">Why.</param>
    public void Add(string file, string error) => _captures.Add(new InspectionObject(file, error, null, null, null, null, null, null, [], [], []));

    /// <summary>The document of the files so far, in the order in which they were added.</summary>
    public string Document() => JsonSerializer.Serialize(new InspectionDocument("scopereader-inspection", 1, program, _captures), Indented.InspectionDocument);
}
