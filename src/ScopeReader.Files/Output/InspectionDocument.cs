using System.Text.Json.Serialization;

namespace ScopeReader.Files.Output;

// How files were understood, as programs read it. Names and order of the properties are the contract.

internal sealed record InspectionDocument(string Format, int Version, string Program, IReadOnlyList<InspectionObject> Captures);

internal sealed record InspectionObject(string File, string? Error, string? Encoding, string? Delimiter, string? DecimalMark, int? PreambleLines, int? HeaderRows,
    AxisObject? Axis, IReadOnlyList<InspectedChannelObject> Channels, IReadOnlyList<string> Doubts, IReadOnlyList<string> Remembered);

internal sealed record AxisObject(string Source, string Unit, double? Interval, double? IntervalLow, double? IntervalHigh, double? WorstDeviation);

internal sealed record InspectedChannelObject(string Name, string Kind, string Unit, int Segment, int Samples, double Minimum, double Maximum, int Clipped, int Missing);

[JsonSourceGenerationOptions(PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase, NewLine = "\n", WriteIndented = true)]
[JsonSerializable(typeof(InspectionDocument))]
internal sealed partial class InspectionContext : JsonSerializerContext;
