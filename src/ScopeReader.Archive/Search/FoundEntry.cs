using System.Text.Json.Serialization;

namespace ScopeReader.Archive.Search;

/// <summary>An entry that a search found.</summary>
public sealed record FoundEntry
{
    /// <summary>Its number.</summary>
    [JsonPropertyName("id")]
    public required int Number { get; init; }

    /// <summary>What was measured.</summary>
    public string? Subject { get; init; }

    /// <summary>Its serial number.</summary>
    public string? Serial { get; init; }

    /// <summary>The capture's file name.</summary>
    public required string File { get; init; }

    /// <summary>When the capture was taken.</summary>
    public required DateTimeOffset CapturedAt { get; init; }

    /// <summary>When the entry was added.</summary>
    public required DateTimeOffset AddedAt { get; init; }

    /// <summary>Its tags.</summary>
    public required IReadOnlyList<string> Tags { get; init; }

    /// <summary>Its conditions.</summary>
    public required IReadOnlyDictionary<string, Condition> Conditions { get; init; }

    /// <summary>Hash of the capture's bytes.</summary>
    public required string Sha256 { get; init; }

    /// <summary>How the limits came out.</summary>
    public required string Outcome { get; init; }

    /// <summary>Primary readings of the latest measurement.</summary>
    public required IReadOnlyList<FoundReading> Readings { get; init; }
}
