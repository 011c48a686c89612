using System.Text.Json;
using ScopeReader.Captures;

namespace ScopeReader.Archive.Contents;

/// <summary>A measurement as it is kept: what was asked for, how the file was read, and everything that came out.</summary>
public sealed record MeasurementContent
{
    /// <summary>Name and version of the program that measured.</summary>
    public required string Program { get; init; }

    /// <summary>The plan's text as it was; null without a plan.</summary>
    public string? Plan { get; init; }

    /// <summary>What the command line asked for beside the plan.</summary>
    public MeasurementSettings Settings { get; init; } = MeasurementSettings.None;

    /// <summary>The measuring chain as the plan stated it.</summary>
    public required MeasuringChain Chain { get; init; }

    /// <summary>How the file was read, as <c>inspect --json</c> has it.</summary>
    public JsonElement? Import { get; init; }

    /// <summary>pass, fail, undecided, error or unjudged.</summary>
    public required string Outcome { get; init; }

    /// <summary>Safety notices.</summary>
    public IReadOnlyList<string> Cautions { get; init; } = [];

    /// <summary>What the reader assumed or noticed.</summary>
    public IReadOnlyList<string> Doubts { get; init; } = [];

    /// <summary>What was found, channel by channel.</summary>
    public required IReadOnlyList<ChannelContent> Channels { get; init; }

    /// <summary>The primary reading of a quantity on the first channel that has it, or null.</summary>
    /// <param name="quantity">The quantity's identifier.</param>
    /// <param name="channel">This channel only; null for any.</param>
    public ReadingContent? Primary(string quantity, string? channel = null) => Channels
        .Where(c => channel is null || c.Name == channel)
        .SelectMany(c => c.Readings)
        .FirstOrDefault(r => r.Primary && r.Quantity == quantity);
}
