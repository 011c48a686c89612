using ScopeReader.Files.Axes;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Structure;

namespace ScopeReader.Files.Rows;

/// <summary>A block of numbers that was read.</summary>
internal sealed class Table(TableShape shape, Header header, Facts facts, ColumnRole[] roles, long startLine)
{
    /// <summary>How its rows are built.</summary>
    public TableShape Shape { get; } = shape;

    /// <summary>What stands right above it.</summary>
    public Header Header { get; } = header;

    /// <summary>What the text round it says.</summary>
    public Facts Facts { get; } = facts;

    /// <summary>What each column is for.</summary>
    public ColumnRole[] Roles { get; } = roles;

    /// <summary>Number of the line that its preamble begins in.</summary>
    public long StartLine { get; } = startLine;

    /// <summary>Number of its first line of data.</summary>
    public long FirstLine => StartLine + Shape.First;

    /// <summary>The numbers, a column each.</summary>
    public SampleColumn[] Columns { get; } = [.. shape.Columns.Select(_ => new SampleColumn())];

    /// <summary>The spacing of each column, for those that may be an axis.</summary>
    public SpacingFit[] Spacings { get; } = [.. shape.Columns.Select(_ => new SpacingFit())];

    /// <summary>How many rows there are.</summary>
    public int Rows => Columns[0].Count;

    /// <summary>Rows that a blank line stands before.</summary>
    public List<int> Breaks { get; } = [];

    /// <summary>True where the last line of the file broke off.</summary>
    public bool IsCut { get; set; }

    /// <summary>True where a column is an axis.</summary>
    public bool IsAxis(int column) => Roles[column] is ColumnRole.Time or ColumnRole.Frequency;
}
