using ScopeReader.Archive.Contents;

namespace ScopeReader.Archive;

/// <summary>Entries that are hashed and compressed, ready to be written.</summary>
public sealed class PreparedEntries
{
    internal PreparedEntries(IReadOnlyList<PreparedEntry> entries) => Entries = entries;

    internal IReadOnlyList<PreparedEntry> Entries { get; }
}

internal sealed record PreparedEntry(byte[] Sha256, long Length, byte[] Packed, EntryContent Content, byte[] Json, byte[] PackedJson, bool Again);
