namespace ScopeReader.Archive;

/// <summary>What an archive holds.</summary>
public sealed record ArchiveStats
{
    /// <summary>The file.</summary>
    public required string Path { get; init; }

    /// <summary>The schema's version.</summary>
    public required int Schema { get; init; }

    /// <summary>Entries.</summary>
    public required long Entries { get; init; }

    /// <summary>Records: entries, amendments, later measurements.</summary>
    public required long Records { get; init; }

    /// <summary>Captures, each kept once.</summary>
    public required long Captures { get; init; }

    /// <summary>Different subjects.</summary>
    public required long Subjects { get; init; }

    /// <summary>Bytes of the captures as they were.</summary>
    public required long CaptureBytes { get; init; }

    /// <summary>Bytes of the captures as they are kept.</summary>
    public required long PackedBytes { get; init; }

    /// <summary>Bytes of the file.</summary>
    public required long FileBytes { get; init; }

    /// <summary>When the earliest capture was taken, UTC, ISO 8601; null in an empty archive.</summary>
    public string? FirstCapturedAt { get; init; }

    /// <summary>When the latest capture was taken.</summary>
    public string? LastCapturedAt { get; init; }

    /// <summary>Entries by outcome.</summary>
    public required IReadOnlyDictionary<string, long> Outcomes { get; init; }

    /// <summary>Hash of the last record.</summary>
    public required string Head { get; init; }
}
