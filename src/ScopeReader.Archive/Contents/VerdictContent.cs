namespace ScopeReader.Archive.Contents;

/// <summary>A limit and how it was answered.</summary>
public sealed record VerdictContent
{
    /// <summary>The quantity's identifier.</summary>
    public required string Quantity { get; init; }

    /// <summary>Lower bound, in <see cref="Unit"/>.</summary>
    public double? Low { get; init; }

    /// <summary>Upper bound, in <see cref="Unit"/>.</summary>
    public double? High { get; init; }

    /// <summary>Unit of the bounds and the value.</summary>
    public required string Unit { get; init; }

    /// <summary>The value that was judged.</summary>
    public double? Value { get; init; }

    /// <summary>Its expanded uncertainty.</summary>
    public double? ExpandedUncertainty { get; init; }

    /// <summary>guarded or simple.</summary>
    public required string Rule { get; init; }

    /// <summary>Guard band over expanded uncertainty.</summary>
    public required double Guard { get; init; }

    /// <summary>Probability that the true value lies inside the limit.</summary>
    public double? Probability { get; init; }

    /// <summary>pass, fail, undecided, not-measured or not-applicable.</summary>
    public required string Outcome { get; init; }

    /// <summary>Why.</summary>
    public required string Reason { get; init; }

    /// <summary>Where a limit line was judged; null for a limit on a quantity.</summary>
    public LimitLineContent? LimitLine { get; init; }
}
