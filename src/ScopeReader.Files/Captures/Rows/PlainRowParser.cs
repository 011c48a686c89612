using System.Runtime.CompilerServices;
using ScopeReader.Files.Numbers;
using ScopeReader.Files.Structure;

namespace ScopeReader.Files.Rows;

/// <summary>Reads rows of nothing but numbers: padded or not, quoted or not, with one unit behind each or none.</summary>
/// <remarks>Pointers, and why they stay where they may be. Text: it ends in a line feed, every step from byte to byte stops at
/// one, and what is looked at without a step (16 bytes of a number, 8 of a unit) lies in the slack behind the text. Numbers: a row
/// is written before its line feed is passed and never two for one line feed, so that no more rows are written than the text
/// has line feeds, which is how many the caller has made room for.</remarks>
internal sealed unsafe class PlainRowParser(TableShape shape, int cells)
{
    private readonly byte _delimiter = (byte)shape.Delimiter, _mark = (byte)shape.Mark;
    private readonly bool _isSpaced = shape.Delimiter == RowSplitter.Spaces;

    // Cells behind the last number that the first row has too.
    private readonly int _spare = Math.Max(0, shape.Width - cells);

    /// <summary>Reads rows up to the end or to one of another kind.</summary>
    /// <param name="start">The first row's start.</param>
    /// <param name="end">Behind the last row's line feed.</param>
    /// <param name="row">Number of the first row in the columns, from 0.</param>
    /// <param name="cells">What the cells of a row hold.</param>
    /// <param name="rows">How many rows were read.</param>
    /// <returns>Behind the last row read.</returns>
    public byte* Parse(byte* start, byte* end, int row, PlainCell[] cells, out int rows)
    {
        int first = row, last = cells.Length - 1;
        byte* p = start;
        byte delimiter = _delimiter;
        var layouts = new NumberLayout[cells.Length];
        Array.Fill(layouts, NumberLayout.None);
        fixed (double* tables = NumberLayout.Tables)
        fixed (PlainCell* cell = cells)
        fixed (NumberLayout* layout = layouts)
            while (p < end)
            {
                byte* line = p;
                for (int c = 0; ; c++)
                {
                    byte* next = cell[c].IsBare ? NumberLayout.ReadAlike(p, layout + c, tables, cell[c].Values + row, cell[c].HalfOf(row)) : null;
                    if (next == null && (next = ReadCell(p, cell + c, layout + c, tables, row)) == null)
                        goto NotPlain;
                    p = next;
                    if (c == last)
                        break;
                    if (*p != delimiter && *(p = Padding(p)) != delimiter && !(_isSpaced && *p == '\t'))
                        goto NotPlain;
                    p++;
                }
                if (*p == '\n')
                    p++;
                else if ((p = EndOfRow(p)) == null)
                    goto NotPlain;
                row++;
                continue;
            NotPlain:
                p = line;
                break;
            }
        rows = row - first;
        return p;
    }

    // A cell with whatever may stand round its number. Behind it and its padding; null where it is of another kind.
    [MethodImpl(MethodImplOptions.NoInlining)]
    private byte* ReadCell(byte* p, PlainCell* cell, NumberLayout* layout, double* tables, int row)
    {
        while (*p == ' ' || (_isSpaced && *p == '\t'))
            p++;
        if (cell->Kind == PlainCellKind.Number)
        {
            bool isQuoted = *p == '"';
            p += isQuoted ? 1 : 0;
            double* value = cell->Values + row, half = cell->HalfOf(row);
            byte* next = NumberLayout.ReadAlike(p, layout, tables, value, half);
            if (next == null)
                next = NumberLayout.ReadAny(p, _mark, layout, row, value, half);
            p = next;
            if (p == null)
                return null;
            if (cell->IsScaled)
            {
                if (cell->UnitLength > 0 && !cell->HasUnit(p))
                    return null;
                p += cell->UnitLength;
                cell->ToBaseUnit(value, half);
            }
            if (isQuoted && *p++ != '"')
                return null;
        }
        else if ((p = Skip(p, cell)) == null)
            return null;
        return Padding(p);
    }

    private byte* Padding(byte* p)
    {
        while (!_isSpaced && *p == ' ')
            p++;
        return p;
    }

    private byte* Skip(byte* p, PlainCell* cell)
    {
        byte* start = p;
        switch (cell->Kind)
        {
            case PlainCellKind.Count:
                while ((uint)(*p - '0') <= 9)
                    p++;
                return p == start ? null : p;
            case PlainCellKind.Unit:
                return cell->HasUnit(p) ? p + cell->UnitLength : null;
            default:
                return Pass(p);
        }
    }

    private byte* Pass(byte* p)
    {
        while (*p != _delimiter && *p is not ((byte)'\n' or (byte)'\r' or (byte)'"') && !(_isSpaced && *p == '\t'))
            p++;
        return p;
    }

    // Behind the line feed; null where something stands before it that is no spare cell.
    private byte* EndOfRow(byte* p)
    {
        p = Padding(p);
        if (_isSpaced)
            while (*p is (byte)' ' or (byte)'\t')
                p++;
        else
            for (int k = 0; *p == _delimiter && k <= _spare; k++)
            {
                p++;
                if (k < _spare)
                    p = Pass(p);
            }
        if (*p == '\r')
            p++;
        return *p == '\n' ? p + 1 : null;
    }
}
