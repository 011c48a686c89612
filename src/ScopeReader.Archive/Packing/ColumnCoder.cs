using ZstdSharp;

namespace ScopeReader.Archive.Packing;

/// <summary>Codes one column in the way that suits it: a list of its few different texts, scaled whole numbers, numbers with
/// all their digits, or plain text.</summary>
internal static class ColumnCoder
{
    public const byte Text = 0, Words = 1, Numbers = 2, Reals = 3;

    // Times of few digits lie on a line but for rounding and take next to nothing; more than this is a hint at all the digits.
    private const double LittleEnough = 0.3; // bytes a row

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
        (byte coding, PackWriter? coded) = TryNumbers(block, table, column, compressor);
        if (coded is null)
        {
            var text = new PackWriter(table.Rows * 8);
            for (int row = 0; row < table.Rows; row++)
            {
                text.Bytes(block[table.Field(row, column)]);
                text.Byte((byte)'\n');
            }
            writer.Byte(Text);
            writer.Block(compressor.Wrap(text.Written));
            return;
        }
        writer.Byte(coding);
        writer.Bytes(coded.Written);
    }

    private static (byte Coding, PackWriter? Coded) TryNumbers(ReadOnlySpan<byte> block, TextTable table, int column, Compressor compressor)
    {
        if (NumberStyle.Find(block, table, column) is not { } style)
            return (Text, null);
        PackWriter? scaled = style.IsScaled ? ScaledColumn.TryEncode(block, table, column, style.Format, compressor) : null;
        if (scaled is not null && scaled.Length < LittleEnough * table.Rows)
            return (Numbers, scaled);
        foreach (RealFormat format in style.RealFormats())
            if (RealColumn.TryEncode(block, table, column, format, compressor) is { } reals)
                return scaled is null || reals.Length < scaled.Length ? (Reals, reals) : (Numbers, scaled);
        return (Numbers, scaled);
    }
}
