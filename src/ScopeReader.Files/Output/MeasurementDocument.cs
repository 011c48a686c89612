using System.Text.Json.Serialization;

namespace ScopeReader.Files.Output;

// The measurement as programs read it, version 1. Names and order of the properties are the contract; fields may be
// added, and none is renamed or dropped without a new version.

internal sealed record MeasurementDocument(string Format, int Version, string Program, string Outcome, IReadOnlyList<CaptureObject> Captures);

internal sealed record CaptureObject(string File, string? Sha256, string? Error, IReadOnlyList<string> Cautions, IReadOnlyList<string> Doubts,
    IReadOnlyList<ChannelObject> Channels);

internal sealed record ChannelObject(string Name, string Kind, string Unit, int Segment, int Samples, double? Interval, double Start,
    IReadOnlyList<ReadingObject> Readings, IReadOnlyList<NotMeasuredObject> NotMeasured, IReadOnlyList<FindingObject> Findings,
    IReadOnlyList<VerdictObject> Verdicts);

internal sealed record ReadingObject(string Quantity, double Value, string Unit, double? StandardUncertainty, double? ExpandedUncertainty, double Coverage,
    double? CoverageFactor, double? DegreesOfFreedom, double? Repeatability, IReadOnlyList<string> Missing, string Method, bool Primary, int? Count,
    [property: JsonIgnore(Condition = JsonIgnoreCondition.WhenWritingNull)] double? Expected,
    [property: JsonIgnore(Condition = JsonIgnoreCondition.WhenWritingNull)] IReadOnlyList<BudgetObject>? Budget);

internal sealed record BudgetObject(string Term, double Value, string Distribution, double Sensitivity, double Contribution, double? DegreesOfFreedom);

internal sealed record NotMeasuredObject(string Quantity, string Code, string Reason,
    [property: JsonIgnore(Condition = JsonIgnoreCondition.WhenWritingNull)] double? AtMost = null,
    [property: JsonIgnore(Condition = JsonIgnoreCondition.WhenWritingNull)] double? AtLeast = null);

internal sealed record FindingObject(string Code, string? Value, string Text,
    [property: JsonIgnore(Condition = JsonIgnoreCondition.WhenWritingNull)] string? Level = null,
    [property: JsonIgnore(Condition = JsonIgnoreCondition.WhenWritingNull)] bool? Locked = null);

internal sealed record VerdictObject(string Quantity, double? Low, double? High, string Unit, double? Value, double? ExpandedUncertainty, string Rule,
    double Guard, double? Probability, string Outcome, string Reason,
    [property: JsonIgnore(Condition = JsonIgnoreCondition.WhenWritingNull)] LimitLineObject? LimitLine);

internal sealed record LimitLineObject(string Name, string Side, string Unit, double? Frequency, double? Level, double? LineLevel);

[JsonSourceGenerationOptions(PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase, NewLine = "\n")]
[JsonSerializable(typeof(MeasurementDocument))]
[JsonSerializable(typeof(CaptureObject))]
internal sealed partial class MeasurementContext : JsonSerializerContext;
