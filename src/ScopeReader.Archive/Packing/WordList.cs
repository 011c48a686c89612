using System.Buffers.Text;

namespace ScopeReader.Archive.Packing;

/// <summary>A column's different texts, sorted by value, and which of them each row has.</summary>
internal sealed class WordList
{
    // What a row may cost: more different texts than this and the list outweighs what it saves.
    private const int RowsPerWord = 4, EnoughToSee = 512, MostWords = 1 << 16;

    private WordList(byte[] text, int count, long[] indices) => (Text, Count, Indices) = (text, count, indices);

    /// <summary>The texts, each ended by a line feed.</summary>
    public byte[] Text { get; }

    public int Count { get; }

    /// <summary>Shape [rows].</summary>
    public long[] Indices { get; }

    /// <summary>Bits of an index.</summary>
    public int Bits => BitsFor(Count);

    public static int BitsFor(int count) => count <= 256 ? 8 : 16;

    /// <summary>Makes the list; null where the texts are too many or too long.</summary>
    public static WordList? TryMake(ReadOnlySpan<byte> block, TextTable table, int column)
    {
        int allowed = Math.Min(MostWords, 16 + table.Rows / RowsPerWord);
        var found = new WordTable(allowed);
        var indices = new long[table.Rows];
        for (int row = 0; row < table.Rows; row++)
        {
            ReadOnlySpan<byte> field = block[table.Field(row, column)];
            if (field.Length > WordTable.LongestWord)
                return null;
            int number = found.NumberOf(field);
            // Times differ from row to row: that is seen long before the list is full.
            if (number < 0 || (row == EnoughToSee && number == EnoughToSee))
                return null;
            indices[row] = number;
        }

        IReadOnlyList<byte[]> words = found.Words;
        // By value, so that neighbours in voltage are neighbours in number, as the converter had them.
        int[] order = [.. Enumerable.Range(0, words.Count).OrderBy(i => ValueOf(words[i])).ThenBy(i => i)];
        var place = new int[order.Length];
        var text = new PackWriter(words.Count * 10);
        for (int i = 0; i < order.Length; i++)
        {
            place[order[i]] = i;
            text.Bytes(words[order[i]]);
            text.Byte((byte)'\n');
        }
        for (int row = 0; row < indices.Length; row++)
            indices[row] = place[indices[row]];
        return new WordList(text.ToArray(), words.Count, indices);
    }

    private static double ValueOf(ReadOnlySpan<byte> word) =>
        Utf8Parser.TryParse(word.TrimStart((byte)' '), out double value, out _) ? value : double.NegativeInfinity;
}
