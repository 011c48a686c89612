using ScopeReader.Frequency;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Frequency;

public class EdgeRegressionTests
{
    // B18: √(12/(M(M² − 1))), closed form; tolerance as the table has it.
    [Fact]
    public void Uncertainty_of_a_hundred_crossings_per_unit_of_timing_noise() =>
        Assert.Equal(0.00346427483320998, Grid(100).UncertaintyFactor, 2e-5 * 0.0034643);

    // B19: gain over the first and the last crossing alone, √2/(M − 1) over B18.
    [Fact]
    public void Regression_beats_first_and_last_crossing() =>
        Assert.Equal(4.12351391453539, Math.Sqrt(2) / 99 / Grid(100).UncertaintyFactor, 1e-9);

    // B20: for a random walk of phase the regression has 1.1988 times the variance of the end points. The period is linear in
    // the instants: a step of one unit at each edge in turn gives the weights.
    [Fact]
    public void A_random_walk_of_phase_favours_the_end_points()
    {
        const int M = 1000;
        double[] grid = [.. Enumerable.Range(0, M).Select(k => 100.0 * k)];
        double sum = 0;
        for (int j = 1; j < M; j++)
        {
            double change = EdgeRegression.Fit([.. grid.Select((t, k) => k >= j ? t + 1 : t)], [], samplePhase: false)!.Period - 100;
            sum += change * change;
        }
        // Tolerance: 1e-11 of rounding in each of 1000 weights near 1e-3.
        Assert.Equal(1.1988023976024, sum * (M - 1), 1e-6);
    }

    // B26: removing slope and offset from M edges shrinks their rms by √((M − 2)/M); the spread takes that out again.
    [Fact]
    public void The_spread_is_that_of_the_edges_not_of_the_residuals()
    {
        var noise = new NormalNoise(4);
        double squares = Enumerable.Range(0, 4000).Average(_ =>
        {
            double spread = EdgeRegression.Fit([.. Enumerable.Range(0, 10).Select(k => 100.0 * k + noise.Normal())], [], samplePhase: false)!.Spread;
            return spread * spread;
        });
        // Tolerance: four standard errors of a mean of 4000 chi-squares with 8 degrees of freedom.
        Assert.Equal(1, squares, 4 * Math.Sqrt(2.0 / 8 / 4000));
    }

    [Fact]
    public void Missing_and_extra_edges_do_not_slip_a_cycle()
    {
        var noise = new NormalNoise(6);
        var rising = Enumerable.Range(0, 20000).Select(k => 7 + 5.3 * k + 0.05 * noise.Normal()).ToList();
        rising.RemoveRange(9000, 40);
        rising.RemoveAt(100);
        rising.Insert(5000, rising[5000] - 1.5);
        EdgeRegression fit = EdgeRegression.Fit([.. rising], [], samplePhase: false)!;

        // A slip of one cycle would be 50 ppm of the period. Tolerance: four stated u.
        Assert.Equal(5.3, fit.Period, 4 * fit.PeriodUncertainty);
        Assert.Equal(0.05 * Math.Sqrt(12 / Math.Pow(20000, 3)), fit.PeriodUncertainty, 0.05 * fit.PeriodUncertainty);
        Assert.Equal(1, fit.Outliers);
    }

    // Law: a mid level off centre moves the polarities apart and leaves the period alone.
    [Fact]
    public void Moving_one_polarity_leaves_the_period_alone()
    {
        double[] rising = [.. Enumerable.Range(0, 500).Select(k => 20.7 * k + 0.01 * Math.Sin(k))], falling = [.. Enumerable.Range(0, 500).Select(k => 9 + 20.7 * k + 0.01 * Math.Cos(k))];
        double period = EdgeRegression.Fit(rising, falling, samplePhase: false)!.Period;

        // Tolerance: rounding of instants near 10,000 samples.
        Assert.Equal(period, EdgeRegression.Fit(rising, [.. falling.Select(t => t + 1.7)], samplePhase: false)!.Period, 1e-12);
    }

    [Fact]
    public void One_edge_of_either_direction_is_no_period() => Assert.Null(EdgeRegression.Fit([3], [8]));

    // Phase that wanders slowly makes the period more uncertain than white noise of the same spread.
    [Fact]
    public void Wander_widens_the_uncertainty()
    {
        var noise = new NormalNoise(3);
        double phase = 0;
        double[] edges = [.. Enumerable.Range(0, 2000).Select(k => 100.0 * k + (phase += 0.01 * noise.Normal()))];
        EdgeRegression fit = EdgeRegression.Fit(edges, [], samplePhase: false)!;

        // Closed form (B20): a phase step of 0.01 each cycle leaves 0.01 √(6/5)/√M in the period. Tolerance: eight degrees of
        // freedom, of a step between block means that sees two thirds of the variance, know it within a factor of 3.
        double expected = 0.01 * Math.Sqrt(1.2 / 2000);
        Assert.InRange(fit.PeriodUncertainty, expected / 3, expected * 3);
        Assert.True(fit.PeriodUncertainty > 3 * fit.Spread * fit.UncertaintyFactor);
    }

    private static EdgeRegression Grid(int count) => EdgeRegression.Fit([.. Enumerable.Range(0, count).Select(k => 50.3 * k)], [], samplePhase: false)!;
}
