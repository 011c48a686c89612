using ScopeReader.Bench.Drawing;

namespace ScopeReader.Bench.Pages;

/// <summary>A note: what was found, what could not be measured, a doubt or a caution.</summary>
/// <param name="Heading">What it is about.</param>
/// <param name="Text">The sentence.</param>
/// <param name="Ink">The heading's ink.</param>
internal sealed record Note(string Heading, string Text, Ink Ink);

/// <summary>Paints notes, wrapped, scrolled by lines so that the selected one is at the top.</summary>
internal static class NotesPainter
{
    /// <summary>Paints.</summary>
    public static void Paint(CellGrid grid, Box box, IReadOnlyList<Note> notes, Scroll scroll, string none)
    {
        scroll.Fit(notes.Count, notes.Count);
        if (notes.Count == 0)
        {
            grid.Text(box.Left + 2, box.Top, none, Ink.Quiet, box.Width - 3);
            return;
        }
        int indent = box.Width >= 60 ? 24 : 2, y = box.Top;
        for (int i = FirstShown(notes, box, indent, scroll.Selected); i < notes.Count && y < box.Bottom; i++)
        {
            bool selected = i == scroll.Selected;
            grid.Text(box.Left, y, selected ? "▸" : " ", Ink.Accent);
            grid.Text(box.Left + 2, y, notes[i].Heading, notes[i].Ink, box.Width >= 60 ? indent - 3 : box.Width - 3);
            if (indent == 2)
                y++;
            foreach (string line in Lines(notes[i], box, indent))
                if (y < box.Bottom)
                    grid.Text(box.Left + indent, y++, line, selected ? Ink.Plain : Ink.Quiet);
        }
    }

    // As many notes before the selected one as leave all of it on the screen.
    private static int FirstShown(IReadOnlyList<Note> notes, Box box, int indent, int selected)
    {
        int first = selected, rows = Rows(notes[selected], box, indent);
        while (first > 0 && rows + Rows(notes[first - 1], box, indent) <= box.Height)
            rows += Rows(notes[--first], box, indent);
        return first;
    }

    private static int Rows(Note note, Box box, int indent) => Lines(note, box, indent).Count + (indent == 2 ? 1 : 0);

    private static IReadOnlyList<string> Lines(Note note, Box box, int indent) => ScreenText.Wrap(note.Text, box.Width - indent - 1);
}
