using ScopeReader.Files.Meaning;
using ScopeReader.Files.Structure;

namespace ScopeReader.Files.Rows;

/// <summary>A block of numbers that was read.</summary>
internal sealed class Table
{
    /// <summary>The most rows that are held: what an array of doubles takes, and a little less.</summary>
    public const int MostRows = 2_000_000_000;

    /// <param name="shape">How its rows are built.</param>
    /// <param name="header">What stands right above it.</param>
    /// <param name="facts">What the text round it says.</param>
    /// <param name="roles">What each column is for.</param>
    /// <param name="startLine">Number of the line that its preamble begins in.</param>
    /// <param name="expectedRows">How many rows there may be.</param>
    public Table(TableShape shape, Header header, Facts facts, ColumnRole[] roles, long startLine, int expectedRows)
    {
        (Shape, Header, Facts, Roles, StartLine) = (shape, header, facts, roles, startLine);
        Samples = Array.ConvertAll(roles, r => r == ColumnRole.Value ? new SampleColumn(expectedRows) : null);
        Axes = Array.ConvertAll(roles, r => r is ColumnRole.Time or ColumnRole.Frequency ? new AxisColumn(r == ColumnRole.Frequency) : null);
    }

    /// <summary>How its rows are built.</summary>
    public TableShape Shape { get; }

    /// <summary>What stands right above it.</summary>
    public Header Header { get; }

    /// <summary>What the text round it says.</summary>
    public Facts Facts { get; }

    /// <summary>What each column is for.</summary>
    public ColumnRole[] Roles { get; }

    /// <summary>Number of the line that its preamble begins in.</summary>
    public long StartLine { get; }

    /// <summary>Number of its first line of data.</summary>
    public long FirstLine => StartLine + Shape.First;

    /// <summary>The samples of each column that holds some.</summary>
    public SampleColumn?[] Samples { get; }

    /// <summary>The values of each column that is an axis.</summary>
    public AxisColumn?[] Axes { get; }

    /// <summary>How many rows there are.</summary>
    public int Rows { get; set; }

    /// <summary>Rows that a blank line stands before.</summary>
    public List<int> Breaks { get; } = [];

    /// <summary>True where the last line of the file broke off.</summary>
    public bool IsCut { get; set; }
}
