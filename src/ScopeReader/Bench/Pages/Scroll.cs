namespace ScopeReader.Bench.Pages;

/// <summary>A selected line in a list of which a few rows are shown.</summary>
internal sealed class Scroll
{
    /// <summary>The selected line.</summary>
    public int Selected { get; private set; }

    /// <summary>The first line shown.</summary>
    public int First { get; private set; }

    /// <summary>Moves the selection; stays in the list.</summary>
    public void Move(int lines, int count) => Selected = Math.Clamp(Selected + lines, 0, Math.Max(0, count - 1));

    /// <summary>Keeps both in the list, and the selected line on the screen.</summary>
    public void Fit(int count, int rows)
    {
        rows = Math.Max(1, rows);
        Selected = Math.Clamp(Selected, 0, Math.Max(0, count - 1));
        First = Math.Clamp(First, Math.Max(0, Selected - rows + 1), Selected);
        First = Math.Clamp(First, 0, Math.Max(0, count - rows));
    }
}
