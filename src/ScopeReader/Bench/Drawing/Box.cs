namespace ScopeReader.Bench.Drawing;

/// <summary>A rectangle of cells.</summary>
/// <param name="Left">First column.</param>
/// <param name="Top">First row.</param>
/// <param name="Width">Columns; 0 where there is no room.</param>
/// <param name="Height">Rows.</param>
internal readonly record struct Box(int Left, int Top, int Width, int Height)
{
    /// <summary>The column after the last.</summary>
    public int Right => Left + Width;

    /// <summary>The row after the last.</summary>
    public int Bottom => Top + Height;

    /// <summary>True where the cell lies inside.</summary>
    public bool Holds(int x, int y) => x >= Left && x < Right && y >= Top && y < Bottom;
}
