using ZstdSharp;

namespace ScopeReader.Archive.Packing;

/// <summary>Writes the fields of one packed column again.</summary>
internal sealed class ColumnDecoder
{
    private readonly byte[] _text;
    private readonly int[] _ends;
    private readonly long[] _first, _second;
    private readonly NumberFormat? _format;
    private readonly Dictionary<int, byte[]> _exceptions;

    private ColumnDecoder(byte[] text, int[] ends, long[] first, long[] second, NumberFormat? format, Dictionary<int, byte[]> exceptions) =>
        (_text, _ends, _first, _second, _format, _exceptions) = (text, ends, first, second, format, exceptions);

    public static ColumnDecoder Load(int rows, ref PackReader reader, Decompressor decompressor)
    {
        switch (reader.Byte())
        {
            case ColumnCoder.Text:
                byte[] lines = decompressor.Unwrap(reader.Block()).ToArray();
                var own = new long[rows];
                for (int row = 0; row < rows; row++)
                    own[row] = row;
                return new ColumnDecoder(lines, Ends(lines, rows), own, [], null, []);
            case ColumnCoder.Words:
                byte[] words = decompressor.Unwrap(reader.Block()).ToArray();
                int count = reader.Count();
                var indices = new long[rows];
                IntegerStream.Read(indices, WordList.BitsFor(count), ref reader, decompressor);
                return new ColumnDecoder(words, Ends(words, count), indices, [], null, []);
            case ColumnCoder.Numbers:
                NumberFormat format = NumberFormat.Load(ref reader);
                long[] mantissas = new long[rows], exponents = new long[rows];
                IntegerStream.Read(mantissas, 64, ref reader, decompressor);
                IntegerStream.Read(exponents, 64, ref reader, decompressor);
                return new ColumnDecoder([], [], mantissas, exponents, format, Exceptions(reader.Count(), decompressor.Unwrap(reader.Block())));
            default:
                throw new InvalidDataException("a column is coded in an unknown way");
        }
    }

    /// <summary>Appends the field of a row.</summary>
    public void Write(int row, PackWriter writer)
    {
        if (_format is null)
        {
            int index = (int)_first[row];
            writer.Bytes(_text.AsSpan(index == 0 ? 0 : _ends[index - 1] + 1, _ends[index] - (index == 0 ? 0 : _ends[index - 1] + 1)));
        }
        else if (_exceptions.Count > 0 && _exceptions.TryGetValue(row, out byte[]? field))
        {
            writer.Bytes(field);
        }
        else
        {
            int most = NumberFormat.LongestText + _format.Before.Length + _format.After.Length;
            writer.GiveBack(most - _format.Write(writer.Room(most), _first[row], (sbyte)_second[row]));
        }
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

    private static Dictionary<int, byte[]> Exceptions(int count, ReadOnlySpan<byte> packed)
    {
        var exceptions = new Dictionary<int, byte[]>();
        var reader = new PackReader(packed);
        for (int i = 0; i < count; i++)
            exceptions[reader.Count()] = reader.Block().ToArray();
        return exceptions;
    }
}
