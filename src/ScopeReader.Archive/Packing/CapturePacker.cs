using ZstdSharp;

namespace ScopeReader.Archive.Packing;

/// <summary>Packs a capture's bytes small enough to keep for years, and gives back the same bytes.</summary>
/// <remarks>
/// <para>Text that is mostly rows of numbers is taken apart into columns (<see cref="TableCoder"/>); the streams that this
/// leaves, and any other bytes, go through Zstandard. Each block is unpacked again and compared before it is used: a block
/// whose columns do not come back byte for byte is kept as plain compressed bytes.</para>
/// <para>Cost: linear; memory: the bytes, and a few times one block.</para>
/// </remarks>
public static class CapturePacker
{
    private const byte Version = 1, Plain = 0, Table = 1;
    private const int BlockLength = 4 << 20;

    // Room for a block's text, one a thread: made anew for every capture it would be what the collector of garbage lives on.
    [ThreadStatic]
    private static PackWriter? _again;

    /// <summary>Packs bytes.</summary>
    /// <param name="bytes">Any bytes.</param>
    public static byte[] Pack(ReadOnlySpan<byte> bytes)
    {
        Compressor compressor = Zstandard.Compressor;
        var packed = new PackWriter(bytes.Length / 8 + 64);
        packed.Byte(Version);
        packed.Number((ulong)bytes.Length);
        while (!bytes.IsEmpty)
        {
            ReadOnlySpan<byte> block = bytes[..BlockEnd(bytes)];
            PackBlock(block, packed, compressor);
            bytes = bytes[block.Length..];
        }
        return packed.ToArray();
    }

    /// <summary>Gives the bytes back.</summary>
    /// <param name="packed">What <see cref="Pack"/> returned.</param>
    /// <exception cref="InvalidDataException">The packed bytes are damaged.</exception>
    public static byte[] Unpack(ReadOnlySpan<byte> packed)
    {
        try
        {
            Decompressor decompressor = Zstandard.Decompressor;
            var reader = new PackReader(packed);
            if (reader.Byte() != Version)
                throw new InvalidDataException("packed by another version");
            int length = reader.Count();
            var bytes = new PackWriter(Math.Min(length, 1 << 28));
            while (!reader.IsAtEnd)
            {
                byte coding = reader.Byte();
                ReadOnlySpan<byte> block = reader.Block();
                if (coding == Table)
                    TableCoder.Decode(block, bytes, decompressor);
                else if (coding == Plain)
                    bytes.Bytes(decompressor.Unwrap(block));
                else
                    throw new InvalidDataException("a block is coded in an unknown way");
            }
            return bytes.Length == length ? bytes.ToArray() : throw new InvalidDataException($"unpacks to {bytes.Length} bytes instead of {length}");
        }
        catch (Exception fault) when (fault is ZstdException or IndexOutOfRangeException or ArgumentException or OverflowException)
        {
            throw new InvalidDataException($"the packed bytes are damaged ({fault.Message})", fault);
        }
    }

    // Blocks end with a line where they can, so that each is a table of its own.
    private static int BlockEnd(ReadOnlySpan<byte> bytes)
    {
        if (bytes.Length <= BlockLength)
            return bytes.Length;
        int end = bytes[..BlockLength].LastIndexOf((byte)'\n') + 1;
        return end > 0 ? end : BlockLength;
    }

    private static void PackBlock(ReadOnlySpan<byte> block, PackWriter packed, Compressor compressor)
    {
        if (TableCoder.TryEncode(block, compressor) is { } table && ComesBack(table, block))
        {
            packed.Byte(Table);
            packed.Block(table);
            return;
        }
        packed.Byte(Plain);
        packed.Block(compressor.Wrap(block));
    }

    private static bool ComesBack(byte[] table, ReadOnlySpan<byte> block)
    {
        Decompressor decompressor = Zstandard.Decompressor;
        PackWriter again = _again ??= new PackWriter(block.Length);
        again.Clear();
        TableCoder.Decode(table, again, decompressor);
        return again.Written.SequenceEqual(block);
    }
}
