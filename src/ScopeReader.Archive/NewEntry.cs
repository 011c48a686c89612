namespace ScopeReader.Archive;

/// <summary>A measured capture on its way into the archive.</summary>
public sealed record NewEntry
{
    /// <summary>The file's name; folders are left out.</summary>
    public required string File { get; init; }

    /// <summary>The capture's original bytes.</summary>
    public required ReadOnlyMemory<byte> Bytes { get; init; }

    /// <summary>What was measured on them.</summary>
    public required Measurement Measurement { get; init; }

    /// <summary>What the measurement came from.</summary>
    public required MeasurementContext Context { get; init; }

    /// <summary>What the person states.</summary>
    public EntryDetails Details { get; init; } = EntryDetails.None;

    /// <summary>When the capture was taken.</summary>
    public required DateTimeOffset CapturedAt { get; init; }

    /// <summary>True where the person gave <see cref="CapturedAt"/>; false where it is the file's date.</summary>
    public bool CapturedAtIsGiven { get; init; }

    /// <summary>Who adds it.</summary>
    public required string By { get; init; }

    /// <summary>True to make a further entry of a capture that has one already.</summary>
    public bool Again { get; init; }
}
