namespace ScopeReader.Archive.Packing;

/// <summary>Where the rows and fields of a table stand in a block of text.</summary>
internal sealed class TextTable
{
    // Where each field ends, row by row; a field begins one separator after the one before it.
    private readonly int[] _ends;

    private TextTable(int start, int end, int rows, int columns, byte separator, bool carriageReturns, int[] ends) =>
        (Start, End, Rows, Columns, Separator, CarriageReturns, _ends) = (start, end, rows, columns, separator, carriageReturns, ends);

    /// <summary>Index of the first row's first byte.</summary>
    public int Start { get; }

    /// <summary>Index after the last row's line end.</summary>
    public int End { get; }

    public int Rows { get; }

    public int Columns { get; }

    /// <summary>The byte between fields.</summary>
    public byte Separator { get; }

    /// <summary>True where lines end in carriage return and line feed.</summary>
    public bool CarriageReturns { get; }

    /// <summary>The bytes of one field.</summary>
    public Range Field(int row, int column)
    {
        int index = row * Columns + column;
        int start = index == 0 ? Start : _ends[index - 1] + (column == 0 && CarriageReturns ? 2 : 1);
        return start.._ends[index];
    }

    /// <summary>Finds the longest table about the middle of the block; null where there is none worth the name.</summary>
    public static TextTable? Find(ReadOnlySpan<byte> block)
    {
        int middle = block[..(block.Length / 2)].LastIndexOf((byte)'\n') + 1;
        if (!TryLine(block, middle, out int middleEnd))
            return null;
        ReadOnlySpan<byte> sample = block[middle..middleEnd];
        bool carriageReturns = sample.Length > 0 && sample[^1] == '\r';
        byte separator = SeparatorOf(sample);
        int separators = sample.Count(separator);

        int start = middle;
        while (start > 0)
        {
            int before = block[..(start - 1)].LastIndexOf((byte)'\n') + 1;
            if (!IsRow(block[before..(start - 1)], separator, separators, carriageReturns))
                break;
            start = before;
        }
        int end = start, rows = 0;
        while (TryLine(block, end, out int lineEnd) && IsRow(block[end..lineEnd], separator, separators, carriageReturns))
            (end, rows) = (lineEnd + 1, rows + 1);
        if (rows < 8)
            return null;

        var ends = new int[rows * (separators + 1)];
        int next = start;
        for (int i = 0; i < ends.Length;)
        {
            int length = block[next..].IndexOfAny(separator, (byte)'\n');
            int fieldEnd = next + length;
            bool last = block[fieldEnd] == '\n';
            ends[i++] = last && carriageReturns ? fieldEnd - 1 : fieldEnd;
            next = fieldEnd + 1;
        }
        return new TextTable(start, end, rows, separators + 1, separator, carriageReturns, ends);
    }

    // Semicolons and tabs before commas, which may be decimal marks; a space last, which may be padding.
    private static byte SeparatorOf(ReadOnlySpan<byte> line)
    {
        foreach (byte candidate in ";\t, "u8)
            if (line.Contains(candidate))
                return candidate;
        return (byte)',';
    }

    private static bool IsRow(ReadOnlySpan<byte> line, byte separator, int separators, bool carriageReturns) =>
        (line.Length > 0 && line[^1] == '\r') == carriageReturns && line.Count(separator) == separators && line.ContainsAnyInRange((byte)'0', (byte)'9');

    // A last line without its line feed is no row.
    private static bool TryLine(ReadOnlySpan<byte> block, int start, out int end)
    {
        int length = block[start..].IndexOf((byte)'\n');
        end = start + length;
        return length >= 0;
    }
}
