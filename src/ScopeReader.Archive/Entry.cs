using ScopeReader.Archive.Contents;

namespace ScopeReader.Archive;

/// <summary>An entry as its records leave it, with the way there.</summary>
public sealed record Entry
{
    /// <summary>Its number, from 1.</summary>
    public required int Number { get; init; }

    /// <summary>The capture's file name.</summary>
    public required string File { get; init; }

    /// <summary>Hash of the capture's bytes, lower-case hexadecimal.</summary>
    public required string Sha256 { get; init; }

    /// <summary>How many bytes the capture has.</summary>
    public required long Bytes { get; init; }

    /// <summary>When the capture was taken.</summary>
    public required DateTimeOffset CapturedAt { get; init; }

    /// <summary>Who says so: given, or file.</summary>
    public required string CapturedAtSource { get; init; }

    /// <summary>When the entry was added, UTC.</summary>
    public required DateTimeOffset AddedAt { get; init; }

    /// <summary>What is stated of it, corrections included.</summary>
    public required EntryDetails Details { get; init; }

    /// <summary>Its latest measurement.</summary>
    public required MeasurementContent Measurement { get; init; }

    /// <summary>Everything that happened to it, oldest first.</summary>
    public required IReadOnlyList<EntryEvent> History { get; init; }
}
