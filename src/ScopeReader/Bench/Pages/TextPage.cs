using ScopeReader.Bench.Drawing;

namespace ScopeReader.Bench.Pages;

/// <summary>A line of a text page; it is wrapped to the screen.</summary>
/// <param name="Text">The text.</param>
/// <param name="Ink">Its ink.</param>
/// <param name="Term">What the text is about, set before it in a column of its own; null without one.</param>
internal sealed record TextLine(string Text, Ink Ink = Ink.Plain, string? Term = null);

/// <summary>A page to read: a title and lines, scrolled where they are more than fit.</summary>
internal sealed class TextPage : Page
{
    private const int MostTermWidth = 26, WidestText = 100;
    private readonly string _title, _about;
    private readonly IReadOnlyList<TextLine> _lines;
    private readonly PageAction[] _actions;
    private int _scroll, _rows = 1, _last;

    /// <param name="title">What this is.</param>
    /// <param name="about">What the help says about it.</param>
    /// <param name="lines">The text.</param>
    /// <param name="back">Leaves the page.</param>
    /// <param name="more">What else can be done.</param>
    public TextPage(string title, string about, IReadOnlyList<TextLine> lines, Action back, params PageAction[] more)
    {
        (_title, _about, _lines) = (title, about, lines);
        _actions =
        [
            new("Esc", "back", "back to where you came from", (NamedKey.Escape, back), (NamedKey.Enter, back), (NamedKey.Backspace, back)),
            new("↑ ↓", "scroll", "scroll by a line; PgUp and PgDn by a screen, Home and End to the ends",
                (NamedKey.Up, () => Scroll(-1)), (NamedKey.Down, () => Scroll(1)), (NamedKey.PageUp, () => Scroll(-_rows)), (NamedKey.PageDown, () => Scroll(_rows)),
                (NamedKey.Home, () => Scroll(int.MinValue / 2)), (NamedKey.End, () => Scroll(int.MaxValue / 2))),
            .. more,
        ];
    }

    /// <inheritdoc/>
    public override IReadOnlyList<PageAction> Actions => _actions;

    /// <inheritdoc/>
    public override string About => _about;

    /// <inheritdoc/>
    public override void Paint(CellGrid grid)
    {
        grid.Text(1, 0, _title, Ink.Strong);
        List<(TextLine Line, string Term, string Text)> laid = Lay(Math.Min(WidestText, grid.Width - 2), out int indent);
        _rows = Math.Max(1, grid.Height - 3);
        _last = Math.Max(0, laid.Count - _rows);
        _scroll = Math.Clamp(_scroll, 0, _last);
        for (int i = 0; i < _rows && _scroll + i < laid.Count; i++)
        {
            (TextLine line, string term, string text) = laid[_scroll + i];
            grid.Text(1, 2 + i, term, Ink.Accent, Math.Max(0, indent - 1));
            grid.Text(line.Term is null ? 1 : 1 + indent, 2 + i, text, line.Ink);
        }
        if (_last > 0)
            grid.TextEnding(grid.Width - 1, 0, _scroll == 0 ? "more ↓" : _scroll == _last ? "more ↑" : "more ↑ ↓", Ink.Quiet);
        PaintKeys(grid, grid.Height - 1);
    }

    /// <inheritdoc/>
    public override void Point(PointerMove pointer)
    {
        if (pointer.Deed is PointerDeed.WheelUp or PointerDeed.WheelDown)
            Scroll(pointer.Deed == PointerDeed.WheelUp ? -3 : 3);
    }

    private void Scroll(int lines) => _scroll = Math.Clamp(_scroll + lines, 0, _last);

    private List<(TextLine, string, string)> Lay(int width, out int indent)
    {
        int longest = _lines.Where(l => l.Term is not null).Select(l => ScreenText.Width(l.Term!)).DefaultIfEmpty(0).Max();
        indent = Math.Min(Math.Min(longest + 2, MostTermWidth), width / 2);
        var laid = new List<(TextLine, string, string)>();
        foreach (TextLine line in _lines)
        {
            IReadOnlyList<string> texts = ScreenText.Wrap(line.Text, line.Term is null ? width : width - indent);
            for (int i = 0; i < texts.Count; i++)
                laid.Add((line, i == 0 ? line.Term ?? "" : "", texts[i]));
        }
        return laid;
    }
}
