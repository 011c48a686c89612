using ScopeReader.Files.Axes;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Structure;

namespace ScopeReader.Files.Rows;

/// <summary>A block of numbers that was read.</summary>
internal sealed class Table(TableShape shape, Header header, ColumnRole[] roles, long firstLine)
{
    /// <summary>How its rows are built.</summary>
    public TableShape Shape { get; } = shape;

    /// <summary>What stands above it.</summary>
    public Header Header { get; } = header;

    /// <summary>What each column is for.</summary>
    public ColumnRole[] Roles { get; } = roles;

    /// <summary>Number of its first line in the file.</summary>
    public long FirstLine { get; } = firstLine;

    /// <summary>The numbers, a column each.</summary>
    public SampleColumn[] Columns { get; } = [.. shape.Columns.Select(_ => new SampleColumn())];

    /// <summary>The spacing of each column, for those that may be an axis.</summary>
    public SpacingFit[] Spacings { get; } = [.. shape.Columns.Select(_ => new SpacingFit())];

    /// <summary>True where the last line of the file broke off.</summary>
    public bool IsCut { get; set; }
}
