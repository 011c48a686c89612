using ScopeReader.Readings;

namespace ScopeReader.Limits;

/// <summary>How a limit was answered.</summary>
public enum VerdictOutcome
{
    /// <summary>The reading is inside the limit.</summary>
    Pass,

    /// <summary>The reading is beyond the limit.</summary>
    Fail,

    /// <summary>The uncertainty does not allow either.</summary>
    Undecided,

    /// <summary>The capture did not support the reading.</summary>
    NotMeasured,

    /// <summary>This kind of capture does not have the quantity.</summary>
    NotApplicable,
}

/// <summary>A reading held against a limit under a decision rule.</summary>
/// <param name="Limit">The limit.</param>
/// <param name="Outcome">The answer.</param>
/// <param name="Reading">The reading that was judged; null where there was none.</param>
/// <param name="Probability">Probability that the true value lies inside the limit; null where a chain term is unknown.</param>
/// <param name="Reason">Why, in a sentence without a full stop.</param>
public sealed record Verdict(Limit Limit, VerdictOutcome Outcome, Reading? Reading, double? Probability, string Reason)
{
    /// <summary>Where a limit line was judged; null for a limit on a quantity.</summary>
    public LinePlace? Line { get; init; }
}
