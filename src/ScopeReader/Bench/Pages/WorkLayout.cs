using ScopeReader.Bench.Drawing;

namespace ScopeReader.Bench.Pages;

/// <summary>Where everything stands on the main page.</summary>
/// <param name="List">The open captures; no room where one line in the header says it all.</param>
/// <param name="About">One row: the capture and channel that is looked at.</param>
/// <param name="Plot">The plot.</param>
/// <param name="Tabs">One row: what the panel shows.</param>
/// <param name="Panel">Readings, findings or what was not measured.</param>
/// <param name="Reason">What stands behind the selected line.</param>
/// <param name="Keys">The row of keys.</param>
internal sealed record WorkLayout(Box List, Box About, Box Plot, Box Tabs, Box Panel, Box Reason, int Keys)
{
    /// <summary>The smallest screen that the page works on.</summary>
    public const int LeastWidth = 30, LeastHeight = 10;

    /// <summary>The layout of a screen.</summary>
    /// <param name="width">Columns.</param>
    /// <param name="height">Rows.</param>
    /// <param name="captures">How many captures are open.</param>
    public static WorkLayout For(int width, int height, int captures)
    {
        bool small = height < 18;
        int reason = small ? 1 : height < 32 ? 2 : 3, panel = small ? Math.Max(3, (height - 4) / 2 - 1) : Math.Max(6, (height - 7) * 2 / 5);
        int keys = height - 1, reasonTop = keys - reason, panelTop = reasonTop - panel, tabs = panelTop - 1, top = 1;
        // One capture, or a narrow screen, needs no list: the row above the plot names it.
        int list = captures < 2 || width < 70 ? 0 : Math.Clamp(width / 4, 27, 40);
        int left = list == 0 ? 0 : list + 1, upper = tabs - top;
        return new WorkLayout(
            new Box(0, top, list, list == 0 ? 0 : upper),
            new Box(left, top, width - left, 1),
            new Box(left, top + 1, width - left - 1, upper - 1),
            new Box(0, tabs, width, 1),
            new Box(0, panelTop, width, panel),
            new Box(1, reasonTop, width - 2, reason),
            keys);
    }
}
