using System.Text;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Numbers;
using ScopeReader.Files.Structure;

namespace ScopeReader.Files.Rows;

/// <summary>The cells of one line at a time, read the long way: quotes, units, clock times, words for no number.</summary>
internal sealed class RowCells(string file, TableShape shape)
{
    private Cell[] _cells = new Cell[16];
    private int _count;

    /// <summary>The cells of the line taken last.</summary>
    public ReadOnlySpan<Cell> All => _cells.AsSpan(0, _count);

    /// <summary>How many cells there are up to the last one that is not empty.</summary>
    public int Filled { get; private set; }

    /// <summary>Takes a line apart.</summary>
    /// <param name="line">UTF-8, without its line feed.</param>
    /// <param name="number">Its number, for messages.</param>
    /// <exception cref="ImportException">It has more cells, or a longer number, than any table.</exception>
    public void Take(ReadOnlySpan<byte> line, long number)
    {
        line = line.TrimEnd("\r\u001A"u8);
        (_count, Filled) = (0, 0);
        int position = 0;
        byte mark = (byte)shape.Mark;
        while (RowSplitter.Next(line, shape.Delimiter, ref position, out ReadOnlySpan<byte> text))
        {
            if (_count == RowSplitter.MostCells)
                throw new ImportException(file, FormattableString.Invariant($"expected lines of at most {RowSplitter.MostCells} cells, found a longer one. Export fewer channels at a time."), number);
            if (_count == _cells.Length)
                Array.Resize(ref _cells, 2 * _count);
            Cell cell = _cells[_count++] = Cell.Read(text, mark);
            if (cell.Kind == CellKind.Text && text.Length > NumberParser.LongestNumber && NumberParser.Length(Cell.Trim(text), mark) > NumberParser.LongestNumber)
                throw new ImportException(file, FormattableString.Invariant($"expected numbers of at most {NumberParser.LongestNumber} characters, found a longer one: \"{Excerpt.Of(text, 20)}\". Export the capture again."), number, _count);
            if (cell.Kind != CellKind.Empty)
                Filled = _count;
        }
        Scale(line);
    }

    // Where the unit stands in the next column it may change from row to row: 999.5 kHz, 1.0005 MHz.
    private void Scale(ReadOnlySpan<byte> line)
    {
        for (int i = 0; i < shape.UnitColumns.Length; i++)
        {
            int unitAt = shape.UnitColumns[i], c = shape.Columns[i];
            if (unitAt < 0 || unitAt >= _count || _cells[c].Kind != CellKind.Number)
                continue;
            if (Label.TryUnit(Encoding.UTF8.GetString(RowSplitter.CellAt(line, shape.Delimiter, unitAt)), out double factor, out string unit))
                _cells[c] = _cells[c] with { Value = UnitWords.Scale(_cells[c].Value, factor), Half = _cells[c].Half * factor, Unit = unit };
        }
    }
}
