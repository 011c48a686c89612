using System.Text.Json.Serialization;

namespace ScopeReader.Files.Output;

// A comparison as programs read it, version 1. Names and order of the properties are the contract; fields may be added.

internal sealed record ComparisonDocument(string Format, int Version, string Program, string? Reference, IReadOnlyList<CaptureObject> Captures,
    IReadOnlyList<DifferenceObject> Differences, IReadOnlyList<FindingObject> Findings, IReadOnlyList<ReadingObject> Readings, IReadOnlyList<NotMeasuredObject> NotMeasured);

// Significant is null where a chain term that the difference depends on is not stated.
internal sealed record DifferenceObject(string Quantity, string Unit, string File, string Channel, double Reference, double Value, double Difference,
    double? ExpandedUncertainty, bool? Significant, double? Ratio, int ReferenceCount, int Count, IReadOnlyList<string> Missing);

[JsonSourceGenerationOptions(PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase, NewLine = "\n", WriteIndented = true)]
[JsonSerializable(typeof(ComparisonDocument))]
internal sealed partial class ComparisonContext : JsonSerializerContext;
