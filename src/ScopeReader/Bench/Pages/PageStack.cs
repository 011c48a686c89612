using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Work;

namespace ScopeReader.Bench.Pages;

/// <summary>The whole bench without a terminal: the pages on top of each other, keys in, cells out.</summary>
internal sealed class PageStack : IBenchHost
{
    private readonly Stack<Page> _pages = new();

    /// <summary>Starts with the main page.</summary>
    public PageStack(Workbench bench) => _pages.Push(new WorkPage(bench, this));

    /// <summary>The page that is seen.</summary>
    public Page Top => _pages.Peek();

    /// <summary>Told when the person wants to leave.</summary>
    public event Action? QuitAsked;

    /// <summary>Told when the person presses Ctrl-C, on whatever page.</summary>
    public event Action? InterruptAsked;

    /// <summary>Paints the page that is seen.</summary>
    public void Paint(CellGrid grid, int width, int height)
    {
        grid.Reset(width, height);
        Top.Paint(grid);
    }

    /// <summary>Gives it a key.</summary>
    /// <returns>False where nothing came of it.</returns>
    public bool Press(KeyPress key)
    {
        if (key == KeyPress.WithCtrl('c'))
        {
            InterruptAsked?.Invoke();
            return true;
        }
        return Top.Press(key);
    }

    /// <summary>Gives it the pointer.</summary>
    public void Point(PointerMove pointer) => Top.Point(pointer);

    /// <inheritdoc/>
    public void Show(Page page) => _pages.Push(page);

    /// <inheritdoc/>
    public void Back()
    {
        if (_pages.Count > 1)
            _pages.Pop();
    }

    /// <inheritdoc/>
    public void Help(Page page) => Show(HelpPage.Of(page, this));

    /// <inheritdoc/>
    public void Quit() => QuitAsked?.Invoke();
}
