using ZstdSharp;

namespace ScopeReader.Archive.Packing;

/// <summary>Codes one column in the way that suits it: a list of its few different texts, scaled whole numbers, or plain text.</summary>
internal static class ColumnCoder
{
    public const byte Text = 0, Words = 1, Numbers = 2;

    public static void Encode(ReadOnlySpan<byte> block, TextTable table, int column, PackWriter writer, Compressor compressor)
    {
        // A converter has few codes, and so its column few texts. Times are all different.
        if (WordList.TryMake(block, table, column) is { } words)
        {
            writer.Byte(Words);
            writer.Block(compressor.Wrap(words.Text));
            writer.Number((ulong)words.Count);
            IntegerStream.Write(words.Indices, words.Bits, writer, compressor);
            return;
        }
        if (TryNumbers(block, table, column, writer, compressor))
            return;
        var text = new PackWriter(table.Rows * 8);
        for (int row = 0; row < table.Rows; row++)
        {
            text.Bytes(block[table.Field(row, column)]);
            text.Byte((byte)'\n');
        }
        writer.Byte(Text);
        writer.Block(compressor.Wrap(text.Written));
    }

    private static bool TryNumbers(ReadOnlySpan<byte> block, TextTable table, int column, PackWriter writer, Compressor compressor)
    {
        if (NumberFormatFinder.Find(block, table, column) is not { } format)
            return false;
        int rows = table.Rows, allowed = 4 + rows / 64, found = 0;
        var mantissas = new long[rows];
        var exponents = new long[rows];
        var exceptions = new PackWriter();
        Span<byte> again = stackalloc byte[2 * NumberFormat.LongestText];
        for (int row = 0; row < rows; row++)
        {
            ReadOnlySpan<byte> field = block[table.Field(row, column)];
            if (format.TryRead(field, out mantissas[row], out sbyte exponent) && again[..format.Write(again, mantissas[row], exponent)].SequenceEqual(field))
            {
                exponents[row] = exponent;
                continue;
            }
            if (++found > allowed)
                return false;
            // The value before it costs nothing in the differences.
            (mantissas[row], exponents[row]) = row > 0 ? (mantissas[row - 1], exponents[row - 1]) : (0, NumberFormat.NoExponent);
            exceptions.Number((ulong)row);
            exceptions.Block(field);
        }
        writer.Byte(Numbers);
        format.Save(writer);
        IntegerStream.Write(mantissas, 64, writer, compressor);
        IntegerStream.Write(exponents, 64, writer, compressor);
        writer.Number((ulong)found);
        writer.Block(compressor.Wrap(exceptions.Written));
        return true;
    }
}
