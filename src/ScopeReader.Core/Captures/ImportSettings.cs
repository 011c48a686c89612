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

    /// <summary>What the values are multiplied by to be in their unit: what the export left out, such as volts per count.</summary>
    public double? Factor { get; init; }

    /// <summary>These settings and, where they say nothing, others.</summary>
    public ImportSettings Or(ImportSettings others)
    {
        ArgumentNullException.ThrowIfNull(others);
        return new ImportSettings
        {
            Delimiter = Delimiter ?? others.Delimiter,
            DecimalMark = DecimalMark ?? others.DecimalMark,
            FirstLine = FirstLine ?? others.FirstLine,
            Encoding = Encoding ?? others.Encoding,
            Interval = Interval ?? others.Interval,
            Columns = Columns ?? others.Columns,
            Units = Units ?? others.Units,
            Segment = Segment ?? others.Segment,
            Factor = Factor ?? others.Factor,
        };
    }
}
