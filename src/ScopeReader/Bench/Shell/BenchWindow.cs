using System.Drawing;
using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Pages;
using Terminal.Gui.Drivers;
using Terminal.Gui.Input;
using Terminal.Gui.ViewBase;
using Terminal.Gui.Views;
using Attribute = Terminal.Gui.Drawing.Attribute;
using Cell = Terminal.Gui.Drawing.Cell;

namespace ScopeReader.Bench.Shell;

/// <summary>The one view: keys and pointer in, cells out. Everything that is decided is decided in the pages.</summary>
internal sealed class BenchWindow : Runnable
{
    // One string a character, so that drawing allocates none.
    private static readonly string[] Graphemes = [.. Enumerable.Range(0, 0x2900).Select(i => ((char)i).ToString())];

    private readonly PageStack _pages;
    private readonly BenchTheme _theme;
    private readonly CellGrid _grid = new();

    /// <param name="pages">The bench.</param>
    /// <param name="theme">How its inks look.</param>
    public BenchWindow(PageStack pages, BenchTheme theme)
    {
        (_pages, _theme) = (pages, theme);
        Width = Dim.Fill();
        Height = Dim.Fill();
        CanFocus = true;
        BorderStyle = Terminal.Gui.Drawing.LineStyle.None;
        ShadowStyle = null;
        MousePositionTracking = true;
    }

    /// <summary>Draws through the library's own text calls instead; a test holds the two against each other.</summary>
    public bool DrawsByText { get; init; }

    /// <inheritdoc/>
    protected override bool OnKeyDown(Key key)
    {
        if (KeyTranslation.Of(key) is { } press && _pages.Press(press))
            SetNeedsDraw();
        // Every key ends here: the library's own bindings, and those of a person's settings for it, stay silent.
        return true;
    }

    /// <inheritdoc/>
    protected override bool OnMouseEvent(Mouse mouse)
    {
        if (KeyTranslation.Of(mouse) is { } move)
        {
            _pages.Point(move);
            SetNeedsDraw();
        }
        return true;
    }

    // Every cell is written below: clearing first would only mark them all as changed.
    /// <inheritdoc/>
    protected override bool OnClearingViewport() => !DrawsByText;

    /// <inheritdoc/>
    protected override bool OnDrawingContent(DrawContext? context)
    {
        if (App?.Driver is not { Contents: { } cells } driver)
            return true;
        _pages.Paint(_grid, Viewport.Width, Viewport.Height);
        if (DrawsByText)
            DrawText();
        else
            DrawCells(driver, cells);
        context?.AddDrawnRectangle(ViewportToScreen(new Rectangle(0, 0, _grid.Width, _grid.Height)));
        return true;
    }

    private void DrawText()
    {
        for (int y = 0; y < _grid.Height; y++)
            for (int x = 0; x < _grid.Width; x++)
            {
                if (_grid.Character(x, y) == CellGrid.Continuation)
                    continue;
                SetAttribute(_theme.Of(_grid.InkAt(x, y)));
                Move(x, y);
                AddStr(_grid.Character(x, y).ToString());
            }
    }

    // Ten times as fast as the library's calls: only cells that changed are touched and sent.
    private void DrawCells(IDriver driver, Cell[,] cells)
    {
        bool[] dirty = driver.GetOutputBuffer().DirtyLines;
        int rows = Math.Min(_grid.Height, cells.GetLength(0)), columns = Math.Min(_grid.Width, cells.GetLength(1));
        for (int y = 0; y < rows; y++)
            for (int x = 0; x < columns; x++)
            {
                char c = _grid.Character(x, y);
                Attribute look = _theme.Of(_grid.InkAt(x, y));
                // The cell after a wide character is skipped when sent: what stands in it must only not be stale.
                string grapheme = c == CellGrid.Continuation ? " " : c < Graphemes.Length ? Graphemes[c] : c.ToString();
                ref Cell cell = ref cells[y, x];
                if (cell.Grapheme == grapheme && cell.Attribute == look)
                    continue;
                cells[y, x] = new Cell(look, true, grapheme);
                dirty[y] = true;
            }
    }
}
