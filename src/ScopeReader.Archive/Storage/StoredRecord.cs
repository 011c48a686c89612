namespace ScopeReader.Archive.Storage;

/// <summary>A record as it lies in the ledger.</summary>
/// <param name="Record">What its hash covers.</param>
/// <param name="Hash">Its hash as stored.</param>
/// <param name="Packed">Its content, compressed.</param>
internal sealed record StoredRecord(LedgerRecord Record, string Hash, byte[] Packed)
{
    /// <summary>The content's JSON, UTF-8.</summary>
    /// <exception cref="InvalidDataException">It does not unpack.</exception>
    public byte[] Content => ContentPacker.Unpack(Packed);
}
