namespace ScopeReader.Archive;

/// <summary>What checking a whole archive found.</summary>
public sealed record Verification
{
    /// <summary>Records in the ledger.</summary>
    public required long Records { get; init; }

    /// <summary>Captures kept.</summary>
    public required long Captures { get; init; }

    /// <summary>Hash of the last record.</summary>
    public required string Head { get; init; }

    /// <summary>What does not fit; empty for a sound archive.</summary>
    public required IReadOnlyList<Damage> Damages { get; init; }

    /// <summary>The record that has the hash which was kept elsewhere; null where none was given or none has it.</summary>
    public long? KeptHeadIsRecord { get; init; }

    /// <summary>True where every link and every hash fits.</summary>
    public bool IsSound => Damages.Count == 0;
}
