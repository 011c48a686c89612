namespace ScopeReader.Archive.Packing;

/// <summary>Grows a byte array: variable-length integers, byte strings with their length in front.</summary>
internal sealed class PackWriter(int capacity = 256)
{
    private byte[] _bytes = new byte[capacity];

    /// <summary>Bytes written so far.</summary>
    public int Length { get; private set; }

    /// <summary>What was written.</summary>
    public ReadOnlySpan<byte> Written => _bytes.AsSpan(0, Length);

    public void Byte(byte value) => Room(1)[0] = value;

    public void Bytes(ReadOnlySpan<byte> value) => value.CopyTo(Room(value.Length));

    /// <summary>Seven bits a byte, low bits first, the top bit set on all but the last.</summary>
    public void Number(ulong value)
    {
        for (; value >= 0x80; value >>= 7)
            Byte((byte)(value | 0x80));
        Byte((byte)value);
    }

    public void Block(ReadOnlySpan<byte> value)
    {
        Number((ulong)value.Length);
        Bytes(value);
    }

    /// <summary>The next bytes to fill.</summary>
    public Span<byte> Room(int count)
    {
        if (Length + count > _bytes.Length)
            Array.Resize(ref _bytes, Math.Max(2 * _bytes.Length, Length + count));
        Span<byte> room = _bytes.AsSpan(Length, count);
        Length += count;
        return room;
    }

    /// <summary>Forgets what was written and keeps the room.</summary>
    public void Clear() => Length = 0;

    /// <summary>Gives back the last bytes of <see cref="Room"/> that were not needed.</summary>
    public void GiveBack(int count) => Length -= count;

    public byte[] ToArray() => Written.ToArray();
}
