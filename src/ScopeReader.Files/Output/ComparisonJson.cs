using System.Text.Encodings.Web;
using System.Text.Json;
using ScopeReader.Comparing;

namespace ScopeReader.Files.Output;

/// <summary>A comparison as JSON for programs, version 1.</summary>
public static class ComparisonJson
{
    private static readonly ComparisonContext Context = new(new JsonSerializerOptions(ComparisonContext.Default.Options) { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping });

    /// <summary>The document.</summary>
    /// <param name="program">The program and its version.</param>
    /// <param name="files">Every file, as <c>measure --json</c> has them.</param>
    /// <param name="comparison">What was found; null where too few files could be read to compare.</param>
    public static string Document(string program, IReadOnlyList<MeasuredFile> files, Comparison? comparison) => JsonSerializer.Serialize(
        new ComparisonDocument("scopereader-comparison", 1, program, comparison?.Reference.Name, [.. files.Select(f => MeasurementJson.Capture(f, explain: false))],
            [.. (comparison?.Differences ?? []).Select(Difference)],
            [.. (comparison?.Findings ?? []).Select(f => new FindingObject(f.Code, f.Value, f.Text, f.Level, f.Locked))],
            [.. (comparison?.Readings ?? []).Select(r => MeasurementJson.Reading(r, explain: true))],
            [.. (comparison?.NotMeasured ?? []).Select(n => new NotMeasuredObject(n.Quantity.Id, n.Code, n.Reason, null, null))]), Context.ComparisonDocument);

    private static DifferenceObject Difference(Difference d) => new(d.Quantity.Id, d.Unit, d.File, d.Channel, d.Reference, d.Value, d.Change,
        double.IsFinite(d.Budget.ExpandedUncertainty) ? d.Budget.ExpandedUncertainty : null, d.IsSignificant, d.Ratio, d.ReferenceCount, d.Count, d.Budget.Missing);
}
