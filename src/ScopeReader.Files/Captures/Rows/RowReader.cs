using System.Text;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Numbers;
using ScopeReader.Files.Structure;
using ScopeReader.Files.Text;

namespace ScopeReader.Files.Rows;

/// <summary>Reads the rows of a block of numbers, to its end or the file's.</summary>
internal sealed class RowReader(TextWindow text, string file, Table table)
{
    private const int Patience = 100, FewLines = 8;

    private readonly TableShape _shape = table.Shape;
    private readonly PlainRows? _plain = PlainRows.For(table);
    private readonly double[] _values = new double[table.Shape.Columns.Length], _halves = new double[table.Shape.Columns.Length];
    private Cell[] _cells = new Cell[16];
    private int _count, _filled, _lineLength;
    private bool _blankBefore;

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
            if (!text.Ended)
                foreach (AxisColumn? axis in table.Axes)
                    axis?.EndPart();
        }
        while (text.Fill());
        if (!text.Pending.IsEmpty && ReadLast(text.Pending) != Outcome.End)
            text.Consume(text.Pending.Length, 1);
    }

    // Reads the whole lines that are pending; true where the block ends among them.
    private bool ReadLines()
    {
        ReadOnlySpan<byte> lines = text.Pending;
        lines = lines[..(lines.LastIndexOf((byte)'\n') + 1)];
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
            }
            ReadOnlySpan<byte> rest = lines[done..];
            int end = rest.IndexOf((byte)'\n');
            ended = ReadLine(rest[..end], rest[(end + 1)..], text.Line + count) == Outcome.End;
            if (!ended)
                (done, count) = (done + end + 1, count + 1);
        }
        if (!ended && lines.Length > 0)
            _lineLength = CommonLength(lines);
        text.Consume(done, count);
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
        Take(line, number);
        if (_filled == 0)
        {
            _blankBefore = true;
            return Outcome.Skipped;
        }
        ReadOnlySpan<Cell> cells = _cells.AsSpan(0, _count);
        if (IsRow(cells, out Cell wrong, out int wrongAt))
        {
            AddRow();
            return Outcome.Row;
        }
        if (line.TrimStart(" \t\""u8) is [(byte)'#' or (byte)'%' or (byte)'!', ..])
            return Outcome.Skipped;
        if (EndsBlock(cells, line, following))
            return Outcome.End;
        throw Refusal(line, number, wrong, wrongAt);
    }

    // A last line without its line end may have broken off anywhere, in the middle of a number too.
    private Outcome ReadLast(ReadOnlySpan<byte> line)
    {
        Take(line, text.Line);
        if (_filled == 0)
            return Outcome.Skipped;
        bool isShort = _lineLength > 0 && line.TrimEnd((byte)'\r').Length < _lineLength;
        bool isOpen = _count > _filled && _filled <= _shape.Columns[^1];
        if (!isShort && !isOpen && IsRow(_cells.AsSpan(0, _count), out _, out _))
        {
            AddRow();
            return Outcome.Row;
        }
        if (RowFit.Numbers(_cells.AsSpan(0, _count)).Length == 0 && _cells[0].Kind == CellKind.Text)
            return Outcome.End;
        table.IsCut = true;
        return Outcome.Skipped;
    }

    private void Take(ReadOnlySpan<byte> line, long number)
    {
        line = line.TrimEnd("\r\u001A"u8);
        (_count, _filled) = (0, 0);
        int position = 0;
        while (RowSplitter.Next(line, _shape.Delimiter, ref position, out ReadOnlySpan<byte> cell))
        {
            if (_count == RowSplitter.MostCells)
                throw new ImportException(file, FormattableString.Invariant($"expected lines of at most {RowSplitter.MostCells} cells, found a longer one. Export fewer channels at a time."), number);
            if (_count == _cells.Length)
                Array.Resize(ref _cells, 2 * _count);
            _cells[_count] = Cell.Read(cell, (byte)_shape.Mark);
            if (_cells[_count].Kind == CellKind.Text && cell.Length > NumberParser.LongestNumber && NumberParser.Length(Cell.Trim(cell), (byte)_shape.Mark) > NumberParser.LongestNumber)
                throw new ImportException(file, FormattableString.Invariant($"expected numbers of at most {NumberParser.LongestNumber} characters, found a longer one: \"{Excerpt.Of(cell, 20)}\". Export the capture again."), number, _count + 1);
            if (_cells[_count++].Kind != CellKind.Empty)
                _filled = _count;
        }
        Scale(line);
    }

    // Where the unit stands in the next column it may change from row to row: 999.5 kHz, 1.0005 MHz.
    private void Scale(ReadOnlySpan<byte> line)
    {
        for (int i = 0; i < _shape.UnitColumns.Length; i++)
        {
            int unitAt = _shape.UnitColumns[i], c = _shape.Columns[i];
            if (unitAt < 0 || unitAt >= _count || _cells[c].Kind != CellKind.Number)
                continue;
            if (Label.TryUnit(Encoding.UTF8.GetString(RowSplitter.CellAt(line, _shape.Delimiter, unitAt)), out double factor, out string unit))
                _cells[c] = _cells[c] with { Value = UnitWords.Scale(_cells[c].Value, factor), Half = _cells[c].Half * factor, Unit = unit };
        }
    }

    private bool IsRow(ReadOnlySpan<Cell> cells, out Cell wrong, out int wrongAt)
    {
        (wrong, wrongAt) = (default, -1);
        int numbers = 0;
        for (int i = 0; i < _shape.Columns.Length; i++)
        {
            int c = _shape.Columns[i];
            if (c >= cells.Length)
            {
                // A table that stands right of another may end before it, its cells not even written.
                if (!IsEndOfGroup(i, c))
                    return false;
                (_values[i], _halves[i]) = (double.NaN, 0);
                continue;
            }
            if (cells[c].Kind == CellKind.Text && table.Roles[i] != ColumnRole.Skip)
            {
                (wrong, wrongAt) = (cells[c], c);
                return false;
            }
            (_values[i], _halves[i]) = (cells[c].Value, cells[c].Half);
            if (cells[c].Kind is CellKind.Number or CellKind.Gap)
                numbers++;
        }
        // Words behind the numbers are notes; a number there has slipped out of its column.
        for (int c = _shape.Width; c < cells.Length; c++)
            if (cells[c].Kind == CellKind.Number)
                return false;
        return numbers > 0;
    }

    private bool IsEndOfGroup(int i, int c)
    {
        while (i > 0 && table.Axes[i] is null)
            i--;
        return i > 0 && _shape.Columns[i] >= _count;
    }

    private void AddRow()
    {
        if (_blankBefore && table.Rows > 0)
            table.Breaks.Add(table.Rows);
        _blankBefore = false;
        for (int i = 0; i < _values.Length; i++)
        {
            table.Samples[i]?.Add(_values[i]);
            table.Axes[i]?.Add(_values[i], _halves[i]);
        }
        table.Rows++;
    }

    // Text ends a block; a row that only lost a cell or has a word in it does not, as long as the next line goes on as before.
    private bool EndsBlock(ReadOnlySpan<Cell> cells, ReadOnlySpan<byte> line, ReadOnlySpan<byte> following)
    {
        bool hasNumbers = _shape.Columns.AsSpan().ContainsAny(RowFit.Numbers(cells));
        if (!hasNumbers || _blankBefore)
            return true;
        if (cells[0].Kind != CellKind.Text)
            return false;
        if (Preamble.Says(RowSplitter.Cells(line, _shape.Delimiter)))
            return true;
        if (following.IsEmpty && !text.Ended)
            return false;
        int end = following.IndexOf((byte)'\n');
        Take(end < 0 ? following : following[..end], 0);
        bool goesOn = IsRow(_cells.AsSpan(0, _count), out _, out _);
        Take(line, 0);
        return !goesOn;
    }

    private ImportException Refusal(ReadOnlySpan<byte> line, long number, Cell wrong, int wrongAt)
    {
        if (wrongAt < 0)
            return new ImportException(file, FormattableString.Invariant($"expected {Expected()}, found {_filled}: \"{Excerpt.Of(line)}\". Export the capture again with all channels in every line."), number);
        return new ImportException(file, $"expected a number, found \"{Excerpt.Of(RowSplitter.CellAt(line, _shape.Delimiter, wrongAt))}\". Remove the line, or name its columns under [import].", number, wrongAt + 1);
    }

    private string Expected()
    {
        string[] names = [.. table.Header.Labels.Select(l => Excerpt.Of(l.Name, 20))];
        return names.Length == 1 ? "1 column" : names.Any(n => n.Length == 0) || names.Length > 8 ? $"{names.Length} columns" : $"{names.Length} columns ({string.Join(", ", names)})";
    }
}
