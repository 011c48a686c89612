using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Plots;
using ScopeReader.Comparing;

namespace ScopeReader.Commands.Tables;

/// <summary>Two curves as text: the reference in dots, the compared one in letters, so that they differ on paper too.</summary>
internal static class OverlayPlot
{
    private const int RoomForLabels = 9;
    private const char Mark = 'o';

    /// <summary>Draws.</summary>
    /// <param name="overlay">The curves.</param>
    /// <param name="width">Columns, 20 or more.</param>
    /// <param name="rows">Rows of the curves; the axis takes two more.</param>
    public static string[] Draw(Overlay overlay, int width, int rows)
    {
        int columns = width - RoomForLabels;
        double low = Math.Min(overlay.Reference.Min(), overlay.Compared.Min()), high = Math.Max(overlay.Reference.Max(), overlay.Compared.Max());
        double margin = high > low ? 0.02 * (high - low) : Math.Max(1e-12, Math.Abs(high));
        (low, high) = (low - margin, high + margin);
        var grid = new CellGrid();
        grid.Reset(width, rows + 2);
        var dots = new DotGrid();
        dots.Reset(columns, rows);

        for (int x = 0; x < dots.Width; x++)
        {
            (double least, double most) = Stretch(overlay.Reference, x, dots.Width);
            dots.Column(x, Row(most, dots.Height), Row(least, dots.Height), Ink.Trace);
        }
        dots.PaintTo(grid, RoomForLabels, 0);
        for (int x = 0; x < columns; x++)
        {
            (double least, double most) = Stretch(overlay.Compared, x, columns);
            for (int y = Row(most, rows); y <= Row(least, rows); y++)
                grid.Put(RoomForLabels + x, y, Mark, Ink.Accent);
        }
        Axes(grid, overlay, rows, low, high);
        return grid.ToString().TrimEnd('\n').Split('\n');

        int Row(double value, int height) => Math.Clamp((int)Math.Round((height - 1) * (high - value) / (high - low)), 0, height - 1);
    }

    // Least and greatest value of what one column shows, joined to the next.
    private static (double Least, double Most) Stretch(IReadOnlyList<double> values, int column, int columns)
    {
        double from = (double)column * (values.Count - 1) / columns, to = (double)(column + 1) * (values.Count - 1) / columns;
        double least = Math.Min(At(from), At(to)), most = Math.Max(At(from), At(to));
        for (int i = (int)Math.Ceiling(from); i <= (int)to; i++)
            (least, most) = (Math.Min(least, values[i]), Math.Max(most, values[i]));
        return (least, most);

        double At(double place)
        {
            int i = Math.Min((int)place, values.Count - 2);
            return values[i] + (place - i) * (values[i + 1] - values[i]);
        }
    }

    private static void Axes(CellGrid grid, Overlay overlay, int rows, double low, double high)
    {
        int left = RoomForLabels - 1, columns = grid.Width - RoomForLabels;
        for (int y = 0; y < rows; y++)
            grid.Put(left, y, '│', Ink.Quiet);
        var levels = new AxisTicks(low, high, rows / 3, overlay.YUnit);
        for (int i = 0; i < levels.Count; i++)
        {
            int y = Math.Clamp((int)Math.Round((rows - 1) * (high - levels.At(i)) / (high - low)), 0, rows - 1);
            grid.Put(left, y, '┤', Ink.Quiet);
            grid.TextEnding(left, y, levels.Label(i), Ink.Quiet);
        }
        double end = overlay.Start + overlay.Step * (overlay.Reference.Count - 1);
        var places = new AxisTicks(overlay.Start, end, Math.Max(2, columns / 12), overlay.XUnit);
        grid.Put(left, rows, '└', Ink.Quiet);
        for (int x = RoomForLabels; x < grid.Width; x++)
            grid.Put(x, rows, '─', Ink.Quiet);
        grid.TextEnding(left, rows, levels.Unit, Ink.Quiet);
        grid.TextEnding(grid.Width, rows + 1, places.Unit, Ink.Quiet);
        int free = 0, room = grid.Width - ScreenText.Width(places.Unit) - 1;
        for (int i = 0; i < places.Count; i++)
        {
            int column = RoomForLabels + (int)(columns * (places.At(i) - overlay.Start) / (end - overlay.Start));
            string label = places.Label(i);
            int start = column - label.Length / 2;
            if (column >= grid.Width)
                continue;
            grid.Put(column, rows, '┴', Ink.Quiet);
            if (start < free || start + label.Length > room)
                continue;
            grid.Text(start, rows + 1, label, Ink.Quiet);
            free = start + label.Length + 2;
        }
    }
}
