namespace ScopeReader.Archive.Contents;

/// <summary>What a record of kind <c>entry</c> holds.</summary>
public sealed record EntryContent
{
    /// <summary>Who added it.</summary>
    public required string By { get; init; }

    /// <summary>The capture's file name, without folders.</summary>
    public required string File { get; init; }

    /// <summary>Hash of the original bytes, lower-case hexadecimal.</summary>
    public required string Sha256 { get; init; }

    /// <summary>How many bytes.</summary>
    public required long Bytes { get; init; }

    /// <summary>When the capture was taken.</summary>
    public required DateTimeOffset CapturedAt { get; init; }

    /// <summary>Who says so: <c>given</c> by the person, or <c>file</c> for the file's date.</summary>
    public required string CapturedAtSource { get; init; }

    /// <summary>What the person stated.</summary>
    public required EntryDetails Details { get; init; }

    /// <summary>The first measurement.</summary>
    public required MeasurementContent Measurement { get; init; }
}
