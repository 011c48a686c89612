namespace ScopeReader.Archive.Contents;

/// <summary>A reading as it is kept.</summary>
public sealed record ReadingContent
{
    /// <summary>The quantity's identifier.</summary>
    public required string Quantity { get; init; }

    /// <summary>In <see cref="Unit"/>.</summary>
    public required double Value { get; init; }

    /// <summary>Unit of the value and its uncertainties, without prefix.</summary>
    public required string Unit { get; init; }

    /// <summary>Combined standard uncertainty.</summary>
    public required double StandardUncertainty { get; init; }

    /// <summary>Half the width of the interval of <see cref="Coverage"/>.</summary>
    public required double ExpandedUncertainty { get; init; }

    /// <summary>Share of values that the interval is to hold.</summary>
    public double Coverage { get; init; } = 0.95;

    /// <summary>Expanded over standard uncertainty.</summary>
    public double? CoverageFactor { get; init; }

    /// <summary>Effective degrees of freedom; null for as good as infinitely many.</summary>
    public double? DegreesOfFreedom { get; init; }

    /// <summary>The capture's own part of the standard uncertainty.</summary>
    public required double Repeatability { get; init; }

    /// <summary>Chain terms that nobody stated.</summary>
    public IReadOnlyList<string> Missing { get; init; } = [];

    /// <summary>The method's name.</summary>
    public required string Method { get; init; }

    /// <summary>True for the one reading of a quantity that limits judge.</summary>
    public required bool Primary { get; init; }

    /// <summary>How many edges, cycles or points it rests on.</summary>
    public int? Count { get; init; }

    /// <summary>What an ideal wave of the measured shape would have; null where nothing is expected.</summary>
    public double? Expected { get; init; }

    /// <summary>The settings behind it, or why it is the primary one.</summary>
    public string? Note { get; init; }

    /// <summary>The uncertainty, term by term.</summary>
    public IReadOnlyList<BudgetTermContent> Budget { get; init; } = [];
}
