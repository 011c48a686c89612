using ScopeReader.Bench.Drawing;

namespace ScopeReader.Bench.Pages;

/// <summary>Explains a page from its own table of actions.</summary>
internal static class HelpPage
{
    /// <summary>The help of a page.</summary>
    public static Page Of(Page page, IBenchHost host)
    {
        var lines = new List<TextLine> { new(page.About), new("") };
        lines.AddRange(page.Actions.Select(a => new TextLine(a.Explains, Ink.Plain, a.Shown)));
        lines.Add(new(""));
        lines.Add(new("A reading is no safety clearance, and a verdict no certificate: local codes and licensed practice come first.", Ink.Quiet));
        return new TextPage("This screen, explained", "How to read a text on the bench.", lines, host.Back,
            new PageAction("q", "quit", "quit; Ctrl-Q does too", ('q', host.Quit), (KeyPress.WithCtrl('q'), host.Quit)));
    }
}
