using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Plots;
using ScopeReader.Bench.Work;

namespace ScopeReader.Bench.Pages;

/// <summary>The main page: the open captures, the plot, and below it what was measured.</summary>
internal sealed partial class WorkPage : Page
{
    private readonly Workbench _bench;
    private readonly IBenchHost _host;
    private readonly PlotPainter _plot = new();
    private readonly Scroll _list = new(), _readings = new(), _findings = new(), _notMeasured = new();
    private readonly PageAction[] _actions;
    private WorkLayout _layout = WorkLayout.For(80, 24, 0);
    private Panel _panel;

    /// <param name="bench">What lies on the bench.</param>
    /// <param name="host">Where other pages are shown.</param>
    public WorkPage(Workbench bench, IBenchHost host)
    {
        (_bench, _host) = (bench, host);
        _actions = MakeActions();
    }

    /// <inheritdoc/>
    public override IReadOnlyList<PageAction> Actions => _actions;

    /// <inheritdoc/>
    public override string About =>
        "The plot shows one channel of one capture; the table below it what was measured there. Every value stands with its expanded uncertainty: the true value " +
        "lies inside that interval in 95 of 100 cases. \"As indicated\" means that a term of the measuring chain is not stated in the plan, so that the interval leaves it out. " +
        "Limits come from the plan: pass and FAIL are said only where the uncertainty allows it, else undecided. Dotted lines are the state levels, their middle, and limits.";

    private Scroll Lines => _panel switch { Panel.Readings => _readings, Panel.Findings => _findings, _ => _notMeasured };

    private IReadOnlyList<ReadingRow> Rows => ReadingRow.Of(_bench.Selected?.ChannelMeasured);

    private int LineCount => _panel switch
    {
        Panel.Readings => Rows.Count,
        Panel.Findings => Notes.Findings(_bench.Selected).Count,
        _ => Notes.NotMeasured(_bench.Selected).Count,
    };

    /// <inheritdoc/>
    public override void Paint(CellGrid grid)
    {
        if (grid.Width < WorkLayout.LeastWidth || grid.Height < WorkLayout.LeastHeight)
        {
            grid.Text(0, 0, $"{WorkLayout.LeastWidth}×{WorkLayout.LeastHeight} cells or more, please; q quits", Ink.Plain);
            return;
        }
        _layout = WorkLayout.For(grid.Width, grid.Height, _bench.Captures.Count);
        PaintHeader(grid);
        CaptureListPainter.Paint(grid, _layout.List, _bench, _list);
        if (_bench.Selected is not { } capture)
            PaintWelcome(grid);
        else
        {
            PaintAbout(grid, capture);
            PaintPlot(grid, capture);
            PaintTabs(grid, capture);
            PaintPanel(grid, capture);
        }
        PaintKeys(grid, _layout.Keys);
    }

    private void PaintHeader(CellGrid grid)
    {
        int x = grid.Text(1, 0, "ScopeReader", Ink.Accent);
        string plan = _bench.PlanPath is { } path ? "plan " + Path.GetFileName(path) : "no plan";
        int room = grid.Width - x - 3 - (grid.Width >= 60 ? ScreenText.Width(plan) + 2 : 0);
        if (_bench.Plan.Subject is { Length: > 0 } subject)
            grid.Text(x + 2, 0, subject, Ink.Strong, room);
        if (grid.Width >= 60)
            grid.TextEnding(grid.Width - 1, 0, plan, Ink.Quiet, grid.Width / 2);
    }

    private void PaintAbout(CellGrid grid, OpenCapture capture)
    {
        Box box = _layout.About;
        (string word, Ink ink) = Words.Of(capture);
        grid.TextEnding(box.Right - 1, box.Top, word, ink);
        int end = box.Right - word.Length - 3;
        string name = _layout.List.Width == 0 && _bench.Captures.Count > 1 ? $"{_bench.SelectedIndex + 1}/{_bench.Captures.Count} {capture.Name}" : capture.Name;
        int x = grid.Text(box.Left + 1, box.Top, name, Ink.Strong, end - box.Left - 1) + 2;
        if (capture.View is not { } view)
            return;
        string channel = view.Channel.Segment > 1 ? $"{view.Channel.Name} segment {view.Channel.Segment}" : view.Channel.Name;
        string of = capture.ChannelCount > 1 ? $" ({capture.ChannelIndex + 1} of {capture.ChannelCount})" : "";
        x = grid.Text(x, box.Top, channel + of, Ink.Quiet, end - x) + 2;
        // Half a number would be a wrong one: the longest that fits whole, or none.
        grid.Text(x, box.Top, Extents(view).FirstOrDefault(e => e.Length <= end - x) ?? "", Ink.Quiet);
    }

    private static string[] Extents(ChannelView view)
    {
        string count = Words.Count(view.Channel.Count);
        if (view.Channel is not Captures.Waveform waveform)
            return [$"{count} points"];
        string interval = Words.Number(waveform.Interval, waveform.Axis.TimeUnit);
        return [$"{count} samples, {interval} apart", $"{count} × {interval}", $"{count} samples"];
    }

