using ScopeReader.Readings;

namespace ScopeReader.Tests.Readings;

public class BudgetTests
{
    // A worked frequency budget in ppm: type A 0.40 with 9 degrees of freedom, reference ±0.5 and drift ±1.0 rectangular,
    // read-out 0.1 full width.
    private static Budget Worked => new(
    [
        BudgetTerm.Normal("type A", 0.40, degreesOfFreedom: 9),
        BudgetTerm.Rectangular("reference", 0.5),
        BudgetTerm.Rectangular("drift", 1.0),
        BudgetTerm.Rectangular("read-out", 0.05),
    ]);

    [Fact]
    public void Terms_combine_by_root_sum_of_squares() =>
        // C09: JCGM 100 5.1.2. Tolerance: rounding.
        Assert.Equal(0.759934207678533, Worked.StandardUncertainty, 1e-12);

    [Fact]
    public void Effective_degrees_of_freedom_follow_Welch_and_Satterthwaite() =>
        // C10: JCGM 100 G.4, formula (G.2b).
        Assert.Equal(117.248291015625, Worked.DegreesOfFreedom!.Value, 1e-9);

    [Fact]
    public void A_rectangle_gives_its_half_width_over_root_three() =>
        // C03: JCGM 100 4.3.7, half-width 1.
        Assert.Equal(0.577350269189626, BudgetTerm.Rectangular("bound", 1).Value, 1e-14);

    [Fact]
    public void A_lone_rectangle_is_never_widened_past_its_bound()
    {
        // 25 ppm of 455012.31 Hz, data-sheet bound: the expanded uncertainty is 95 % of the bound (closed form), k = 0.95·√3.
        var budget = new Budget([BudgetTerm.Rectangular("timebase", 25e-6, 455012.31, ofChain: true)]);

        Assert.Equal(0.95 * 25e-6 * 455012.31, budget.ExpandedUncertainty, 1e-9);
        Assert.Equal(0.95 * Math.Sqrt(3), budget.CoverageFactor!.Value, 1e-12);
        Assert.Equal(0, budget.Repeatability);
    }

    [Fact]
    public void Few_degrees_of_freedom_widen_the_interval_to_Students_t()
    {
        // t for 95 % and 5 degrees of freedom: 2.571 (JCGM 100 table G.2, from memory). Tolerance: half of its last digit.
        var budget = new Budget([BudgetTerm.Normal("noise", 1, degreesOfFreedom: 5)]);

        Assert.Equal(2.571, budget.ExpandedUncertainty, 0.0005);
    }

    [Fact]
    public void Stated_intervals_hold_the_errors_that_the_terms_describe()
    {
        // Draws from the terms themselves (JCGM 101, clause 7): 40,000 errors of a rectangle ±2 and a normal 0.7 with their sensitivities.
        // Tolerance: four standard deviations of a binomial share, 4·√(0.95·0.05/40000) = 0.0044.
        var random = new Random(101);
        var budget = new Budget([BudgetTerm.Rectangular("bound", 2, -3), BudgetTerm.Normal("noise", 0.7, 2)]);
        int inside = 0;
        for (int i = 0; i < 40_000; i++)
        {
            double normal = Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble());
            if (Math.Abs(-3 * (4 * random.NextDouble() - 2) + 2 * 0.7 * normal) <= budget.ExpandedUncertainty)
                inside++;
        }
        Assert.Equal(0.95, inside / 40_000.0, 0.0044);
    }

    [Fact]
    public void A_budget_scales_with_its_reading()
    {
        Budget scaled = Worked.Times(-1000);

        // Law: everything but the factor and the degrees of freedom is proportional.
        Assert.Equal(1000 * Worked.ExpandedUncertainty, scaled.ExpandedUncertainty, 1e-9);
        Assert.Equal(Worked.DegreesOfFreedom!.Value, scaled.DegreesOfFreedom!.Value, 1e-9);
    }
}
