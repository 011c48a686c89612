namespace ScopeReader.Files;

/// <summary>How a file was understood, as <c>inspect</c> shows it.</summary>
public sealed record ImportReport
{
    /// <summary>The file as the person named it.</summary>
    public required string File { get; init; }

    /// <summary>The text encoding: "UTF-8", "UTF-16 LE", "UTF-16 BE" or "Latin-1"; "gzip, " before it where it was compressed.</summary>
    public required string Encoding { get; init; }

    /// <summary>What stands between columns: "comma", "semicolon", "tab", "spaces", "bar", or "none" for a single column.</summary>
    public required string Delimiter { get; init; }

    /// <summary>The decimal mark: "." or ",".</summary>
    public required string DecimalMark { get; init; }

    /// <summary>Lines before the first header row, or before the data where there is none.</summary>
    public required int PreambleLines { get; init; }

    /// <summary>Rows of names and units right above the data.</summary>
    public required int HeaderRows { get; init; }

    /// <summary>Number of the first line of data, from 1.</summary>
    public required long FirstLine { get; init; }

    /// <summary>The axis of the first channel.</summary>
    public required AxisReport Axis { get; init; }

    /// <summary>The channels, in the file's order.</summary>
    public required IReadOnlyList<ChannelReport> Channels { get; init; }

    /// <summary>What the file's folder remembers and was used, such as "decimal comma"; empty where nothing was.</summary>
    public IReadOnlyList<string> Remembered { get; init; } = [];

    /// <summary>What was assumed or noticed, a sentence each; the same as the capture's.</summary>
    public required IReadOnlyList<string> Doubts { get; init; }
}
