using System.Drawing;
using System.Text;
using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Pages;
using ScopeReader.Bench.Shell;
using Terminal.Gui.App;
using Terminal.Gui.Input;
using Terminal.Gui.Testing;
using Terminal.Gui.Time;

namespace ScopeReader.Tests.Bench.Shell;

/// <summary>The window in the library, without a terminal: keys in, text out.</summary>
internal sealed class Harness : IDisposable
{
    private readonly SessionToken? _token;
    private readonly BenchWindow _window;
    private readonly VirtualTimeProvider _time = new();

    public Harness(PageStack pages, int width = 80, int height = 24, bool byText = false)
    {
        LibrarySettings.Apply();
        App = Application.Create(_time).Init(LibrarySettings.Driver);
        App.Driver!.SetScreenSize(width, height);
        _window = new BenchWindow(pages, BenchTheme.Colour) { DrawsByText = byText };
        _token = App.Begin(_window);
        Pump();
    }

    public IApplication App { get; }

    public Harness Press(params ReadOnlySpan<Key> keys)
    {
        foreach (Key key in keys)
        {
            App.InjectKey(key);
            Pump();
        }
        return this;
    }

    public Harness Mouse(MouseFlags flags, int x, int y)
    {
        App.InjectMouse(new Mouse { Flags = flags, ScreenPosition = new Point(x, y), Timestamp = _time.Now });
        return Pump();
    }

    public Harness Resize(int width, int height)
    {
        App.Driver!.SetScreenSize(width, height);
        return Pump();
    }

    // The order of the library's own loop.
    public Harness Pump()
    {
        App.LayoutAndDraw();
        App.TimedEvents!.RunTimers();
        App.LayoutAndDraw();
        return this;
    }

    public string Text
    {
        get
        {
            var text = new StringBuilder();
            Terminal.Gui.Drawing.Cell[,] cells = App.Driver!.Contents!;
            for (int y = 0; y < cells.GetLength(0); y++)
            {
                var row = new StringBuilder();
                for (int x = 0; x < cells.GetLength(1); x++)
                {
                    string grapheme = cells[y, x].Grapheme;
                    row.Append(grapheme);
                    if (ScreenText.WidthOf(grapheme[0]) == 2)
                        x++;
                }
                text.Append(row.ToString().TrimEnd()).Append('\n');
            }
            return text.ToString();
        }
    }

    public string Ansi => App.Driver!.ToAnsi();

    public void Dispose()
    {
        if (_token is { Runnable: not null })
            App.End(_token);
        _window.Dispose();
        App.Dispose();
    }
}
