using System.Text.Json;
using ScopeReader.Archive.Contents;
using ScopeReader.Captures;

namespace ScopeReader.Archive;

/// <summary>What a measurement came from, kept beside its numbers.</summary>
public sealed record MeasurementContext
{
    /// <summary>Name and version of the program.</summary>
    public required string Program { get; init; }

    /// <summary>The plan's text; null without one.</summary>
    public string? PlanText { get; init; }

    /// <summary>What was asked for beside the plan.</summary>
    public MeasurementSettings Settings { get; init; } = MeasurementSettings.None;

    /// <summary>The chain that the measurement counted with.</summary>
    public MeasuringChain Chain { get; init; } = MeasuringChain.Unknown;

    /// <summary>How the file was read; null where that was not recorded.</summary>
    public JsonElement? Import { get; init; }
}
