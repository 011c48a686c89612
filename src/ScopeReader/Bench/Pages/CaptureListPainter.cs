using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Work;

namespace ScopeReader.Bench.Pages;

/// <summary>Paints the open captures, a word for how each stands.</summary>
internal static class CaptureListPainter
{
    private const int WordWidth = 10;

    /// <summary>Paints.</summary>
    public static void Paint(CellGrid grid, Box box, Workbench bench, Scroll scroll)
    {
        if (box.Width == 0)
            return;
        grid.Text(1, box.Top, $"captures {bench.SelectedIndex + 1}/{bench.Captures.Count}", Ink.Quiet);
        scroll.Move(bench.SelectedIndex - scroll.Selected, bench.Captures.Count);
        scroll.Fit(bench.Captures.Count, box.Height - 1);
        for (int row = 0; row < box.Height - 1 && scroll.First + row < bench.Captures.Count; row++)
        {
            OpenCapture capture = bench.Captures[scroll.First + row];
            bool selected = capture == bench.Selected;
            int y = box.Top + 1 + row;
            (string word, Ink ink) = Words.Of(capture);
            grid.Text(box.Left, y, selected ? "▸" : " ", Ink.Accent);
            int room = box.Width - Math.Max(WordWidth - 1, word.Length) - 4;
            grid.Text(box.Left + 2, y, ScreenText.CutName(capture.Name, room), selected ? Ink.Strong : Ink.Plain, room);
            grid.TextEnding(box.Right - 1, y, word, ink, WordWidth);
        }
        for (int y = box.Top; y < box.Bottom; y++)
            grid.Put(box.Right, y, '│', Ink.Quiet);
    }

    /// <summary>The capture that a row of the list names, or −1.</summary>
    public static int IndexAt(Box box, int y, int count, Scroll scroll)
    {
        int index = scroll.First + y - box.Top - 1;
        return y > box.Top && index < count ? index : -1;
    }
}
