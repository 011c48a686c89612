using ZstdSharp;

namespace ScopeReader.Archive.Packing;

/// <summary>Writes the fields of one packed column again.</summary>
internal abstract class ColumnDecoder
{
    private Dictionary<int, byte[]> _exceptions = [];

    public static ColumnDecoder Load(int rows, ref PackReader reader, Decompressor decompressor)
    {
        switch (reader.Byte())
        {
            case ColumnCoder.Text:
                byte[] lines = decompressor.Unwrap(reader.Block()).ToArray();
                var own = new long[rows];
                for (int row = 0; row < rows; row++)
                    own[row] = row;
                return new Listed(lines, rows, own);
            case ColumnCoder.Words:
                byte[] words = decompressor.Unwrap(reader.Block()).ToArray();
                int count = reader.Count();
                var indices = new long[rows];
                IntegerStream.Read(indices, WordList.BitsFor(count), ref reader, decompressor);
                return new Listed(words, count, indices);
            case ColumnCoder.Numbers:
                NumberFormat format = NumberFormat.Load(ref reader);
                long[] mantissas = new long[rows], exponents = new long[rows];
                IntegerStream.Read(mantissas, 64, ref reader, decompressor);
                IntegerStream.Read(exponents, 64, ref reader, decompressor);
                return new Scaled(format, mantissas, exponents) { _exceptions = FieldExceptions.Load(ref reader, decompressor) };
            case ColumnCoder.Reals:
                RealFormat real = RealFormat.Load(ref reader);
                (double[] values, long[] withExponent) = RealColumn.Decode(rows, ref reader, decompressor);
                return new Reals(real, values, withExponent) { _exceptions = FieldExceptions.Load(ref reader, decompressor) };
            default:
                throw new InvalidDataException("a column is coded in an unknown way");
        }
    }

    /// <summary>Appends the field of a row.</summary>
    public void Write(int row, PackWriter writer)
    {
        if (_exceptions.Count > 0 && _exceptions.TryGetValue(row, out byte[]? field))
            writer.Bytes(field);
        else
            WriteUsual(row, writer);
    }

    protected abstract void WriteUsual(int row, PackWriter writer);

    // Texts of a list, by their index.
    private sealed class Listed(byte[] text, int count, long[] indices) : ColumnDecoder
    {
        private readonly int[] _ends = Ends(text, count);

        protected override void WriteUsual(int row, PackWriter writer)
        {
            int index = (int)indices[row], start = index == 0 ? 0 : _ends[index - 1] + 1;
            writer.Bytes(text.AsSpan(start, _ends[index] - start));
        }

        private static int[] Ends(byte[] lines, int count)
        {
            var ends = new int[count];
            int at = 0;
            for (int i = 0; i < count; i++)
            {
                int length = lines.AsSpan(at).IndexOf((byte)'\n');
                if (length < 0)
                    throw new InvalidDataException("a packed column is too short");
                ends[i] = at + length;
                at += length + 1;
            }
            return ends;
        }
    }

    private sealed class Scaled(NumberFormat format, long[] mantissas, long[] exponents) : ColumnDecoder
    {
        private readonly int _most = NumberFormat.LongestText + format.Before.Length + format.After.Length;

        protected override void WriteUsual(int row, PackWriter writer) =>
            writer.GiveBack(_most - format.Write(writer.Room(_most), mantissas[row], (sbyte)exponents[row]));
    }

    private sealed class Reals(RealFormat format, double[] values, long[] withExponent) : ColumnDecoder
    {
        private readonly int _most = RealFormat.LongestText + format.Number.Before.Length + format.Number.After.Length;

        protected override void WriteUsual(int row, PackWriter writer) =>
            writer.GiveBack(_most - format.Write(writer.Room(_most), values[row], withExponent[row] != 0));
    }
}