    private void PaintPlot(CellGrid grid, OpenCapture capture)
    {
        Box box = _layout.Plot;
        if (capture.View is { } view)
        {
            _plot.Paint(grid, box, view.Source, view.Window, view.Marks);
            return;
        }
        int y = box.Top + 1;
        if (capture.Problem is { } problem)
            foreach (string line in ScreenText.Wrap(problem, box.Width - 2))
            {
                if (y < box.Bottom)
                    grid.Text(box.Left + 1, y++, line, Ink.Fail);
            }
        else
            grid.Text(box.Left + 1, y, capture.Stage == CaptureStage.Waiting ? "waiting for the captures before it" : "reading …", Ink.Quiet);
    }

    private void PaintTabs(CellGrid grid, OpenCapture capture)
    {
        int y = _layout.Tabs.Top;
        for (int i = 0; i < grid.Width; i++)
            grid.Put(i, y, i == _layout.List.Right && _layout.List.Width > 0 ? '┴' : '─', Ink.Quiet);
        int x = 1;
        foreach ((Panel panel, string label, int start) in Tabs(grid.Width, capture))
            x = grid.Text(start, y, $" {label} ", panel == _panel ? Ink.Strong : Ink.Quiet);
        int cautions = capture.Measurement?.Cautions.Count ?? 0;
        if (cautions > 0)
            grid.TextEnding(grid.Width - 1, y, cautions == 1 ? " 1 caution: press 2 " : $" {cautions} cautions: press 2 ", Ink.Undecided, grid.Width - 1 - x);
    }

    private static IEnumerable<(Panel Panel, string Label, int Start)> Tabs(int width, OpenCapture capture)
    {
        int x = 1;
        foreach ((Panel panel, string name, int count) in new[]
        {
            (Panel.Readings, "readings", ReadingRow.Of(capture.ChannelMeasured).Count), (Panel.Findings, "findings", Notes.Findings(capture).Count),
            (Panel.NotMeasured, width >= 60 ? "not measured" : "not", Notes.NotMeasured(capture).Count),
        })
        {
            string label = $"{(int)panel + 1} {name} {count}";
            yield return (panel, label, x);
            x += label.Length + 3;
        }
    }

    private void PaintPanel(CellGrid grid, OpenCapture capture)
    {
        Box whole = _layout.Panel, notes = whole with { Height = whole.Height + _layout.Reason.Height };
        if (capture.Measurement is null)
        {
            grid.Text(2, whole.Top, capture.Stage == CaptureStage.Unreadable ? "nothing was measured" : $"{Words.Of(capture).Word} …", Ink.Quiet);
            return;
        }
        switch (_panel)
        {
            case Panel.Readings:
                IReadOnlyList<ReadingRow> rows = Rows;
                ReadingTablePainter.Paint(grid, whole, rows, _readings);
                PaintReason(grid, rows);
                break;
            case Panel.Findings:
                NotesPainter.Paint(grid, notes, Notes.Findings(capture), _findings, "no findings on this channel");
                break;
            default:
                NotesPainter.Paint(grid, notes, Notes.NotMeasured(capture), _notMeasured, "every quantity that suits this channel was measured");
                break;
        }
    }

    private void PaintReason(CellGrid grid, IReadOnlyList<ReadingRow> rows)
    {
        if (rows.Count == 0)
        {
            grid.Text(2, _layout.Panel.Top, "no readings: press 3 for the reasons", Ink.Quiet);
            return;
        }
        ReadingRow row = rows[_readings.Selected];
        IReadOnlyList<string> lines = ScreenText.Wrap(row.Reason(), _layout.Reason.Width - 2);
        for (int i = 0; i < _layout.Reason.Height && i < lines.Count; i++)
        {
            bool cut = i == _layout.Reason.Height - 1 && lines.Count > _layout.Reason.Height;
            grid.Text(_layout.Reason.Left + 1, _layout.Reason.Top + i, cut ? lines[i] + " …" : lines[i], row.Verdict is null ? Ink.Quiet : Ink.Plain, _layout.Reason.Width - 1);
        }
        if (row.Verdict is { } verdict)
            grid.Text(_layout.Reason.Left + 1, _layout.Reason.Top, Words.Of(verdict.Outcome).Word, Words.Of(verdict.Outcome).Ink);
    }

    private static void PaintWelcome(CellGrid grid)
    {
        int y = 3;
        foreach (string line in new[] { "No capture is open.", "", "o opens one: a CSV file as your instrument saved it.", "Or start with them: scopereader FILE… --plan PLAN", "", "F1 explains this screen." })
            grid.Text(3, y++, line, line.StartsWith("No", StringComparison.Ordinal) ? Ink.Strong : Ink.Plain);
    }
}
