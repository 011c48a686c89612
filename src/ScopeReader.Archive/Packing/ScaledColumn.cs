using ZstdSharp;

namespace ScopeReader.Archive.Packing;

/// <summary>A column of numbers as scaled whole numbers and their exponents.</summary>
internal static class ScaledColumn
{
    /// <summary>Codes a column; null where too many fields are not what the format writes.</summary>
    /// <param name="block">The block of text.</param>
    /// <param name="table">Its table.</param>
    /// <param name="column">Index of the column.</param>
    /// <param name="format">How the column writes its numbers.</param>
    /// <param name="compressor">Zstandard.</param>
    public static PackWriter? TryEncode(ReadOnlySpan<byte> block, TextTable table, int column, NumberFormat format, Compressor compressor)
    {
        var mantissas = new long[table.Rows];
        var exponents = new long[table.Rows];
        var exceptions = new FieldExceptions(table.Rows);
        Span<byte> again = stackalloc byte[2 * NumberFormat.LongestText];
        for (int row = 0; row < mantissas.Length; row++)
        {
            ReadOnlySpan<byte> field = block[table.Field(row, column)];
            if (format.TryRead(field, out mantissas[row], out sbyte exponent) && again[..format.Write(again, mantissas[row], exponent)].SequenceEqual(field))
            {
                exponents[row] = exponent;
                continue;
            }
            if (!exceptions.TryAdd(row, field))
                return null;
            // The value before it costs nothing in the differences.
            (mantissas[row], exponents[row]) = row > 0 ? (mantissas[row - 1], exponents[row - 1]) : (0, NumberFormat.NoExponent);
        }
        var writer = new PackWriter();
        format.Save(writer);
        IntegerStream.Write(mantissas, 64, writer, compressor);
        IntegerStream.Write(exponents, 64, writer, compressor);
        exceptions.Save(writer, compressor);
        return writer;
    }
}
