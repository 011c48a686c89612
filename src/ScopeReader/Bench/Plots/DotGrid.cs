using ScopeReader.Bench.Drawing;

namespace ScopeReader.Bench.Plots;

/// <summary>Dots, two across and four down in each cell, drawn as braille patterns (Unicode block 2800).</summary>
internal sealed class DotGrid
{
    private byte[] _dots = [];
    private Ink[] _inks = [];
    private int _columns;

    /// <summary>Dots across.</summary>
    public int Width { get; private set; }

    /// <summary>Dots down.</summary>
    public int Height { get; private set; }

    private static ReadOnlySpan<byte> Bits => [0x01, 0x02, 0x04, 0x40, 0x08, 0x10, 0x20, 0x80];

    /// <summary>Makes it blank; keeps its memory.</summary>
    public void Reset(int columns, int rows)
    {
        (_columns, Width, Height) = (columns, columns * 2, rows * 4);
        if (_dots.Length < columns * rows)
            (_dots, _inks) = (new byte[columns * rows], new Ink[columns * rows]);
        Array.Clear(_dots, 0, columns * rows);
    }

    /// <summary>Sets a dot; a cell has the ink of its last one. Outside, nothing.</summary>
    public void Set(int x, int y, Ink ink)
    {
        if ((uint)x >= (uint)Width || (uint)y >= (uint)Height)
            return;
        int cell = (y >> 2) * _columns + (x >> 1);
        _dots[cell] |= Bits[(x & 1) * 4 + (y & 3)];
        _inks[cell] = ink;
    }

    /// <summary>Sets every n-th dot of a row.</summary>
    public void Row(int y, int every, Ink ink)
    {
        for (int x = 0; x < Width; x += every)
            Set(x, y, ink);
    }

    /// <summary>Sets the dots of a column from one row to another, both included.</summary>
    public void Column(int x, int top, int bottom, Ink ink)
    {
        for (int y = Math.Max(0, top); y <= Math.Min(Height - 1, bottom); y++)
            Set(x, y, ink);
    }

    /// <summary>Puts every cell with a dot on the grid.</summary>
    public void PaintTo(CellGrid grid, int left, int top)
    {
        int rows = Height / 4;
        for (int y = 0; y < rows; y++)
            for (int x = 0; x < _columns; x++)
                if (_dots[y * _columns + x] is not 0 and byte dots)
                    grid.Put(left + x, top + y, (char)(0x2800 + dots), _inks[y * _columns + x]);
    }
}
