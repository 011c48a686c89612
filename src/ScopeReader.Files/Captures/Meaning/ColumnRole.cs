namespace ScopeReader.Files.Meaning;

/// <summary>What a column of numbers is for.</summary>
internal enum ColumnRole
{
    /// <summary>Samples of a channel.</summary>
    Value,

    /// <summary>Times of the samples.</summary>
    Time,

    /// <summary>Frequencies of the points.</summary>
    Frequency,

    /// <summary>Numbers the rows.</summary>
    Index,

    /// <summary>Not wanted.</summary>
    Skip,
}
