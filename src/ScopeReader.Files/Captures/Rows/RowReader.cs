using ScopeReader.Files.Meaning;
using ScopeReader.Files.Structure;
using ScopeReader.Files.Text;

namespace ScopeReader.Files.Rows;

/// <summary>Reads the rows of a block of numbers.</summary>
internal sealed class RowReader
{
    private readonly TextWindow _text;
    private readonly string _file;
    private readonly Table _table;
    private readonly int _width;
    private readonly double[] _values;
    private readonly int[] _lastDigits;

    public RowReader(TextWindow text, string file, Table table)
    {
        (_text, _file, _table) = (text, file, table);
        TableShape shape = table.Shape;
        _width = shape.Rows[shape.First].Length;
        (_values, _lastDigits) = (new double[shape.Columns.Length], new int[shape.Columns.Length]);
    }

    /// <summary>Reads to the end of the file.</summary>
    /// <exception cref="ImportException">A row is not built as the others are.</exception>
    public void Read(CancellationToken cancellation)
    {
        do
        {
            cancellation.ThrowIfCancellationRequested();
            ReadOnlySpan<byte> pending = _text.Pending;
            int done = 0;
            long lines = 0;
            for (int end; (end = pending[done..].IndexOf((byte)'\n')) >= 0; done += end + 1, lines++)
                ReadRow(pending.Slice(done, end), _text.Line + lines, isLast: false);
            _text.Consume(done, lines);
        }
        while (_text.Fill());
        if (!_text.Pending.IsEmpty)
            ReadRow(_text.Pending, _text.Line, isLast: true);
    }

    private void ReadRow(ReadOnlySpan<byte> line, long number, bool isLast)
    {
        TableShape shape = _table.Shape;
        line = line.TrimEnd("\r\u001A"u8);
        int cells = 0, taken = 0, filled = 0, position = 0;
        bool isTooLong = false;
        for (; RowSplitter.Next(line, shape.Delimiter, ref position, out ReadOnlySpan<byte> cell); cells++)
        {
            if (Cell.Trim(cell).Length > 0)
                filled = cells + 1;
            if (taken == shape.Columns.Length || shape.Columns[taken] != cells)
            {
                // Words behind the numbers are notes; a number there has slipped out of its column.
                isTooLong |= cells >= _width && Cell.Read(cell, (byte)shape.Mark, out _, out _) == CellKind.Number;
                continue;
            }
            CellKind kind = Cell.Read(cell, (byte)shape.Mark, out _values[taken], out _lastDigits[taken]);
            if (kind == CellKind.Text && _table.Roles[taken] != ColumnRole.Skip)
            {
                if (isLast && IsCut())
                    return;
                throw new ImportException(_file, $"expected a number, found \"{Excerpt.Of(cell)}\". Remove the line, or name its columns under [import].", number, cells + 1);
            }
            taken++;
        }
        if (filled == 0)
            return;
        if (taken < shape.Columns.Length || isTooLong)
        {
            if (isLast && taken < shape.Columns.Length && IsCut())
                return;
            throw new ImportException(_file, $"expected {Expected()}, found {filled}: \"{Excerpt.Of(line)}\". Export the capture again with all channels in every line.", number);
        }
        for (int i = 0; i < _values.Length; i++)
        {
            _table.Columns[i].Add(_values[i]);
            if (_table.Roles[i] is ColumnRole.Time or ColumnRole.Frequency or ColumnRole.Index)
                _table.Spacings[i].Add(_values[i], 0.5 * Math.Pow(10, _lastDigits[i]));
        }
    }

    // A last line without its line end is one that was still being written.
    private bool IsCut() => _table.IsCut = true;

    private string Expected()
    {
        IEnumerable<string> names = _table.Header.Labels.Select(l => Excerpt.Of(l.Name, 20));
        int count = _table.Shape.Columns.Length;
        return count == 1 ? "1 column" : names.Any(n => n.Length == 0) ? $"{count} columns" : $"{count} columns ({string.Join(", ", names)})";
    }
}
