using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Work;
using ScopeReader.Readings;

namespace ScopeReader.Bench.Pages;

/// <summary>Paints readings with their uncertainty, and beside each what the limit says.</summary>
internal static class ReadingTablePainter
{
    private const int VerdictWidth = 11;

    /// <summary>Paints.</summary>
    public static void Paint(CellGrid grid, Box box, IReadOnlyList<ReadingRow> rows, Scroll scroll)
    {
        scroll.Fit(rows.Count, box.Height);
        for (int i = 0; i < box.Height && scroll.First + i < rows.Count; i++)
        {
            bool selected = scroll.First + i == scroll.Selected;
            grid.Text(box.Left, box.Top + i, selected ? "▸" : " ", Ink.Accent);
            if (box.Width >= 70)
                PaintWide(grid, box, box.Top + i, rows[scroll.First + i], selected);
            else
                PaintNarrow(grid, box, box.Top + i, rows[scroll.First + i], selected);
        }
        PaintPosition(grid, box, rows.Count, scroll);
    }

    // quantity 21 | value right-aligned 11 | ± uncertainty 13 | unit 5 | verdict | limit | method
    private static void PaintWide(CellGrid grid, Box box, int y, ReadingRow row, bool selected)
    {
        int x = box.Left + 2;
        grid.Text(x, y, row.Quantity.Id, selected ? Ink.Strong : Ink.Plain, 21);
        x += 21;
        if (row.Reading is { } reading)
        {
            (string value, string uncertainty, string unit) = Engineering.Parts(reading.Value, reading.Budget.ExpandedUncertainty, reading.Unit);
            grid.TextEnding(x + 11, y, Words.Minus(value), selected ? Ink.Strong : Ink.Plain, 11);
            if (uncertainty.Length > 0)
                grid.Text(x + 12, y, "± " + uncertainty, Ink.Plain, 13);
            grid.Text(x + 26, y, unit, Ink.Quiet, 5);
        }
        else
            grid.TextEnding(x + 11, y, "—", Ink.Quiet);
        x += 32;
        int right = box.Right - 2;
        if (row.Verdict is { } verdict)
        {
            (string word, Ink ink) = Words.Of(verdict.Outcome);
            grid.Text(x, y, word, ink, VerdictWidth - 1);
            int end = grid.Text(x + VerdictWidth, y, Words.Of(verdict.Limit), Ink.Quiet, right - x - VerdictWidth);
            x = Math.Max(end + 2, x + VerdictWidth + 20);
        }
        else
            x += box.Width >= 100 ? VerdictWidth + 20 : 0;
        if (row.Reading is { } read && (row.Verdict is null || box.Width >= 100))
            grid.Text(x, y, How(read, box.Width >= 100), Ink.Quiet, right - x);
    }

    // quantity | value ± uncertainty unit, and the verdict's word where a limit was set: the quantity gives way.
    private static void PaintNarrow(CellGrid grid, Box box, int y, ReadingRow row, bool selected)
    {
        int right = box.Right - 1, x = box.Left + 1;
        if (row.Verdict is { } verdict)
        {
            (string word, Ink ink) = Words.Of(verdict.Outcome);
            grid.TextEnding(right, y, word, ink);
            right -= word.Length + 1;
        }
        string text = row.Reading is { } reading ? Short(reading) : "—";
        int width = Math.Min(ScreenText.Width(text), right - x - 8);
        grid.TextEnding(right, y, text, selected ? Ink.Strong : Ink.Plain, width);
        grid.Text(x + 1, y, row.Quantity.Id, selected ? Ink.Strong : Ink.Plain, right - width - x - 2);
    }

    private static string Short(Reading reading)
    {
        (string value, string uncertainty, string unit) = Engineering.Parts(reading.Value, reading.Budget.ExpandedUncertainty, reading.Unit);
        return Words.Minus(value) + (uncertainty.Length > 0 ? "±" + uncertainty : "") + (unit is "" or "1" ? "" : " " + unit);
    }

    private static string How(Reading reading, bool method)
    {
        string indicated = reading.Budget.Missing.Count > 0 ? "as indicated" : "";
        string other = method || !reading.IsPrimary ? (reading.IsPrimary ? "" : "also by ") + reading.Method : "";
        return indicated.Length > 0 && other.Length > 0 ? $"{indicated}, {other}" : indicated + other;
    }

    private static void PaintPosition(CellGrid grid, Box box, int count, Scroll scroll)
    {
        if (scroll.First > 0)
            grid.Put(box.Right - 1, box.Top, '↑', Ink.Quiet);
        if (scroll.First + box.Height < count)
            grid.Put(box.Right - 1, box.Bottom - 1, '↓', Ink.Quiet);
    }
}
