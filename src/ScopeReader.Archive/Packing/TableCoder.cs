using ZstdSharp;

namespace ScopeReader.Archive.Packing;

/// <summary>A block of text as what stands before its table, the table's columns, and what stands after it.</summary>
internal static class TableCoder
{
    /// <summary>Codes a block; null where it holds no table.</summary>
    public static byte[]? TryEncode(ReadOnlySpan<byte> block, Compressor compressor)
    {
        if (TextTable.Find(block) is not { } table)
            return null;
        var writer = new PackWriter(block.Length / 8 + 64);
        writer.Block(compressor.Wrap(block[..table.Start]));
        writer.Block(compressor.Wrap(block[table.End..]));
        writer.Number((ulong)table.Rows);
        writer.Number((ulong)table.Columns);
        writer.Byte(table.Separator);
        writer.Byte(table.CarriageReturns ? (byte)1 : (byte)0);
        for (int column = 0; column < table.Columns; column++)
            ColumnCoder.Encode(block, table, column, writer, compressor);
        return writer.ToArray();
    }

    /// <summary>Appends the block's text.</summary>
    public static void Decode(ReadOnlySpan<byte> packed, PackWriter text, Decompressor decompressor)
    {
        var reader = new PackReader(packed);
        ReadOnlySpan<byte> before = decompressor.Unwrap(reader.Block()), after = decompressor.Unwrap(reader.Block());
        int rows = reader.Count(), columns = reader.Count();
        byte separator = reader.Byte();
        bool carriageReturns = reader.Byte() == 1;
        if ((long)rows * columns > int.MaxValue)
            throw new InvalidDataException("a packed table is too large");
        var coders = new ColumnDecoder[columns];
        for (int column = 0; column < columns; column++)
            coders[column] = ColumnDecoder.Load(rows, ref reader, decompressor);

        text.Bytes(before);
        for (int row = 0; row < rows; row++)
        {
            for (int column = 0; column < columns; column++)
            {
                if (column > 0)
                    text.Byte(separator);
                coders[column].Write(row, text);
            }
            if (carriageReturns)
                text.Byte((byte)'\r');
            text.Byte((byte)'\n');
        }
        text.Bytes(after);
    }
}
