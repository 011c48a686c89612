using System.Text;
using CsvHelper;

namespace ScopeReader.Files.Structure;

/// <summary>Lines of text taken apart into cells.</summary>
internal static class RowSplitter
{
    /// <summary>The delimiter that stands for one or more spaces or tabs.</summary>
    public const char Spaces = ' ';

    /// <summary>The most cells that a line of a table has.</summary>
    public const int MostCells = 4096;

    /// <summary>Whole lines in cells, one entry a line.</summary>
    /// <exception cref="TooWideException">A line has more cells than any table.</exception>
    public static List<string[]> Split(ReadOnlyMemory<byte> lines, char delimiter)
    {
        var rows = new List<string[]>();
        if (delimiter == Spaces)
        {
            foreach (Range line in lines.Span.Split((byte)'\n'))
                rows.Add(Cells(lines.Span[line], delimiter, rows.Count));
            return rows;
        }
        // A quote that opens a value of the preamble must not swallow the lines that follow.
        using CsvReader reader = CsvReader.Create(lines, new CsvReaderOptions { Separator = delimiter, HasHeader = false, SkipEmptyLines = false, AllowLineBreaksInQuotes = false, DetectSeparatorHint = false });
        while (reader.Read())
        {
            if (reader.FieldCount > MostCells)
                throw new TooWideException(rows.Count);
            string[] cells = new string[reader.FieldCount];
            for (int i = 0; i < cells.Length; i++)
                cells[i] = reader.GetString(i).Trim();
            rows.Add(cells is [""] ? [] : cells);
        }
        return rows;
    }

    /// <summary>One line in cells, without quotes and spaces round them.</summary>
    /// <exception cref="TooWideException">The line has more cells than any table.</exception>
    public static string[] Cells(ReadOnlySpan<byte> line, char delimiter, int index = 0)
    {
        var cells = new List<string>();
        int position = 0;
        while (Next(line, delimiter, ref position, out ReadOnlySpan<byte> cell))
        {
            if (cells.Count == MostCells)
                throw new TooWideException(index);
            cells.Add(Unquoted(cell));
        }
        return cells is [""] ? [] : [.. cells];
    }

    /// <summary>One cell of a line, without quotes and spaces round it.</summary>
    public static ReadOnlySpan<byte> CellAt(ReadOnlySpan<byte> line, char delimiter, int index)
    {
        int position = 0;
        for (int i = 0; Next(line, delimiter, ref position, out ReadOnlySpan<byte> cell); i++)
            if (i == index)
                return Cell.Trim(cell);
        return default;
    }

    /// <summary>Finds the next cell of a line; false where there is none left.</summary>
    /// <param name="line">UTF-8 without its line end.</param>
    /// <param name="delimiter">The character between cells.</param>
    /// <param name="position">Where to look from: 0 for the first cell; set behind the cell and its delimiter.</param>
    /// <param name="cell">The cell, quotes and spaces and all.</param>
    public static bool Next(ReadOnlySpan<byte> line, char delimiter, scoped ref int position, out ReadOnlySpan<byte> cell)
    {
        cell = default;
        if (position > line.Length)
            return false;
        ReadOnlySpan<byte> rest = line[position..];
        if (delimiter == Spaces)
        {
            int start = rest.IndexOfAnyExcept(" \t\r"u8);
            if (start < 0)
                return false;
            int length = rest[start..].IndexOfAny(" \t\r"u8);
            cell = length < 0 ? rest[start..] : rest.Slice(start, length);
            position += start + cell.Length;
            return true;
        }
        int from = 0, text = rest.IndexOfAnyExcept((byte)' ');
        if (text >= 0 && rest[text] == '"')
            from = BehindQuotes(rest, text + 1);
        int end = rest[from..].IndexOf((byte)delimiter);
        cell = end < 0 ? rest : rest[..(from + end)];
        position += cell.Length + 1;
        return true;
    }

    private static string Unquoted(ReadOnlySpan<byte> cell)
    {
        ReadOnlySpan<byte> bare = Cell.Trim(cell);
        string text = Encoding.UTF8.GetString(bare);
        return bare.Length < cell.Trim(" \t\r"u8).Length ? text.Replace("\"\"", "\"", StringComparison.Ordinal) : text;
    }

    // Where the text behind a quote that opened ends, its closing quote passed: two quotes are one of the text. 0 where none closes it.
    private static int BehindQuotes(ReadOnlySpan<byte> text, int from)
    {
        while (text[from..].IndexOf((byte)'"') is >= 0 and int found)
        {
            from += found + 1;
            if (from == text.Length || text[from] != '"')
                return from;
            from++;
        }
        return 0;
    }
}
