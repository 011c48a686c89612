using ScopeReader.Bench.Drawing;

namespace ScopeReader.Bench.Pages;

/// <summary>One full screen. It paints cells and takes keys; it knows no terminal.</summary>
internal abstract class Page
{
    /// <summary>What can be done here, in the order of the line of keys.</summary>
    public abstract IReadOnlyList<PageAction> Actions { get; }

    /// <summary>What the help says first about this page.</summary>
    public abstract string About { get; }

    /// <summary>Paints the whole grid, which is blank.</summary>
    public abstract void Paint(CellGrid grid);

    /// <summary>Takes a key.</summary>
    /// <returns>False where the page has no use for it.</returns>
    public virtual bool Press(KeyPress key)
    {
        foreach (PageAction action in Actions)
            foreach ((KeyPress own, Action act) in action.Presses)
                if (own == key)
                {
                    act();
                    return true;
                }
        return false;
    }

    /// <summary>Takes the pointer.</summary>
    public virtual void Point(PointerMove pointer)
    {
    }

    /// <summary>Writes the keys along a row, as many as there is room for.</summary>
    protected void PaintKeys(CellGrid grid, int row)
    {
        int x = 1;
        foreach (PageAction action in Actions)
        {
            if (action.Name.Length == 0)
                continue;
            int width = ScreenText.Width(action.Shown) + 1 + ScreenText.Width(action.Name);
            if (x + width > grid.Width)
                break;
            x = grid.Text(x, row, action.Shown, Ink.Accent);
            x = grid.Text(x + 1, row, action.Name, Ink.Quiet) + 2;
        }
    }
}
