using ScopeReader.Bench.Drawing;

namespace ScopeReader.Tests.Bench.Drawing;

public class ScreenTextTests
{
    [Theory]
    [InlineData("CH1\e[2J", "CH1·[2J")]
    [InlineData("a\tb\nc", "a b c")]
    [InlineData("name\u202Egnp.csv", "name·gnp.csv")]
    [InlineData("e\u0301", "e·")]
    [InlineData("\U0001F600.csv", "·.csv")]
    [InlineData("±1 µV Ω ≤", "±1 µV Ω ≤")]
    public void What_a_terminal_would_obey_is_replaced(string text, string shown) => Assert.Equal(shown, ScreenText.Clean(text));

    [Fact]
    public void Half_of_a_surrogate_pair_is_replaced() => Assert.Equal("half·", ScreenText.Clean("half\uD83D"));

    [Fact]
    public void East_asian_characters_take_two_columns() =>
        // Unicode Standard Annex 11: ideographs and kana are wide, Greek and Cyrillic are not.
        Assert.Equal(4 + 2 + 3, ScreenText.Width("測定" + "あ" + "µЖΩ"));

    [Fact]
    public void Cut_text_never_splits_a_wide_character()
    {
        Assert.Equal("測…", ScreenText.Cut("測定器", 4));
        Assert.Equal("測…", ScreenText.Cut("測定器", 3));
        Assert.Equal("…器", ScreenText.CutStart("測定器", 3));
    }

    [Theory]
    [InlineData("if-source-7.csv", 15, "if-source-7.csv")]
    [InlineData("if-source-7.csv", 11, "if-source-7")]
    [InlineData("node-breadboard.csv", 11, "node-…board")]
    [InlineData("測定器測定器測定器7.csv", 8, "測定…器7")]
    public void A_name_keeps_the_ends_that_tell_it_from_others(string name, int width, string cut)
    {
        Assert.Equal(cut, ScreenText.CutName(name, width));
        Assert.InRange(ScreenText.Width(ScreenText.CutName(name, width)), 1, width);
    }

    [Fact]
    public void Wrapped_lines_keep_every_word_and_the_width()
    {
        const string Text = "one two three averyveryverylongword four";
        IReadOnlyList<string> lines = ScreenText.Wrap(Text, 9);
        Assert.All(lines, line => Assert.InRange(ScreenText.Width(line), 1, 9));
        Assert.Equal(Text.Replace(" ", ""), string.Concat(lines).Replace(" ", ""));
    }

    [Fact]
    public void A_wide_character_is_overwritten_whole()
    {
        var grid = new CellGrid();
        grid.Reset(6, 1);
        grid.Text(0, 0, "測定");
        grid.Put(1, 0, 'x', Ink.Plain);
        Assert.Equal(" x定\n", grid.ToString());
        Assert.Equal(CellGrid.Continuation, grid.Character(3, 0));
    }
}
