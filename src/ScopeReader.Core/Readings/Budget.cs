using ScopeReader.Numerics;

namespace ScopeReader.Readings;

/// <summary>The uncertainty budget of a reading: its terms, and the terms of the chain that nobody stated.</summary>
/// <remarks>
/// <para>Combination: independent terms, JCGM 100:2008 eq. (10); effective degrees of freedom, eq. (G.2b).</para>
/// <para>Interval: 95 %, from the convolution of the largest rectangle with a normal distribution of all the other terms
/// (JCGM 101:2008 propagates distributions; for one rectangle and one normal it has a closed form). A lone rectangle gives
/// k = 1.65, a normal 1.96 or Student's t.</para>
/// </remarks>
public sealed class Budget
{
    /// <summary>The share of values that the expanded interval is to hold.</summary>
    public const double Coverage = 0.95;

    private readonly BoundedNormal _error;

    /// <param name="terms">The terms; those that contribute nothing may be left out.</param>
    /// <param name="missing">Names of chain terms that are not stated: <c>timebase</c>, <c>gain</c>, <c>offset</c>, <c>flatness</c>.</param>
    public Budget(IEnumerable<BudgetTerm> terms, IEnumerable<string>? missing = null)
    {
        ArgumentNullException.ThrowIfNull(terms);
        Terms = [.. terms];
        Missing = missing is null ? [] : [.. missing.Distinct()];

        double sum = 0, own = 0, weighted = 0, widest = 0;
        foreach (BudgetTerm term in Terms)
        {
            double variance = term.Contribution * term.Contribution;
            sum += variance;
            if (!term.OfChain)
                own += variance;
            if (term.DegreesOfFreedom is { } n)
                weighted += variance * variance / n;
            if (term.Distribution == Distribution.Rectangular)
                widest = Math.Max(widest, term.Contribution);
        }
        StandardUncertainty = Math.Sqrt(sum);
        Repeatability = Math.Sqrt(own);
        DegreesOfFreedom = weighted > 0 ? sum * sum / weighted : null;

        // The terms beside the widest rectangle count as normal, widened where they rest on few observations.
        double rest = Math.Sqrt(Math.Max(0, sum - widest * widest));
        if (rest > 0 && weighted > 0)
            rest *= StudentT.Quantile95(rest * rest * (rest * rest) / weighted) / StudentT.Quantile95(double.PositiveInfinity);
        _error = new BoundedNormal(widest * Math.Sqrt(3), rest);
        ExpandedUncertainty = _error.HalfWidth(Coverage);
    }

    /// <summary>The terms, as given.</summary>
    public IReadOnlyList<BudgetTerm> Terms { get; }

    /// <summary>Chain terms that are unknown: the reading is "as indicated".</summary>
    public IReadOnlyList<string> Missing { get; }

    /// <summary>Combined standard uncertainty, in the reading's unit.</summary>
    public double StandardUncertainty { get; }

    /// <summary>The capture's own part of it: what counts between captures that share a chain.</summary>
    public double Repeatability { get; }

    /// <summary>Effective degrees of freedom; null means as good as infinitely many.</summary>
    public double? DegreesOfFreedom { get; }

    /// <summary>Half the width of the 95 % interval.</summary>
    public double ExpandedUncertainty { get; }

    /// <summary>Expanded over standard uncertainty; null where both are zero.</summary>
    public double? CoverageFactor => StandardUncertainty > 0 ? ExpandedUncertainty / StandardUncertainty : null;

    /// <summary>Probability that the reading's error is at most <paramref name="error"/>, in the reading's unit.</summary>
    public double Probability(double error) => _error.Cumulative(error);

    /// <summary>This budget with one more term.</summary>
    public Budget With(params ReadOnlySpan<BudgetTerm> more) => new([.. Terms, .. more], Missing);

    /// <summary>The budget of a reading that is this one times a factor.</summary>
    public Budget Times(double factor) => new(Terms.Select(t => t.Times(factor)), Missing);
}
