namespace ScopeReader.Archive.Contents;

/// <summary>What a measurement was asked for beside its plan; with the plan and the bytes it can be repeated.</summary>
public sealed record MeasurementSettings
{
    /// <summary>Nothing beside the plan.</summary>
    public static MeasurementSettings None { get; } = new();

    /// <summary>Nominal frequency, Hz.</summary>
    public double? Nominal { get; init; }

    /// <summary>The one channel that was judged.</summary>
    public string? Channel { get; init; }

    /// <summary>Sample interval that the person stated, s.</summary>
    public double? Interval { get; init; }

    /// <summary>Number of the segment that was measured.</summary>
    public int? Segment { get; init; }

    /// <summary>The [import] table that the capture was read with, TOML: the plan's, the command line's and the folder's together.</summary>
    public string? HowRead { get; init; }

    /// <summary>The day that ageing was counted to.</summary>
    public DateOnly? AsOf { get; init; }
}
