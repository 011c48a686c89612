using ScopeReader.Captures;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Structure;
using ScopeReader.Files.Text;

namespace ScopeReader.Files.Rows;

/// <summary>The blocks of numbers of a file, one after the other.</summary>
internal sealed class TableSequence(TextWindow text, string file, ImportSettings settings)
{
    private const int Head = 1 << 16, LongestPreamble = 8 << 20, EnoughRows = 10, RepeatedPreamble = 200, MostShapes = 64, SampleRows = 100;

    private Table? _previous;
    private int _shapes;

    /// <summary>Reads the next block; null where there is none left.</summary>
    /// <exception cref="ImportException">There is none at all, or a row of it is not built as the others are.</exception>
    public Table? Next(CancellationToken cancellation)
    {
        long startLine = text.Line;
        TableShape? shape = _previous is null ? null : SameShape(_previous.Shape);
        shape ??= NewShape();
        if (shape is null)
            return _previous is null ? throw NoTable() : null;
        Header header = Header.Read(shape).Told(shape, settings);
        Facts facts = Preamble.Read(shape, header);
        if (_previous is not null)
            facts.Inherit(_previous.Facts);
        if (_previous is null || !ReferenceEquals(_previous.Shape.Columns, shape.Columns))
            Ambiguity.Check(file, shape, settings, facts, startLine);
        else if (header.Rows == 0)
            header = header with { Labels = _previous.Header.Labels };
        var table = new Table(shape, header, facts, Roles.Of(file, shape, header, facts, settings, startLine), startLine, ExpectedRows(shape));
        SkipLines(shape.First);
        new RowReader(text, file, table).Read(cancellation);
        return _previous = table;
    }

    // A little more than the file's size and the first rows' length make likely; later blocks of many share what is left.
    private int ExpectedRows(TableShape shape)
    {
        if (_previous is not null)
            return 0;
        string[][] sample = [.. shape.Rows.Skip(shape.First).Take(SampleRows)];
        double length = sample.Average(row => row.Sum(cell => cell.Length + 1.0));
        return (int)Math.Min(text.Remaining / Math.Max(length, 2) * 1.05 + 16, Table.MostRows);
    }

    // Blocks of one file are mostly built alike: the next row that fits the last block begins the next one.
    private TableShape? SameShape(TableShape last)
    {
        while (text.Pending.Length < Head && text.Fill())
        {
        }
        ReadOnlySpan<byte> pending = text.Pending;
        var rows = new List<string[]>();
        for (int at = 0; at < pending.Length && rows.Count < RepeatedPreamble;)
        {
            int end = pending[at..].IndexOf((byte)'\n');
            if (end < 0 && !text.Ended)
                return null;
            ReadOnlySpan<byte> line = end < 0 ? pending[at..] : pending.Slice(at, end);
            at += line.Length + 1;
            rows.Add(Cells(line, last.Delimiter, rows.Count));
            Cell[] cells = Array.ConvertAll(rows[^1], cell => Cell.Read(cell, last.Mark));
            int[] numbers = RowFit.Numbers(cells);
            if (numbers.AsSpan().SequenceEqual(last.Columns))
                return last with { Rows = rows, First = rows.Count - 1, Sampled = 1 };
            if (numbers.Length > last.Columns.Length)
                return null;
        }
        return null;
    }

    private TableShape? NewShape()
    {
        if (++_shapes > MostShapes)
            throw new ImportException(file, FormattableString.Invariant($"expected at most {MostShapes} tables of different build, found more. Export one table a file."), text.Line);
        int firstLine = settings.FirstLine is { } line ? (int)Math.Max(0, line - text.Line) : 0;
        for (int head = Head; ; head *= 2)
        {
            while (text.Pending.Length < head && text.Fill())
            {
            }
            ReadOnlyMemory<byte> lines = text.PendingMemory[..Math.Min(head, text.Pending.Length)];
            bool whole = text.Ended && lines.Length == text.Pending.Length;
            if (!whole)
                lines = lines[..(lines.Span.LastIndexOf((byte)'\n') + 1)];
            TableShape? shape = Find(lines, firstLine);
            bool isEnough = shape is not null && (_previous is null || shape.Sampled >= 2);
            if (isEnough && (whole || shape!.Sampled >= EnoughRows))
                return shape;
            if (whole || head >= LongestPreamble)
                return null;
        }
    }

    private TableShape? Find(ReadOnlyMemory<byte> lines, int firstLine)
    {
        try
        {
            return TableFinder.Find(lines, settings, firstLine);
        }
        catch (TooWideException e)
        {
            throw TooWide(e);
        }
    }

    private string[] Cells(ReadOnlySpan<byte> line, char delimiter, int index)
    {
        try
        {
            return RowSplitter.Cells(line, delimiter, index);
        }
        catch (TooWideException e)
        {
            throw TooWide(e);
        }
    }

    private ImportException TooWide(TooWideException e) =>
        new(file, FormattableString.Invariant($"expected lines of at most {RowSplitter.MostCells} cells, found a longer one. Export fewer channels at a time."), text.Line + e.Line, cause: e);

    private ImportException NoTable()
    {
        ReadOnlySpan<byte> start = text.Pending.TrimStart(" \t\r\n\u001A"u8);
        return start.IsEmpty
            ? new ImportException(file, "expected a table of numbers, found only blank lines. Save the capture again.")
            : new ImportException(file, $"expected a table of numbers, found only text: \"{Excerpt.Of(start)}\". Export the capture as CSV.");
    }

    private void SkipLines(int lines)
    {
        int bytes = 0;
        for (int i = 0; i < lines; i++)
            bytes += text.Pending[bytes..].IndexOf((byte)'\n') + 1;
        text.Consume(bytes, lines);
    }
}
