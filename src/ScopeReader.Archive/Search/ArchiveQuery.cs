namespace ScopeReader.Archive.Search;

/// <summary>What to look for: everything that is stated must hold.</summary>
public sealed record ArchiveQuery
{
    /// <summary>The subject, letters of either case; <c>*</c> stands for anything.</summary>
    public string? Subject { get; init; }

    /// <summary>The serial number, as <see cref="Subject"/>.</summary>
    public string? Serial { get; init; }

    /// <summary>Tags that the entry has, all of them.</summary>
    public IReadOnlyList<string> Tags { get; init; } = [];

    /// <summary>Captured at this instant or later.</summary>
    public DateTimeOffset? Since { get; init; }

    /// <summary>Captured before this instant.</summary>
    public DateTimeOffset? Until { get; init; }

    /// <summary>Words that occur in subject, serial, operator, instrument, notes, tags, file name or findings; a <c>*</c> at a word's end takes its continuations.</summary>
    public string? Text { get; init; }

    /// <summary>pass, fail, undecided, error or unjudged.</summary>
    public string? Outcome { get; init; }

    /// <summary>Bounds on primary readings of the latest measurement, and on conditions.</summary>
    public IReadOnlyList<Comparison> Where { get; init; } = [];

    /// <summary>These entries only; empty for all.</summary>
    public IReadOnlyList<int> Entries { get; init; } = [];

    /// <summary>The readings to give with each entry, by quantity; null for all.</summary>
    public IReadOnlyList<string>? Quantities { get; init; }

    /// <summary>How many entries to give at most, latest capture first.</summary>
    public int Limit { get; init; } = 100;
}
