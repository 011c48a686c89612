using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Pages;
using ScopeReader.Bench.Plots;
using ScopeReader.Bench.Shell;
using ScopeReader.Bench.Work;
using ScopeReader.Tests.Bench.Pages;
using Terminal.Gui.Drawing;
using Terminal.Gui.Input;

namespace ScopeReader.Tests.Bench.Shell;

public class BenchWindowTests
{
    [Theory]
    [InlineData(80, 24)]
    [InlineData(120, 40)]
    [InlineData(40, 12)]
    public void The_screen_shows_what_the_page_painted(int width, int height)
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        using (var screen = new Harness(pages, width, height))
            Assert.Equal(PagesTests.Painted(pages, width, height), screen.Text);
    }

    [Fact]
    public void Keys_of_every_kind_reach_the_page()
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        using (var screen = new Harness(pages))
        {
            screen.Press(Key.F1);
            Assert.Contains("This screen, explained", screen.Text);
            screen.Press(Key.Esc, Key.CursorDown, Key.Enter);
            Assert.Contains("definition", screen.Text);
            screen.Press(Key.Esc, Key.Tab);
            Assert.Equal(1, bench.SelectedIndex);
            screen.Press(Key.Tab.WithShift, new Key('c'), new Key('2'));
            Assert.Equal("CH2", bench.Selected!.View!.Channel.Name);
            PlotWindow whole = bench.Selected.View.Window;
            screen.Press(new Key('+'), Key.CursorRight.WithShift, new Key(']'), new Key('?'));
            Assert.NotEqual(whole, bench.Selected.View.Window);
            Assert.Contains("This screen, explained", screen.Text);
        }
    }

    [Fact]
    public void Control_q_and_q_quit_and_control_c_interrupts()
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        using (var screen = new Harness(pages))
        {
            var heard = new List<string>();
            pages.QuitAsked += () => heard.Add("quit");
            pages.InterruptAsked += () => heard.Add("interrupt");
            screen.Press(Key.Q, Key.Q.WithCtrl, Key.C.WithCtrl);
            Assert.Equal(["quit", "quit", "interrupt"], heard);
        }
    }

    [Fact]
    public void The_wheel_zooms_and_a_drag_moves_the_plot()
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        using (var screen = new Harness(pages))
        {
            PlotWindow whole = bench.Selected!.View!.Window;
            screen.Mouse(MouseFlags.WheeledUp, 60, 6);
            PlotWindow near = bench.Selected.View.Window;
            // The page zooms by 0.8 at a notch of the wheel.
            Assert.Equal(0.8 * (whole.Right - whole.Left), near.Right - near.Left, 1e-12);
            screen.Mouse(MouseFlags.LeftButtonPressed, 60, 6).Mouse(MouseFlags.LeftButtonPressed | MouseFlags.PositionReport, 50, 6).Mouse(MouseFlags.LeftButtonReleased, 50, 6);
            Assert.True(bench.Selected.View.Window.Left > near.Left);
            screen.Mouse(MouseFlags.LeftButtonPressed, 4, 4);
            Assert.Equal(2, bench.SelectedIndex);
        }
    }

    [Fact]
    public void Resizing_in_the_middle_of_work_redraws_the_whole_screen()
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        using (var screen = new Harness(pages))
            foreach ((int width, int height) in new[] { (120, 40), (40, 12), (200, 60), (20, 5), (80, 24) })
            {
                screen.Resize(width, height).Press(new Key('+'), Key.CursorDown, Key.Tab);
                Assert.Equal(PagesTests.Painted(pages, width, height), screen.Text);
            }
    }

    [Theory]
    [InlineData("CH1")]
    [InlineData("測定 CH1")]
    public void Drawing_by_cells_equals_the_librarys_own_text_calls(string channel)
    {
        (PageStack pages, Workbench bench) = Made.Bench("a.csv", "測.csv");
        using (bench)
        {
            Made.Bring(bench.Captures[0], Made.Ringing(1000, channel));
            using var cells = new Harness(pages);
            string drawn = cells.Ansi;
            using var text = new Harness(pages, byText: true);
            Assert.Equal(text.Ansi, drawn);
        }
    }

    [Fact]
    public void Without_colour_no_colour_is_asked_for() =>
        Assert.All(Enum.GetValues<Ink>(), ink => Assert.Equal((Color.None, Color.None), (BenchTheme.Mono.Of(ink).Foreground, BenchTheme.Mono.Of(ink).Background)));

    [Fact]
    public void Colours_read_on_light_and_on_dark() =>
        // WCAG 2.1, 1.4.3: a contrast of 3 : 1 is the least for large or bold text; both extremes at once allow at most 4.6 : 1.
        Assert.All(Enum.GetValues<Ink>().Select(i => BenchTheme.Colour.Of(i).Foreground).Where(c => c != Color.None), colour =>
        {
            double own = Luminance(colour);
            Assert.True((own + 0.05) / 0.05 >= 3 && 1.05 / (own + 0.05) >= 3, colour.ToString());
        });

    // Relative luminance, WCAG 2.1 glossary.
    private static double Luminance(Color colour) => 0.2126 * Linear(colour.R) + 0.7152 * Linear(colour.G) + 0.0722 * Linear(colour.B);

    private static double Linear(byte part) => part / 255.0 <= 0.03928 ? part / 255.0 / 12.92 : Math.Pow((part / 255.0 + 0.055) / 1.055, 2.4);
}
