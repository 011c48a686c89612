using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Plots;
using ScopeReader.Bench.Work;
using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader.Bench.Pages;

/// <summary>What can be done on the main page, by key and by pointer.</summary>
internal sealed partial class WorkPage
{
    private (int X, int Y, PlotWindow Window)? _drag;

    private PageAction[] MakeActions() =>
    [
        new("F1", "help", "explain this screen; ? does too", (NamedKey.F1, () => _host.Help(this)), ('?', () => _host.Help(this))),
        new("q", "quit", "quit; Ctrl-Q does too", ('q', _host.Quit), (KeyPress.WithCtrl('q'), _host.Quit)),
        new("Tab", "capture", "look at the next capture, or with Shift the one before", (NamedKey.Tab, () => Step(1)), (KeyPress.WithShift(NamedKey.Tab), () => Step(-1))),
        new("c", "channel", "look at the next channel; C looks at the one before", ('c', () => _bench.Selected?.StepChannel(1)), ('C', () => _bench.Selected?.StepChannel(-1))),
        new("Enter", "why", "everything behind the chosen line: definition, method, uncertainty budget, verdict", (NamedKey.Enter, Why)),
        new("+−", "zoom", "zoom the plot in and out; so does the wheel over it",
            ('+', () => Zoom(0.5)), ('=', () => Zoom(0.5)), ('-', () => Zoom(2)), ('_', () => Zoom(2))),
        new("←→", "move", "move along the record; with Shift by a whole window, or drag the plot",
            (NamedKey.Left, () => Along(-0.125)), (NamedKey.Right, () => Along(0.125)), (KeyPress.WithShift(NamedKey.Left), () => Along(-1)), (KeyPress.WithShift(NamedKey.Right), () => Along(1))),
        new("0", "whole", "show the whole record; Home does too", ('0', Whole), (NamedKey.Home, Whole)),
        new("e", "edge", "go to the next edge; E goes to the one before", ('e', () => Edge(true)), ('E', () => Edge(false))),
        new("↑↓", "line", "choose a line of the table; PgUp and PgDn by a page", (NamedKey.Up, () => Line(-1)), (NamedKey.Down, () => Line(1)),
            (NamedKey.PageUp, () => Line(-_layout.Panel.Height)), (NamedKey.PageDown, () => Line(_layout.Panel.Height))),
        new("o", "open", "open a capture by its path", ('o', () => _host.Show(new OpenPage(_bench, _host, this)))),
        new("1 2 3", "", "readings, findings with cautions, and what was not measured with the reasons",
            ('1', () => _panel = Panel.Readings), ('2', () => _panel = Panel.Findings), ('3', () => _panel = Panel.NotMeasured)),
        new("[ ] v", "", "make the plot's levels smaller or larger; v fits them to what is shown", ('[', () => Taller(1.5)), (']', () => Taller(1 / 1.5)), ('v', FitHeight)),
        new("Shift ↑↓", "", "move the plot up and down", (KeyPress.WithShift(NamedKey.Up), () => Up(0.125)), (KeyPress.WithShift(NamedKey.Down), () => Up(-0.125))),
        new("r", "", "read the file again and measure it", ('r', Again)),
    ];

    private void Step(int step) => _bench.Select(_bench.SelectedIndex + step);

    private void Line(int lines) => Lines.Move(lines, LineCount);

    private void Again()
    {
        if (_bench.Selected is { } capture)
            _bench.Open(capture.Path);
    }

    private void Why()
    {
        if (_bench.Selected is not { } capture)
            return;
        if (_panel == Panel.Readings)
        {
            IReadOnlyList<ReadingRow> rows = Rows;
            if (_readings.Selected < rows.Count)
                _host.Show(DetailPage.Of(rows[_readings.Selected], _host));
            return;
        }
        IReadOnlyList<Note> notes = _panel == Panel.Findings ? Notes.Findings(capture) : Notes.NotMeasured(capture);
        if (Lines.Selected < notes.Count)
            _host.Show(DetailPage.Of(notes[Lines.Selected], _host));
    }

    private void Change(Func<PlotWindow, PlotSource, PlotWindow> change)
    {
        if (_bench.Selected?.View is { } view)
            view.Window = change(view.Window, view.Source);
    }

