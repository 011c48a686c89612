using ScopeReader.Files.Meaning;
using ScopeReader.Files.Structure;
using ScopeReader.Files.Text;

namespace ScopeReader.Files.Rows;

/// <summary>Reads the rows of a block of numbers, to its end or the file's.</summary>
internal sealed class RowReader
{
    private const int Patience = 100, FewLines = 8;

    private readonly TextWindow _text;
    private readonly string _file;
    private readonly Table _table;
    private readonly PlainRows? _plain;
    private readonly RowCells _cells;
    private readonly TableRow _row;
    private int _lineLength;
    private bool _blankBefore;

    /// <param name="text">The text, from the first row on.</param>
    /// <param name="file">The file's name, for messages.</param>
    /// <param name="table">Where the rows go.</param>
    public RowReader(TextWindow text, string file, Table table)
    {
        (_text, _file, _table, _plain) = (text, file, table, PlainRows.For(table));
        _cells = new RowCells(file, table.Shape);
        _row = new TableRow(file, table, _cells);
    }

    private enum Outcome
    {
        Row,
        Skipped,
        End,
    }

    /// <summary>Reads the block; what follows it stays in the window.</summary>
    /// <exception cref="ImportException">A row is not built as the others are.</exception>
    public void Read(CancellationToken cancellation)
    {
        do
        {
            cancellation.ThrowIfCancellationRequested();
            bool ended = ReadLines();
            if (ended)
                return;
            if (!_text.Ended)
                foreach (AxisColumn? axis in _table.Axes)
                    axis?.EndPart();
        }
        while (_text.Fill());
        if (!_text.Pending.IsEmpty && ReadLast(_text.Pending) != Outcome.End)
            _text.Consume(_text.Pending.Length, 1);
    }

    // Reads the whole lines that are pending; true where the block ends among them.
    private bool ReadLines()
    {
        ReadOnlySpan<byte> lines = _text.Pending;
        lines = lines[..(lines.LastIndexOf((byte)'\n') + 1)];
        // A row takes two bytes at least.
        if (_table.Rows > Table.MostRows - lines.Length / 2)
            throw new ImportException(_file, FormattableString.Invariant($"expected at most {Table.MostRows} rows, found more. Cut the capture."), _text.Line);
        int done = 0, slow = 0;
        long count = 0;
        bool ended = false;
        while (!ended && done < lines.Length)
        {
            // Where many rows in a row are not plain, trying each the quick way first would only cost time.
            if (_plain is not null && slow < Patience)
            {
                done += _plain.Read(lines[done..], out int rows);
                count += rows;
                slow = rows > 0 ? 0 : slow + 1;
                if (done == lines.Length)
                    break;
                if (!_plain.IsStopped)
                    continue;
            }
            ReadOnlySpan<byte> rest = lines[done..];
            int end = rest.IndexOf((byte)'\n');
            ended = ReadLine(rest[..end], rest[(end + 1)..], _text.Line + count) == Outcome.End;
            if (!ended)
                (done, count) = (done + end + 1, count + 1);
        }
        if (!ended && lines.Length > 0)
            _lineLength = CommonLength(lines);
        _text.Consume(done, count);
        return ended;
    }

    // Length of the last few lines where it is the same, as in a table printed in fixed width; 0 elsewhere.
    private static int CommonLength(ReadOnlySpan<byte> lines)
    {
        int common = 0;
        for (int k = 0; k < FewLines; k++)
        {
            lines = lines[..^1];
            int length = lines[(lines.LastIndexOf((byte)'\n') + 1)..].TrimEnd((byte)'\r').Length;
            if (length == 0 || (common != 0 && length != common))
                return 0;
            common = length;
            lines = lines[..(lines.LastIndexOf((byte)'\n') + 1)];
            if (lines.IsEmpty)
                return 0;
        }
        return common;
    }

    private Outcome ReadLine(ReadOnlySpan<byte> line, ReadOnlySpan<byte> following, long number)
    {
        if (line.Length > TextWindow.LongestLine)
            throw _text.TooLong(number);
        _cells.Take(line, number);
        if (_cells.Filled == 0)
        {
            _blankBefore = true;
            return Outcome.Skipped;
        }
        if (_row.Fits())
        {
            Add();
            return Outcome.Row;
        }
        if (line.TrimStart(" \t\""u8) is [(byte)'#' or (byte)'%' or (byte)'!', ..])
            return Outcome.Skipped;
        if (EndsBlock(line, following))
            return Outcome.End;
        _row.Fits();
        throw _row.Refusal(line, number);
    }

    // A last line without its line end may have broken off anywhere, in the middle of a number too.
    private Outcome ReadLast(ReadOnlySpan<byte> line)
    {
        _cells.Take(line, _text.Line);
        if (_cells.Filled == 0)
            return Outcome.Skipped;
        bool isShort = _lineLength > 0 && line.TrimEnd((byte)'\r').Length < _lineLength;
        bool isOpen = _cells.All.Length > _cells.Filled && _cells.Filled <= _table.Shape.Columns[^1];
        if (!isShort && !isOpen && _row.Fits())
        {
            Add();
            return Outcome.Row;
        }
        if (RowFit.Numbers(_cells.All).Length == 0 && _cells.All[0].Kind == CellKind.Text)
            return Outcome.End;
        _table.IsCut = true;
        return Outcome.Skipped;
    }

    private void Add()
    {
        _row.Add(_blankBefore);
        _blankBefore = false;
    }

    // Text ends a block; a row that only lost a cell or has a word in it does not, as long as the next line goes on as before.
    private bool EndsBlock(ReadOnlySpan<byte> line, ReadOnlySpan<byte> following)
    {
        bool hasNumbers = _table.Shape.Columns.AsSpan().ContainsAny(RowFit.Numbers(_cells.All));
        if (!hasNumbers || _blankBefore)
            return true;
        if (_cells.All[0].Kind != CellKind.Text)
            return false;
        if (Preamble.Says(RowSplitter.Cells(line, _table.Shape.Delimiter)))
            return true;
        if (following.IsEmpty && !_text.Ended)
            return false;
        int end = following.IndexOf((byte)'\n');
        _cells.Take(end < 0 ? following : following[..end], 0);
        bool goesOn = _row.Fits();
        _cells.Take(line, 0);
        return !goesOn;
    }
}
