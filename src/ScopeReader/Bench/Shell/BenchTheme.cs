using ScopeReader.Bench.Drawing;
using Terminal.Gui.Drawing;
using Attribute = Terminal.Gui.Drawing.Attribute;

namespace ScopeReader.Bench.Shell;

/// <summary>How each ink looks. The background is always the terminal's own.</summary>
/// <remarks>
/// The samples have the terminal's own foreground, and one blue accent marks what the program adds. Hues are of middle
/// lightness, so that they read on light and on dark; verdicts differ in their words first.
/// </remarks>
internal sealed class BenchTheme
{
    private readonly Attribute[] _attributes;

    private BenchTheme(params ReadOnlySpan<(Ink Ink, Color Colour, TextStyle Style)> inks)
    {
        _attributes = new Attribute[Enum.GetValues<Ink>().Length];
        Array.Fill(_attributes, new Attribute(Color.None, Color.None));
        foreach ((Ink ink, Color colour, TextStyle style) in inks)
            _attributes[(int)ink] = new Attribute(colour, Color.None, style);
    }

    /// <summary>With colour.</summary>
    public static BenchTheme Colour { get; } = new(
        (Ink.Quiet, new Color(128, 132, 138), TextStyle.None),
        (Ink.Strong, Color.None, TextStyle.Bold),
        (Ink.Accent, new Color(74, 134, 200), TextStyle.None),
        (Ink.Bound, new Color(186, 104, 72), TextStyle.None),
        (Ink.Pass, new Color(46, 145, 110), TextStyle.None),
        (Ink.Fail, new Color(208, 72, 60), TextStyle.Bold),
        (Ink.Undecided, new Color(176, 125, 30), TextStyle.None));

    /// <summary>Without any colour: weight alone.</summary>
    public static BenchTheme Mono { get; } = new(
        (Ink.Quiet, Color.None, TextStyle.Faint),
        (Ink.Strong, Color.None, TextStyle.Bold),
        (Ink.Accent, Color.None, TextStyle.None),
        (Ink.Bound, Color.None, TextStyle.Faint),
        (Ink.Fail, Color.None, TextStyle.Bold));

    /// <summary>How an ink looks.</summary>
    public Attribute Of(Ink ink) => _attributes[(int)ink];
}