    private void Zoom(double factor, double anchor = 0.5) => Change((window, source) => window.Wider(factor, anchor, source));

    private void Along(double share) => Change((window, source) => window.Along(share, source));

    private void Up(double share) => Change((window, source) => window.Up(share, source));

    private void Taller(double factor) => Change((window, source) => window.Taller(factor, source));

    private void FitHeight() => Change((window, source) => window.FitHeight(source));

    private void Whole() => Change((_, source) => PlotWindow.Whole(source));

    // Ten rise times, or twice the settling where that is longer, show an edge and what follows it; without either, twenty samples.
    private void Edge(bool forward)
    {
        if (_bench.Selected is not { View: { Channel: Waveform waveform } view } capture)
            return;
        IReadOnlyList<Reading> readings = capture.ChannelMeasured?.Readings ?? [];
        double? Value(Quantity quantity) => readings.FirstOrDefault(r => r.IsPrimary && r.Quantity == quantity)?.Value;
        double level = ((Value(Quantities.HighLevel) ?? view.Source.Highest) + (Value(Quantities.LowLevel) ?? view.Source.Lowest)) / 2;
        double width = Math.Max(Math.Max(10 * (Value(Quantities.RiseTime) ?? 0), 2 * (Value(Quantities.RiseSettling) ?? 0)), 20 * waveform.Interval);
        // Once zoomed in to edges, the person's own zoom stays.
        double now = view.Window.Right - view.Window.Left;
        view.ToEdge(level, now <= 4 * width ? now : width, forward);
    }

    /// <inheritdoc/>
    public override void Point(PointerMove pointer)
    {
        if (_bench.Selected is not { } capture)
            return;
        Box area = PlotPainter.Area(_layout.Plot);
        bool wheel = pointer.Deed is PointerDeed.WheelUp or PointerDeed.WheelDown;
        if (pointer.Deed == PointerDeed.Release)
            _drag = null;
        else if (pointer.Deed == PointerDeed.Drag)
            Drag(pointer, area);
        else if (_layout.Plot.Holds(pointer.X, pointer.Y))
        {
            if (wheel)
                Zoom(pointer.Deed == PointerDeed.WheelUp ? 0.8 : 1.25, Math.Clamp((pointer.X - area.Left + 0.5) / Math.Max(1, area.Width), 0, 1));
            else if (capture.View is { } view)
                _drag = (pointer.X, pointer.Y, view.Window);
        }
        else if (_layout.List.Holds(pointer.X, pointer.Y))
            PointAtList(pointer, wheel);
        else if (_layout.Panel.Holds(pointer.X, pointer.Y) || _layout.Reason.Holds(pointer.X, pointer.Y))
            PointAtPanel(pointer, wheel);
        else if (_layout.Tabs.Holds(pointer.X, pointer.Y) && !wheel)
            foreach ((Panel panel, string label, int start) in Tabs(_layout.Tabs.Width, capture))
                if (pointer.X >= start && pointer.X < start + label.Length + 2)
                    _panel = panel;
    }

    private void PointAtList(PointerMove pointer, bool wheel)
    {
        if (wheel)
            _bench.Select(Math.Clamp(_bench.SelectedIndex + (pointer.Deed == PointerDeed.WheelUp ? -1 : 1), 0, _bench.Captures.Count - 1));
        else if (CaptureListPainter.IndexAt(_layout.List, pointer.Y, _bench.Captures.Count, _list) is >= 0 and int index)
            _bench.Select(index);
    }

    private void PointAtPanel(PointerMove pointer, bool wheel)
    {
        if (wheel)
            Line(pointer.Deed == PointerDeed.WheelUp ? -1 : 1);
        else if (_panel == Panel.Readings && _layout.Panel.Holds(pointer.X, pointer.Y))
            Line(_readings.First + pointer.Y - _layout.Panel.Top - _readings.Selected);
    }

    private void Drag(PointerMove pointer, Box area)
    {
        if (_drag is not { } drag || _bench.Selected?.View is not { } view)
            return;
        PlotWindow moved = drag.Window.Along((drag.X - pointer.X) / (double)Math.Max(1, area.Width), view.Source);
        view.Window = moved.Up((pointer.Y - drag.Y) / (double)Math.Max(1, area.Height), view.Source);
    }
}
