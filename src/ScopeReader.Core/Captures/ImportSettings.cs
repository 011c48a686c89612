namespace ScopeReader.Captures;

/// <summary>How to read a file, where the person says so; null means to be found in the file.</summary>
public sealed record ImportSettings
{
    /// <summary>Everything is found in the file.</summary>
    public static ImportSettings Automatic { get; } = new();

    /// <summary>The character between columns.</summary>
    public char? Delimiter { get; init; }

    /// <summary>The decimal mark: a point or a comma.</summary>
    public char? DecimalMark { get; init; }

    /// <summary>Number of the first line of data, from 1.</summary>
    public int? FirstLine { get; init; }

    /// <summary>The text encoding's name.</summary>
    public string? Encoding { get; init; }

    /// <summary>Sample interval, s.</summary>
    public double? Interval { get; init; }

    /// <summary>Role of each column, in order: time, frequency, skip, or a channel's name.</summary>
    public IReadOnlyList<string>? Columns { get; init; }

    /// <summary>Unit of each column, in order, prefixes allowed.</summary>
    public IReadOnlyList<string>? Units { get; init; }

    /// <summary>Number of the segment to measure, from 1; null for all.</summary>
    public int? Segment { get; init; }
}
