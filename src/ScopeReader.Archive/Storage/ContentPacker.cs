using ScopeReader.Archive.Packing;
using ZstdSharp;

namespace ScopeReader.Archive.Storage;

/// <summary>Compresses the JSON of records.</summary>
internal static class ContentPacker
{
    private const int Largest = 1 << 28;

    public static byte[] Pack(ReadOnlySpan<byte> content)
    {
        Compressor compressor = Zstandard.Compressor;
        return compressor.Wrap(content).ToArray();
    }

    public static byte[] Unpack(ReadOnlySpan<byte> packed)
    {
        try
        {
            Decompressor decompressor = Zstandard.Decompressor;
            return decompressor.Unwrap(packed, Largest).ToArray();
        }
        catch (Exception fault) when (fault is ZstdException or ArgumentException)
        {
            throw new InvalidDataException($"does not unpack ({fault.Message})", fault);
        }
    }
}
