using System.Text;

namespace ScopeReader.Bench.Drawing;

/// <summary>A picture in character cells: one character and one ink a cell, no terminal behind it.</summary>
internal sealed class CellGrid
{
    /// <summary>Stands in the second cell of a wide character.</summary>
    public const char Continuation = '\0';

    private char[] _characters = [];
    private Ink[] _inks = [];

    /// <summary>Columns.</summary>
    public int Width { get; private set; }

    /// <summary>Rows.</summary>
    public int Height { get; private set; }

    /// <summary>The character of a cell; <see cref="Continuation"/> after a wide one.</summary>
    public char Character(int x, int y) => _characters[y * Width + x];

    /// <summary>The ink of a cell.</summary>
    public Ink InkAt(int x, int y) => _inks[y * Width + x];

    /// <summary>Makes it blank and of a size; keeps its memory.</summary>
    public void Reset(int width, int height)
    {
        (Width, Height) = (Math.Max(0, width), Math.Max(0, height));
        int cells = Width * Height;
        if (_characters.Length < cells)
            (_characters, _inks) = (new char[cells], new Ink[cells]);
        Array.Fill(_characters, ' ', 0, cells);
        Array.Clear(_inks, 0, cells);
    }

    /// <summary>Writes one narrow character; outside the grid, nothing.</summary>
    public void Put(int x, int y, char character, Ink ink)
    {
        if ((uint)x >= (uint)Width || (uint)y >= (uint)Height)
            return;
        int i = y * Width + x;
        // Half of a wide character must not stay behind.
        if (_characters[i] == Continuation && x > 0)
            _characters[i - 1] = ' ';
        if (x + 1 < Width && _characters[i + 1] == Continuation)
            _characters[i + 1] = ' ';
        _characters[i] = character;
        _inks[i] = ink;
    }

    /// <summary>Writes a line of text, cleaned of what a terminal would obey, cut to a width with an ellipsis.</summary>
    /// <param name="x">First column.</param>
    /// <param name="y">Row.</param>
    /// <param name="text">Any text, also from a file.</param>
    /// <param name="ink">Its ink.</param>
    /// <param name="width">The columns that it may take; to the right edge where not given.</param>
    /// <returns>The column after the text.</returns>
    public int Text(int x, int y, string text, Ink ink = Ink.Plain, int width = int.MaxValue)
    {
        int room = Math.Min(width, Width - x);
        if (room <= 0)
            return x;
        text = ScreenText.Cut(ScreenText.Clean(text), room);
        foreach (char c in text)
        {
            Put(x, y, c, ink);
            if (ScreenText.WidthOf(c) == 2)
            {
                Put(x + 1, y, ' ', ink);
                // Not through Put: it would take the character that this belongs to away.
                if ((uint)(x + 1) < (uint)Width && (uint)y < (uint)Height)
                    _characters[y * Width + x + 1] = Continuation;
                x++;
            }
            x++;
        }
        return x;
    }

    /// <summary>Writes text that ends before a column.</summary>
    public void TextEnding(int end, int y, string text, Ink ink = Ink.Plain, int width = int.MaxValue)
    {
        text = ScreenText.Cut(ScreenText.Clean(text), Math.Min(width, end));
        Text(end - ScreenText.Width(text), y, text, ink);
    }

    /// <summary>Fills a rectangle with blanks.</summary>
    public void Clear(Box box)
    {
        for (int y = box.Top; y < box.Bottom; y++)
            for (int x = box.Left; x < box.Right; x++)
                Put(x, y, ' ', Ink.Plain);
    }

    /// <summary>The characters, a line a row, blanks at the ends of lines left out.</summary>
    public override string ToString()
    {
        var text = new StringBuilder();
        for (int y = 0; y < Height; y++)
        {
            var row = new StringBuilder(Width);
            for (int x = 0; x < Width; x++)
                if (_characters[y * Width + x] != Continuation)
                    row.Append(_characters[y * Width + x]);
            text.Append(row.ToString().TrimEnd()).Append('\n');
        }
        return text.ToString();
    }
}
