using System.Security.Cryptography;
using ScopeReader.Archive.Packing;
using ScopeReader.Archive.Storage;

namespace ScopeReader.Archive;

public sealed partial class MeasurementArchive
{
    /// <summary>An entry with its history.</summary>
    /// <exception cref="ArchiveException">There is no such entry, or its records are damaged.</exception>
    public Entry Show(int number) => Guard(() => Load(number));

    /// <summary>The original bytes of an entry's capture, checked against their hash.</summary>
    /// <exception cref="ArchiveException">There is no such entry, or its bytes are damaged.</exception>
    public byte[] Extract(int number) => Guard(() =>
    {
        Entry entry = Load(number);
        return Bytes(entry.Sha256, $"the capture of entry {number}");
    });

    private Entry Load(int number, long upTo = long.MaxValue)
    {
        try
        {
            return EntryFolder.Fold(_ledger.OfEntry(number).Where(r => r.Record.Number < upTo)) ?? throw new ArchiveException(Path, $"there is no entry {number}; archive find lists them");
        }
        catch (InvalidDataException fault)
        {
            throw new ArchiveException(Path, $"entry {number} is damaged: {fault.Message}; run archive verify", fault);
        }
    }

    private byte[] Bytes(string sha256, string what)
    {
        byte[] hash = Convert.FromHexString(sha256);
        try
        {
            byte[] bytes = CapturePacker.Unpack(_ledger.Capture(hash) ?? throw new InvalidDataException("its bytes are not in the archive"));
            return SHA256.HashData(bytes).AsSpan().SequenceEqual(hash) ? bytes : throw new InvalidDataException("its bytes do not have the hash that was recorded");
        }
        catch (InvalidDataException fault)
        {
            throw new ArchiveException(Path, $"{what} is damaged: {fault.Message}; run archive verify", fault);
        }
    }
}
