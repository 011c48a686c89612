using ScopeReader.Captures;
using ScopeReader.Edges;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader;

/// <summary>How a whole measurement came out.</summary>
public enum Outcome
{
    /// <summary>No limit was set.</summary>
    Unjudged,

    /// <summary>Every limit that applied passed.</summary>
    Pass,

    /// <summary>None failed, one is undecided.</summary>
    Undecided,

    /// <summary>A limit failed.</summary>
    Fail,

    /// <summary>A limited quantity could not be measured, or no limit applied.</summary>
    Error,
}

/// <summary>What was found on one channel.</summary>
/// <param name="Channel">The channel.</param>
/// <param name="Readings">Its readings.</param>
/// <param name="NotMeasured">What the capture does not support, and why.</param>
/// <param name="Findings">What the numbers say.</param>
/// <param name="Verdicts">The limits that concern this channel, answered.</param>
public sealed record ChannelMeasurement(Channel Channel, IReadOnlyList<Reading> Readings, IReadOnlyList<NotMeasured> NotMeasured,
    IReadOnlyList<Finding> Findings, IReadOnlyList<Verdict> Verdicts)
{
    /// <summary>The averaged edges of a two-state waveform, the rising one first.</summary>
    public IReadOnlyList<MeasuredEdge> Edges { get; init; } = [];

    /// <summary>The primary reading of a quantity, or null.</summary>
    public Reading? Primary(Quantity quantity) => Readings.FirstOrDefault(r => r.IsPrimary && r.Quantity == quantity);
}

/// <summary>What was found in one capture.</summary>
/// <param name="Capture">The capture.</param>
/// <param name="Channels">Its channels' findings, in the capture's order.</param>
/// <param name="Cautions">Safety notices that this capture or plan gives reason for.</param>
/// <param name="Outcome">How the limits came out together.</param>
public sealed record Measurement(Capture Capture, IReadOnlyList<ChannelMeasurement> Channels, IReadOnlyList<string> Cautions, Outcome Outcome);
