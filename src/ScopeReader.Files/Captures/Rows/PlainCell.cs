using System.Runtime.CompilerServices;
using System.Text;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Numbers;
using ScopeReader.Files.Structure;

namespace ScopeReader.Files.Rows;

/// <summary>What a cell of a plain row holds, and where its number goes.</summary>
internal unsafe struct PlainCell
{
    // A unit that is longer is read the long way.
    private const int LongestUnit = sizeof(ulong);

    private ulong _unit, _unitBits;
    private double _factor, _divisor;

    /// <summary>What it holds.</summary>
    public PlainCellKind Kind { get; private set; }

    /// <summary>Where the number of row 0 goes; null for a cell that nobody wants.</summary>
    public double* Values { get; set; }

    /// <summary>Where half of its last digit goes; null where nobody asks.</summary>
    public double* Halves { get; set; }

    /// <summary>True for a wanted number with no unit to it.</summary>
    public readonly bool IsBare => Kind == PlainCellKind.Number && !IsScaled;

    /// <summary>Where half of the last digit of a row's number goes; null for nowhere.</summary>
    public readonly double* HalfOf(int row) => Halves == null ? null : Halves + row;

    /// <summary>Length of the unit that stands here or behind the number, bytes; 0 for none.</summary>
    public int UnitLength { get; private set; }

    /// <summary>True where the number is in a unit that may have a prefix.</summary>
    public bool IsScaled { get; private set; }

    /// <summary>The cells of a table's rows, up to the last column of numbers or units; null where one of them cannot be read the quick way.</summary>
    public static PlainCell[]? Of(Table table)
    {
        TableShape shape = table.Shape;
        string[] first = shape.Rows[shape.First];
        var cells = new PlainCell[Math.Max(shape.Columns[^1], shape.UnitColumns.Max()) + 1];
        for (int c = 0; c < cells.Length; c++)
            cells[c].Kind = PlainCellKind.Anything;
        for (int i = 0; i < shape.Columns.Length; i++)
        {
            int c = shape.Columns[i], unitAt = shape.UnitColumns[i];
            if (table.Roles[i] == ColumnRole.Skip)
                continue;
            cells[c].Kind = table.Roles[i] == ColumnRole.Index ? PlainCellKind.Count : PlainCellKind.Number;
            if (unitAt >= 0)
            {
                cells[unitAt].Kind = PlainCellKind.Unit;
                if (!cells[unitAt].TryUnit(Encoding.UTF8.GetBytes(first[unitAt])))
                    return null;
                cells[c].ScaleAs(cells[unitAt]);
            }
            else if (shape.CellUnits[i] is not null)
            {
                ReadOnlySpan<byte> cell = Encoding.UTF8.GetBytes(first[c]);
                int number = NumberParser.Length(cell, (byte)shape.Mark);
                if (number == 0 || cells[c].Kind == PlainCellKind.Count || !cells[c].TryUnit(cell[number..]))
                    return null;
            }
        }
        return cells;
    }

    /// <summary>True where the unit of the first row stands at a place.</summary>
    /// <param name="p">Eight bytes from it on may be looked at.</param>
    public readonly bool HasUnit(byte* p) => (Unsafe.ReadUnaligned<ulong>(p) & _unitBits) == _unit;

    /// <summary>Turns a number and half of its last digit into the base unit, as <see cref="UnitWords.Scale"/> does.</summary>
    public readonly void ToBaseUnit(double* value, double* half)
    {
        *value = _divisor > 0 ? *value / _divisor : *value * _factor;
        if (half != null)
            *half *= _factor;
    }

    private bool TryUnit(ReadOnlySpan<byte> text)
    {
        if (text.Length is 0 or > LongestUnit || !Label.TryUnit(Encoding.UTF8.GetString(text), out double factor, out _))
            return false;
        for (int i = text.Length - 1; i >= 0; i--)
            (_unit, _unitBits) = (_unit << 8 | text[i], _unitBits << 8 | 0xFF);
        (UnitLength, IsScaled, _factor, _divisor) = (text.Length, true, factor, factor < 1 ? Math.Round(1 / factor) : 0);
        return true;
    }

    private void ScaleAs(PlainCell unit) => (IsScaled, _factor, _divisor) = (true, unit._factor, unit._divisor);
}
