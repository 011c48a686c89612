using ScopeReader.Numerics;
using ScopeReader.Readings;

namespace ScopeReader.Comparing;

/// <summary>A quantity on one side: the mean of its captures, and what its uncertainty is made of.</summary>
/// <remarks>
/// One capture brings its own terms. Several bring their scatter instead (type A, JCGM 100:2008 4.2), in which noise and, where
/// the probe was put back between them, its placement are; bounds that the captures may share do not average and stay. A side
/// of one capture takes the scatter over from a side of several where that is more than its own terms.
/// </remarks>
/// <param name="Value">The mean.</param>
/// <param name="Count">How many captures have it.</param>
/// <param name="Own">The side's own terms.</param>
/// <param name="Chain">Terms of the chain.</param>
/// <param name="Missing">Chain terms that nobody stated.</param>
internal sealed record SideValue(double Value, int Count, IReadOnlyList<BudgetTerm> Own, IReadOnlyList<BudgetTerm> Chain, IReadOnlyList<string> Missing)
{
    /// <summary>Both sides of a comparison.</summary>
    /// <param name="reference">Readings of the reference, one a capture, one or more.</param>
    /// <param name="compared">Readings of the compared side.</param>
    public static (SideValue Reference, SideValue Compared) Pair(IReadOnlyList<Reading> reference, IReadOnlyList<Reading> compared)
    {
        (double Scatter, int Freedom)? a = ScatterOf(reference), b = ScatterOf(compared);
        return (Of(reference, a ?? b), Of(compared, b ?? a));
    }

    private static (double, int)? ScatterOf(IReadOnlyList<Reading> readings) =>
        readings.Count < 2 ? null : (SampleSummary.Of([.. readings.Select(r => r.Value)]).StandardDeviation, readings.Count - 1);

    private static SideValue Of(IReadOnlyList<Reading> readings, (double Scatter, int Freedom)? scatter)
    {
        Reading first = readings[0];
        BudgetTerm[] own = [.. first.Budget.Terms.Where(t => !t.OfChain)], chain = [.. first.Budget.Terms.Where(t => t.OfChain)];
        if (scatter is { } s && (readings.Count > 1 || s.Scatter > first.Budget.Repeatability))
            own =
            [
                BudgetTerm.Normal("reproducibility", s.Scatter / Math.Sqrt(readings.Count), 1, s.Freedom),
                .. own.Where(t => t.Distribution == Distribution.Rectangular),
            ];
        return new SideValue(readings.Average(r => r.Value), readings.Count, own, chain, first.Budget.Missing);
    }
}
