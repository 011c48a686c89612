namespace ScopeReader.Archive.Contents;

/// <summary>What was found on one channel.</summary>
public sealed record ChannelContent
{
    /// <summary>The channel's name.</summary>
    public required string Name { get; init; }

    /// <summary>waveform or spectrum.</summary>
    public required string Kind { get; init; }

    /// <summary>Unit of its values.</summary>
    public required string Unit { get; init; }

    /// <summary>Number of the segment, from 1.</summary>
    public required int Segment { get; init; }

    /// <summary>How many samples or points.</summary>
    public required int Samples { get; init; }

    /// <summary>Sample interval, s, or distance of a spectrum trace's points, Hz; null where none is known or they are uneven.</summary>
    public double? Interval { get; init; }

    /// <summary>Shortest interval that the file allows, s.</summary>
    public double? IntervalLow { get; init; }

    /// <summary>Longest interval that the file allows, s.</summary>
    public double? IntervalHigh { get; init; }

    /// <summary>Instant of the first sample, s, or frequency of the first point, Hz.</summary>
    public double? Start { get; init; }

    /// <summary>Where the axis was found: column, preamble, option, none.</summary>
    public required string Axis { get; init; }

    /// <summary>The readings.</summary>
    public IReadOnlyList<ReadingContent> Readings { get; init; } = [];

    /// <summary>What the capture does not support, and why.</summary>
    public IReadOnlyList<NotMeasuredContent> NotMeasured { get; init; } = [];

    /// <summary>What the numbers say.</summary>
    public IReadOnlyList<FindingContent> Findings { get; init; } = [];

    /// <summary>The limits, answered.</summary>
    public IReadOnlyList<VerdictContent> Verdicts { get; init; } = [];
}
