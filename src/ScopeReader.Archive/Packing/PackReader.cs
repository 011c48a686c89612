namespace ScopeReader.Archive.Packing;

/// <summary>Reads what <see cref="PackWriter"/> wrote. Damage ends in <see cref="InvalidDataException"/>, never in a wrong answer's silence.</summary>
internal ref struct PackReader(ReadOnlySpan<byte> bytes)
{
    private ReadOnlySpan<byte> _rest = bytes;

    public readonly bool IsAtEnd => _rest.IsEmpty;

    public byte Byte() => Bytes(1)[0];

    public ReadOnlySpan<byte> Bytes(int count)
    {
        if (count < 0 || count > _rest.Length)
            throw new InvalidDataException("the packed bytes end too early");
        ReadOnlySpan<byte> taken = _rest[..count];
        _rest = _rest[count..];
        return taken;
    }

    public ulong Number()
    {
        ulong value = 0;
        for (int shift = 0; shift < 64; shift += 7)
        {
            byte next = Byte();
            value |= (ulong)(next & 0x7f) << shift;
            if (next < 0x80)
                return value;
        }
        throw new InvalidDataException("a packed number is too long");
    }

    /// <summary>A number that counts or measures something in memory.</summary>
    public int Count()
    {
        ulong value = Number();
        return value <= int.MaxValue ? (int)value : throw new InvalidDataException("a packed count is too large");
    }

    public ReadOnlySpan<byte> Block() => Bytes(Count());
}
