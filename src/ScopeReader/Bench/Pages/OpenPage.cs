using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Work;

namespace ScopeReader.Bench.Pages;

/// <summary>Asks for a path, over the page that it was called from.</summary>
internal sealed class OpenPage : Page
{
    private readonly Workbench _bench;
    private readonly IBenchHost _host;
    private readonly Page _under;
    private readonly PageAction[] _actions;
    private string _path = "", _message = "";
    private int _cursor;

    /// <param name="bench">Where the capture is opened.</param>
    /// <param name="host">Where this page is shown.</param>
    /// <param name="under">What stays visible behind it.</param>
    public OpenPage(Workbench bench, IBenchHost host, Page under)
    {
        (_bench, _host, _under) = (bench, host, under);
        // Most captures lie beside one that is open.
        if (bench.Selected is { } selected && Path.GetDirectoryName(selected.Path) is { Length: > 0 } folder)
            SetPath(folder + Path.DirectorySeparatorChar);
        _actions =
        [
            new("Enter", "open", "open the file", (NamedKey.Enter, Open)),
            new("Tab", "complete", "complete the path; the names that fit are shown below it", (NamedKey.Tab, Complete)),
            new("Esc", "back", "back without opening", (NamedKey.Escape, host.Back)),
            new("F1", "help", "explain this screen", (NamedKey.F1, () => host.Help(this))),
            new("Ctrl-Q", "quit", "quit", (KeyPress.WithCtrl('q'), host.Quit)),
            new("← →", "", "move in the path; Home and End to its ends, Ctrl-U clears it", (NamedKey.Left, () => MoveTo(_cursor - 1)), (NamedKey.Right, () => MoveTo(_cursor + 1)),
                (NamedKey.Home, () => MoveTo(0)), (NamedKey.End, () => MoveTo(_path.Length)), (KeyPress.WithCtrl('u'), () => SetPath(""))),
            new("Bksp Del", "", "take a character away", (NamedKey.Backspace, () => Remove(_cursor - 1)), (NamedKey.Delete, () => Remove(_cursor))),
        ];
    }

    /// <inheritdoc/>
    public override IReadOnlyList<PageAction> Actions => _actions;

    /// <inheritdoc/>
    public override string About => "Type the path of a capture, from the folder that the program was started in or from the root; ~ is your home folder. Tab completes it.";

    /// <inheritdoc/>
    public override void Paint(CellGrid grid)
    {
        _under.Paint(grid);
        int width = Math.Min(grid.Width - 2, 76), left = (grid.Width - width) / 2, height = 6, top = Math.Max(0, (grid.Height - height) / 3);
        var box = new Box(left, top, width, height);
        grid.Clear(box);
        Frame(grid, box);
        grid.Text(left + 2, top, " open a capture ", Ink.Strong, width - 4);
        PaintPath(grid, left + 2, top + 1, width - 4);
        IReadOnlyList<string> lines = ScreenText.Wrap(_message, width - 4);
        for (int i = 0; i < 2 && i < lines.Count; i++)
            grid.Text(left + 2, top + 2 + i, lines[i], Ink.Quiet, width - 4);
        grid.Text(left + 2, top + 4, "Enter opens  Tab completes  Esc goes back", Ink.Quiet, width - 4);
        for (int x = 0; x < grid.Width; x++)
            grid.Put(x, grid.Height - 1, ' ', Ink.Plain);
        PaintKeys(grid, grid.Height - 1);
    }

    /// <inheritdoc/>
    public override bool Press(KeyPress key)
    {
        if (base.Press(key))
            return true;
        if (key.Named != NamedKey.None || key.Ctrl || char.IsControl(key.Character))
            return false;
        _path = _path.Insert(_cursor++, key.Character.ToString());
        _message = "";
        return true;
    }

    private static void Frame(CellGrid grid, Box box)
    {
        for (int x = box.Left; x < box.Right; x++)
        {
            grid.Put(x, box.Top, '─', Ink.Quiet);
            grid.Put(x, box.Bottom - 1, '─', Ink.Quiet);
        }
        for (int y = box.Top; y < box.Bottom; y++)
        {
            grid.Put(box.Left, y, y == box.Top ? '╭' : y == box.Bottom - 1 ? '╰' : '│', Ink.Quiet);
            grid.Put(box.Right - 1, y, y == box.Top ? '╮' : y == box.Bottom - 1 ? '╯' : '│', Ink.Quiet);
        }
    }

    // The cursor is a drawn mark: the terminal's own stays hidden, as everywhere on the bench.
    private void PaintPath(CellGrid grid, int x, int y, int width)
    {
        string before = ScreenText.CutStart(ScreenText.Clean(_path[.._cursor]), width - 2);
        x = grid.Text(x, y, before, Ink.Plain);
        grid.Put(x, y, '▏', Ink.Accent);
        grid.Text(x + 1, y, _path[_cursor..], Ink.Plain, width - ScreenText.Width(before) - 1);
    }

    private void SetPath(string path) => (_path, _cursor, _message) = (path, path.Length, "");

    private void MoveTo(int cursor) => _cursor = Math.Clamp(cursor, 0, _path.Length);

    private void Remove(int index)
    {
        if (index < 0 || index >= _path.Length)
            return;
        _path = _path.Remove(index, 1);
        (_cursor, _message) = (index, "");
    }

    private void Open()
    {
        string path = FromHome(_path.Trim());
        if (path.Length == 0)
            _message = "a path, please";
        else if (Directory.Exists(path))
            _message = "that is a folder: a file, please";
        else if (!File.Exists(path))
            _message = "no such file";
        else
        {
            _host.Back();
            _bench.Open(path);
        }
    }

    private void Complete()
    {
        (string full, IReadOnlyList<string> fits) = PathCompletion.Of(FromHome(_path));
        if (fits.Count == 0)
        {
            _message = "nothing there begins like that";
            return;
        }
        SetPath(full);
        _message = fits.Count == 1 ? "" : string.Join("  ", fits);
    }

    private static string FromHome(string path) => path.StartsWith("~/", StringComparison.Ordinal)
        ? Path.Combine(Environment.GetFolderPath(Environment.SpecialFolder.UserProfile), path[2..]) : path;
}
