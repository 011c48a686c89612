using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Pages;
using ScopeReader.Bench.Work;

namespace ScopeReader.Tests.Bench.Pages;

public class PagesTests
{
    [Theory]
    [InlineData(80, 24)]
    [InlineData(120, 40)]
    [InlineData(40, 12)]
    public void Main_page(int width, int height)
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
            Approved.Check($"main-{width}x{height}", Painted(pages, width, height));
    }

    [Fact]
    public void Findings_lead_with_the_cautions()
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        {
            pages.Press('2');
            Approved.Check("findings-80x24", Painted(pages, 80, 24));
        }
    }

    [Fact]
    public void Everything_behind_a_verdict()
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        {
            pages.Press(NamedKey.Down);
            pages.Press(NamedKey.Enter);
            Approved.Check("detail-80x24", Painted(pages, 80, 24));
        }
    }

    [Fact]
    public void Help_names_every_key()
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        {
            Page main = pages.Top;
            pages.Press(NamedKey.F1);
            string help = Painted(pages, 100, 60);
            Assert.All(main.Actions, action => Assert.Contains(action.Explains.Split(';')[0].Split(' ')[0], help));
            Approved.Check("help-80x24", Painted(pages, 80, 24));
        }
    }

    [Fact]
    public void Asking_for_a_path()
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        {
            pages.Press('o');
            foreach (char c in "none")
                pages.Press(c);
            pages.Press(NamedKey.Enter);
            string picture = Painted(pages, 80, 24);
            Assert.Contains("captures/none▏", picture);
            Assert.Contains("no such file", picture);
        }
    }

    [Fact]
    public void An_unreadable_file_says_why_in_its_place()
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        {
            bench.Select(3);
            Approved.Check("unreadable-80x24", Painted(pages, 80, 24));
        }
    }

    [Fact]
    public void Without_a_capture_the_screen_says_how_to_open_one()
    {
        (PageStack pages, Workbench bench) = Made.Bench();
        using (bench)
            Assert.Contains("o opens one", Painted(pages, 80, 24));
    }

    [Fact]
    public void Files_cannot_speak_to_the_terminal()
    {
        (PageStack pages, Workbench bench) = Made.Bench("evil\e]0;x\a\e[2J.csv");
        using (bench)
        {
            Made.Bring(bench.Captures[0], Made.Ringing(100, "CH\e[31m1\u202E測定"));
            foreach (KeyPress key in new KeyPress[] { NamedKey.Home, '2', '3', '1', NamedKey.Enter })
            {
                pages.Press(key);
                Assert.DoesNotContain(Painted(pages, 80, 24), c => c != '\n' && (char.IsControl(c) || c == '\u202E'));
            }
        }
    }

    [Fact]
    public void Every_key_in_any_order_at_any_size_leaves_a_screen_of_that_size()
    {
        var random = new Random(1729); // fixed, so a failure repeats
        (int, int)[] sizes = [(80, 24), (120, 40), (40, 12), (30, 10), (200, 60), (5, 2), (1, 1)];
        foreach (Func<(PageStack, Workbench)> make in new Func<(PageStack, Workbench)>[] { Made.FullBench, () => Made.Bench(), () => Made.Bench([.. Enumerable.Range(0, 50).Select(i => $"{i}.csv")]) })
        {
            (PageStack pages, Workbench bench) = make();
            using (bench)
                for (int i = 0; i < 2000; i++)
                {
                    (int width, int height) = sizes[random.Next(sizes.Length)];
                    string[] rows = Painted(pages, width, height).Split('\n');
                    Assert.Equal(height, rows.Length - 1);
                    Assert.All(rows, row => Assert.InRange(ScreenText.Width(row), 0, width));
                    if (random.Next(4) == 0)
                        pages.Point(new PointerMove((PointerDeed)random.Next(5), random.Next(width), random.Next(height)));
                    else
                        pages.Press(random.Next(2) == 0 ? AnyOwn(pages, random) : Any(random));
                }
        }
    }

    [Fact]
    public void Zooming_moving_and_whole_change_what_is_shown()
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        {
            ChannelView view = bench.Selected!.View!;
            ScopeReader.Bench.Plots.PlotWindow whole = view.Window;
            pages.Press('+');
            // Half as wide about the same middle.
            Assert.Equal((whole.Right - whole.Left) / 2, view.Window.Right - view.Window.Left, 1e-12);
            double left = view.Window.Left;
            pages.Press(NamedKey.Right);
            Assert.Equal(left + (whole.Right - whole.Left) / 16, view.Window.Left, 1e-12);
            pages.Press('0');
            Assert.Equal(whole, view.Window);
        }
    }

    [Fact]
    public void The_next_edge_comes_to_the_middle()
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        {
            ChannelView view = bench.Selected!.View!;
            double before = (view.Window.Left + view.Window.Right) / 2;
            pages.Press('e');
            double first = (view.Window.Left + view.Window.Right) / 2;
            pages.Press('e');
            double second = (view.Window.Left + view.Window.Right) / 2;
            // Half a period of 455 kHz apart, within the sample interval of 10 ns.
            Assert.Equal(1 / 455e3 / 2, second - first, 10e-9);
            Assert.True(first > before);
            pages.Press('E');
            Assert.Equal(first, (view.Window.Left + view.Window.Right) / 2, 1e-12);
        }
    }

    [Fact]
    public void Tab_and_c_go_through_captures_and_channels()
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        {
            pages.Press('c');
            Assert.Equal("CH2", bench.Selected!.View!.Channel.Name);
            pages.Press(KeyPress.WithShift(NamedKey.Tab));
            Assert.Equal("letter.csv", bench.Selected!.Name);
            pages.Press(NamedKey.Tab);
            Assert.Equal("ringing.csv", bench.Selected!.Name);
        }
    }

    [Fact]
    public void Quit_and_interrupt_reach_the_program_from_every_page()
    {
        (PageStack pages, Workbench bench) = Made.FullBench();
        using (bench)
        {
            int quits = 0, interrupts = 0;
            pages.QuitAsked += () => quits++;
            pages.InterruptAsked += () => interrupts++;
            foreach (KeyPress key in new KeyPress[] { NamedKey.Escape, NamedKey.F1, NamedKey.Escape, NamedKey.Enter, NamedKey.Escape, 'o' })
            {
                pages.Press(key);
                pages.Press(KeyPress.WithCtrl('q'));
                pages.Press(KeyPress.WithCtrl('c'));
            }
            Assert.Equal((6, 6), (quits, interrupts));
        }
    }

    private static KeyPress AnyOwn(PageStack pages, Random random)
    {
        (KeyPress Key, Action Do)[] keys = [.. pages.Top.Actions.SelectMany(a => a.Presses)];
        return keys[random.Next(keys.Length)].Key;
    }

    private static KeyPress Any(Random random) => random.Next(3) switch
    {
        0 => (KeyPress)(char)random.Next(' ', 0x3000),
        1 => (KeyPress)(NamedKey)random.Next(1, Enum.GetValues<NamedKey>().Length),
        _ => KeyPress.WithShift((NamedKey)random.Next(1, Enum.GetValues<NamedKey>().Length)),
    };

    internal static string Painted(PageStack pages, int width, int height)
    {
        var grid = new CellGrid();
        pages.Paint(grid, width, height);
        return grid.ToString();
    }
}
