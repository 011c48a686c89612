using ScopeReader.Bench.Drawing;

namespace ScopeReader.Bench.Plots;

/// <summary>Paints a record with axes in its units. Its cost is that of the cells, not of the samples.</summary>
internal sealed class PlotPainter
{
    private const int RoomForLabels = 8;
    private readonly DotGrid _dots = new();

    /// <summary>The cells that the samples are drawn in, inside a plot's box: what a pointer's place is a share of.</summary>
    public static Box Area(Box box)
    {
        int below = box.Height >= 6 ? 2 : 1;
        return new Box(box.Left + RoomForLabels, box.Top, Math.Max(0, box.Width - RoomForLabels), Math.Max(0, box.Height - below));
    }

    /// <summary>Paints.</summary>
    /// <param name="grid">Where to.</param>
    /// <param name="box">The cells it may use.</param>
    /// <param name="source">The record.</param>
    /// <param name="window">The part shown.</param>
    /// <param name="marks">What is marked on it.</param>
    public void Paint(CellGrid grid, Box box, PlotSource source, PlotWindow window, IReadOnlyList<PlotMark> marks)
    {
        Box area = Area(box);
        if (area.Width < 8 || area.Height < 2)
            return;
        _dots.Reset(area.Width, area.Height);
        foreach (PlotMark mark in marks)
            Line(mark, window);
        Trace(source, window);
        Axes(grid, area, box, source, window);
        _dots.PaintTo(grid, area.Left, area.Top);
        Labels(grid, area, window, marks);
    }

    private int Row(double y, PlotWindow window)
    {
        double row = (_dots.Height - 1) * (window.Top - y) / (window.Top - window.Bottom);
        // Beyond the window by more than any screen: still an int.
        return (int)Math.Round(Math.Clamp(row, -1e6, 1e6));
    }

    private double Column(double x, PlotWindow window) => _dots.Width * (x - window.Left) / (window.Right - window.Left);

    private void Trace(PlotSource source, PlotWindow window)
    {
        ReadOnlySpan<double> values = source.Values;
        int count = values.Length;
        (int Top, int Bottom)? before = null;
        double from = source.IndexOf(window.Left);
        for (int x = 0; x < _dots.Width; x++)
        {
            double to = source.IndexOf(window.Left + (x + 1.0) / _dots.Width * (window.Right - window.Left));
            (int Top, int Bottom)? here = Stretch(source, values, from, to, window);
            from = to;
            if (here is { } h)
            {
                // Joined to its neighbour, so that a steep edge stays one line.
                int top = before is { } a && a.Bottom < h.Top ? a.Bottom + 1 : h.Top;
                int bottom = before is { } b && b.Top > h.Bottom ? b.Top - 1 : h.Bottom;
                _dots.Column(x, top, bottom, Ink.Trace);
            }
            before = here;
        }
        Samples(source, values, window, count);
    }

    // The rows that one column of dots covers: all values in it, or the straight line between two where there are fewer.
    private (int, int)? Stretch(PlotSource source, ReadOnlySpan<double> values, double from, double to, PlotWindow window)
    {
        int count = values.Length;
        if (to < 0 || from > count - 1)
            return null;
        int first = (int)Math.Ceiling(Math.Max(0, from)), end = (int)Math.Min(count, Math.Floor(Math.Max(-1, to)) + 1);
        if (end > first)
        {
            (double low, double high) = source.Between(first, end);
            return (Row(high, window), Row(low, window));
        }
        double middle = (from + to) / 2;
        int i = (int)Math.Floor(middle);
        if (i < 0 || i >= count - 1)
            return null;
        int row = Row(values[i] + (values[i + 1] - values[i]) * (middle - i), window);
        return (row, row);
    }

