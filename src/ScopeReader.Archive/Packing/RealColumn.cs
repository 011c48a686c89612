using System.Buffers.Binary;
using System.Numerics;
using ZstdSharp;

namespace ScopeReader.Archive.Packing;

/// <summary>A column of numbers that are written with all their digits, such as times to seventeen of them: how far, in steps
/// of the last binary digit, each is from a straight line over the rows.</summary>
internal static class RealColumn
{
    /// <summary>Codes a column; null where too many fields are not what the format writes.</summary>
    /// <param name="block">The block of text.</param>
    /// <param name="table">Its table.</param>
    /// <param name="column">Index of the column.</param>
    /// <param name="format">How the column writes its numbers.</param>
    /// <param name="compressor">Zstandard.</param>
    public static PackWriter? TryEncode(ReadOnlySpan<byte> block, TextTable table, int column, RealFormat format, Compressor compressor)
    {
        var values = new double[table.Rows];
        var withExponent = new long[table.Rows];
        var exceptions = new FieldExceptions(table.Rows);
        Span<byte> again = stackalloc byte[RealFormat.LongestText + format.Number.Before.Length + format.Number.After.Length];
        for (int row = 0; row < values.Length; row++)
        {
            ReadOnlySpan<byte> field = block[table.Field(row, column)];
            if (format.TryRead(field, out values[row], out bool exponent) && again[..format.Write(again, values[row], exponent)].SequenceEqual(field))
            {
                withExponent[row] = exponent ? 1 : 0;
                continue;
            }
            if (!exceptions.TryAdd(row, field))
                return null;
            (values[row], withExponent[row]) = row > 0 ? (values[row - 1], withExponent[row - 1]) : (0, 0);
        }

        var writer = new PackWriter();
        format.Save(writer);
        double start = values[0], step = values.Length > 1 ? (values[^1] - start) / (values.Length - 1) : 0;
        ulong bits = 0;
        foreach (double value in values)
            bits |= (ulong)Place(value);
        int spare = bits == 0 ? 0 : Math.Min(BitOperations.TrailingZeroCount(bits), 62);
        writer.Bytes(Eight(start));
        writer.Bytes(Eight(step));
        writer.Byte((byte)spare);
        var steps = new long[values.Length];
        for (int row = 0; row < steps.Length; row++)
            steps[row] = (Place(values[row]) >> spare) - Line(start, step, row, spare);
        IntegerStream.Write(steps, 64, writer, compressor);
        IntegerStream.Write(withExponent, 8, writer, compressor);
        exceptions.Save(writer, compressor);
        return writer;
    }

    /// <summary>Reads the numbers and which of them have an exponent.</summary>
    public static (double[] Values, long[] WithExponent) Decode(int rows, ref PackReader reader, Decompressor decompressor)
    {
        double start = BinaryPrimitives.ReadDoubleLittleEndian(reader.Bytes(8)), step = BinaryPrimitives.ReadDoubleLittleEndian(reader.Bytes(8));
        int spare = reader.Byte();
        if (spare > 62)
            throw new InvalidDataException("a packed column has an unknown resolution");
        long[] steps = new long[rows], withExponent = new long[rows];
        IntegerStream.Read(steps, 64, ref reader, decompressor);
        IntegerStream.Read(withExponent, 8, ref reader, decompressor);
        var values = new double[rows];
        for (int row = 0; row < rows; row++)
            values[row] = Value((steps[row] + Line(start, step, row, spare)) << spare);
        return (values, withExponent);
    }

    // Where the straight line is at a row, on the grid of the values: single-precision ones leave the last 29 bits empty.
    private static long Line(double start, double step, int row, int spare) =>
        spare == 0 ? Place(start + row * step) : (Place(start + row * step) + (1L << (spare - 1))) >> spare;

    // Numbers in the order of their values: one more for the next number up.
    private static long Place(double value)
    {
        long bits = BitConverter.DoubleToInt64Bits(value);
        return bits >= 0 ? bits : long.MinValue - bits;
    }

    private static double Value(long place) => BitConverter.Int64BitsToDouble(place >= 0 ? place : long.MinValue - place);

    private static byte[] Eight(double value)
    {
        var bytes = new byte[8];
        BinaryPrimitives.WriteDoubleLittleEndian(bytes, value);
        return bytes;
    }
}
