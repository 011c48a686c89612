using ZstdSharp;

namespace ScopeReader.Archive.Packing;

/// <summary>The few fields of a column that are not as its format writes them.</summary>
internal sealed class FieldExceptions(int rows)
{
    private readonly int _allowed = 4 + rows / 64;
    private readonly PackWriter _fields = new();
    private int _count;

    /// <summary>Notes a field; false where they have become too many.</summary>
    public bool TryAdd(int row, ReadOnlySpan<byte> field)
    {
        if (++_count > _allowed)
            return false;
        _fields.Number((ulong)row);
        _fields.Block(field);
        return true;
    }

    public void Save(PackWriter writer, Compressor compressor)
    {
        writer.Number((ulong)_count);
        writer.Block(compressor.Wrap(_fields.Written));
    }

    /// <summary>The fields by their rows.</summary>
    public static Dictionary<int, byte[]> Load(ref PackReader reader, Decompressor decompressor)
    {
        int count = reader.Count();
        var fields = new Dictionary<int, byte[]>();
        var packed = new PackReader(decompressor.Unwrap(reader.Block()));
        for (int i = 0; i < count; i++)
            fields[packed.Count()] = packed.Block().ToArray();
        return fields;
    }
}
