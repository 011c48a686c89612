namespace ScopeReader.Files.Meaning;

/// <summary>Something that a preamble may say about the numbers below it.</summary>
internal enum Fact
{
    Interval,
    Rate,
    Start,
    Stop,
    Center,
    Span,
    Points,
    ResolutionBandwidth,
    ValueUnit,
    AxisUnit,
    Channel,
    DecimalMark,
    Detector,
    Averaging,
}