    // Far in, each sample is a small cross: what lies between two of them was not measured.
    private void Samples(PlotSource source, ReadOnlySpan<double> values, PlotWindow window, int count)
    {
        double first = Math.Ceiling(source.IndexOf(window.Left)), last = Math.Floor(source.IndexOf(window.Right));
        if (last - first < 0 || (last - first + 1) * 8 > _dots.Width)
            return;
        for (int i = (int)Math.Max(0, first); i <= Math.Min(count - 1, last); i++)
        {
            int x = (int)Column(source.At(i), window), y = Row(values[i], window);
            for (int d = -1; d <= 1; d++)
            {
                _dots.Set(x + d, y, Ink.Trace);
                _dots.Set(x, y + d, Ink.Trace);
            }
        }
    }

    private void Line(PlotMark mark, PlotWindow window)
    {
        int row = Row(mark.Y, window);
        if (mark.X is not { } place)
        {
            _dots.Row(row, mark.Ink == Ink.Bound ? 2 : 4, mark.Ink);
            return;
        }
        if (mark.Ink != Ink.Bound)
            return;
        int middle = (int)Column(place, window);
        for (int d = -4; d <= 4; d++)
            _dots.Set(middle + d, row, mark.Ink);
    }

    private void Labels(CellGrid grid, Box area, PlotWindow window, IReadOnlyList<PlotMark> marks)
    {
        foreach (PlotMark mark in marks)
        {
            int row = Row(mark.Y, window);
            if (mark.Label.Length == 0 || row < 0 || row >= _dots.Height)
                continue;
            if (mark.X is not { } place)
            {
                grid.TextEnding(area.Right, area.Top + row / 4, " " + mark.Label, mark.Ink);
                continue;
            }
            int column = (int)Column(place, window);
            if (column >= 0 && column < _dots.Width)
                grid.Text(area.Left + column / 2, Math.Max(area.Top, area.Top + row / 4 - 1), mark.Label, mark.Ink, area.Right - area.Left - column / 2);
        }
    }

    private void Axes(CellGrid grid, Box area, Box box, PlotSource source, PlotWindow window)
    {
        for (int y = area.Top; y < area.Bottom; y++)
            grid.Put(area.Left - 1, y, '│', Ink.Quiet);
        var levels = new AxisTicks(window.Bottom, window.Top, Math.Max(2, area.Height / 2), source.YUnit);
        for (int i = 0; i < levels.Count; i++)
        {
            int y = area.Top + Math.Clamp(Row(levels.At(i), window) / 4, 0, area.Height - 1);
            grid.Put(area.Left - 1, y, '┤', Ink.Quiet);
            grid.TextEnding(area.Left - 1, y, levels.Label(i), Ink.Quiet, RoomForLabels - 1);
        }
        var places = new AxisTicks(window.Left, window.Right, Math.Max(2, area.Width / 12), source.XUnit);
        int line = area.Bottom, text = box.Bottom - 1;
        if (text > line)
        {
            grid.Put(area.Left - 1, line, '└', Ink.Quiet);
            for (int x = area.Left; x < area.Right; x++)
                grid.Put(x, line, '─', Ink.Quiet);
        }
        grid.TextEnding(area.Left - 1, line, levels.Unit, Ink.Quiet, RoomForLabels - 1);
        string unit = places.From is { } from ? $"{places.Unit} from {from}" : places.Unit;
        int room = area.Right - ScreenText.Width(unit) - 1;
        grid.TextEnding(area.Right, text, unit, Ink.Quiet);
        int free = area.Left - 1;
        for (int i = 0; i < places.Count; i++)
        {
            int column = area.Left + (int)(Column(places.At(i), window) / 2);
            if (column < area.Left || column >= area.Right)
                continue;
            if (text > line)
                grid.Put(column, line, '┴', Ink.Quiet);
            string label = places.Label(i);
            int start = Math.Max(area.Left - 1, column - label.Length / 2);
            if (start < free || start + label.Length > room)
                continue;
            grid.Text(start, text, label, Ink.Quiet);
            free = start + label.Length + 2;
        }
    }
}
