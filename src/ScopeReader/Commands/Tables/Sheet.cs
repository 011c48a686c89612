using System.Text;
using Spectre.Console;

namespace ScopeReader.Commands.Tables;

/// <summary>Sections of text and columns, laid out to a width; without borders, so that they read the same on paper.</summary>
internal sealed class Sheet
{
    // Stands for a space at which no line breaks, until the lines are made. Text from files never has it: it is private use.
    internal const char Joint = '\uE000';

    private const int Gap = 2, NarrowestColumn = 8;

    private readonly StringBuilder _text = new();
    private readonly IAnsiConsole _console;
    private readonly bool _colour;

    /// <param name="width">Columns of a line.</param>
    /// <param name="colour">Whether it shows colours.</param>
    public Sheet(int width, bool colour)
    {
        Width = Math.Max(width, 20);
        _colour = colour;
        _console = AnsiConsole.Create(new AnsiConsoleSettings
        {
            Ansi = colour ? AnsiSupport.Yes : AnsiSupport.No,
            ColorSystem = colour ? ColorSystemSupport.Standard : ColorSystemSupport.NoColors,
            Interactive = InteractionSupport.No,
            Out = new AnsiConsoleOutput(new StringWriter(_text) { NewLine = "\n" }),
        });
        _console.Profile.Width = Width;
        _console.Profile.Capabilities.Unicode = true;
    }

    /// <summary>Columns of a line.</summary>
    public int Width { get; }

    /// <summary>The text as one word to the wrapping: a number stays with its unit.</summary>
    public static string Joined(string text) => text.Replace(' ', Joint);

    /// <summary>A line of its own, bold where there is colour.</summary>
    public void Heading(string text)
    {
        if (_text.Length > 0)
            _console.WriteLine();
        _console.Write(new Paragraph(text, new Style(decoration: Decoration.Bold)));
        _console.WriteLine();
    }

    /// <summary>A line or more of plain text.</summary>
    public void Line(string text, Style? style = null)
    {
        _console.Write(new Paragraph(text, style ?? Style.Plain));
        _console.WriteLine();
    }

    /// <summary>A line that is not wrapped, for commands to copy.</summary>
    public void AsItIs(string text) => _text.Append(text).Append('\n');

    /// <summary>Text with a margin, wrapped inside it.</summary>
    public void Indented(string text, int margin = 2) => _console.Write(new Padder(new Paragraph(text), new Padding(margin, 0, 0, 0)));

    /// <summary>Rows of cells in columns; the last column wraps, the others never do. Where the width leaves it no room, a row
    /// is a line of its cells, wrapped.</summary>
    public void Columns(IReadOnlyList<string[]> rows, Func<int, Style>? firstColumn = null)
    {
        if (rows.Count == 0)
            return;
        int first = Enumerable.Range(0, rows[0].Length - 1).Sum(i => rows.Max(r => new Paragraph(r[i]).Length) + Gap), last = rows.Max(r => new Paragraph(r[^1]).Length);
        if (Width - first < Math.Min(last, NarrowestColumn))
        {
            for (int r = 0; r < rows.Count; r++)
                Line(string.Join(new string(' ', Gap), rows[r].Where(cell => cell.Length > 0)), firstColumn?.Invoke(r));
            return;
        }
        var table = new Table { Border = TableBorder.None, ShowHeaders = false };
        int count = rows[0].Length;
        for (int i = 0; i < count; i++)
            table.AddColumn(new TableColumn("") { NoWrap = i < count - 1, Padding = new Padding(0, 0, i < count - 1 ? Gap : 0, 0) });
        for (int r = 0; r < rows.Count; r++)
            table.AddRow(rows[r].Select((cell, i) => new Paragraph(cell, i == 0 && firstColumn is not null ? firstColumn(r) : Style.Plain)));
        _console.Write(table);
    }

    /// <summary>Everything so far; without colour, no line ends in spaces.</summary>
    public override string ToString()
    {
        string text = _text.ToString().Replace(Joint, ' ');
        return _colour ? text : string.Join('\n', text.Split('\n').Select(line => line.TrimEnd()));
    }
}
