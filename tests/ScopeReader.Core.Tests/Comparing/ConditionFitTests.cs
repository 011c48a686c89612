using ScopeReader.Comparing;

namespace ScopeReader.Tests.Comparing;

public class ConditionFitTests
{
    private static readonly double[] Supply = [4.5, 4.75, 5, 5.25, 5.5];

    [Fact]
    public void A_straight_run_keeps_its_line_and_the_slopes_interval_is_Students()
    {
        ConditionFit fit = ConditionFit.Of(Supply, [-1.1, -0.4, 0.1, 0.4, 1.0]);

        // G58: t = 3.1824 for three degrees of freedom times 0.14606. Tolerance: the check list's.
        Assert.Equal(0.464826034520844, fit.SlopeExpandedUncertainty, 1e-9);
        Assert.False(fit.CurvatureIsSignificant);
        Assert.Same(fit.Line, fit.Best);
    }

    [Fact]
    public void A_curved_run_takes_the_parabola()
    {
        // A tuning fork's -0.034 ppm/K² about 25 °C (G06: -41.65 ppm at -10 °C), with ± 0.01 ppm of alternating scatter.
        double[] temperature = [-10, 0, 10, 20, 30, 40, 50, 60];
        ConditionFit fit = ConditionFit.Of(temperature, [.. temperature.Select((t, i) => -0.034 * (t - 25) * (t - 25) + (i % 2 == 0 ? 0.01 : -0.01))]);

        Assert.True(fit.CurvatureIsSignificant);
        // Tolerance: the scatter.
        Assert.Equal(-41.65, fit.Best.At(-10), 0.02);
        // Closed form: within 10 ppm for ± √(10/0.034) = ± 17.15 K about 25 °C. Tolerance: the scatter over the slope there, 1.17 ppm/K.
        (double from, double to) = Assert.Single(fit.SettingsWithin(-10, double.PositiveInfinity));
        Assert.Equal(25 - 17.15, from, 0.02);
        Assert.Equal(25 + 17.15, to, 0.02);
        // Tolerance: one of the 2000 steps over 70 K.
        Assert.Equal(25, fit.Closest(0), 0.05);
    }

    [Fact]
    public void A_line_within_bounds_runs_from_where_it_enters_to_the_last_setting()
    {
        ConditionFit fit = ConditionFit.Of([0, 1, 2, 3, 4], [0, 10, 20, 30, 40]);
        // Closed form: 10 x ≥ 15 from 1.5 on; with 5 kept as a guard from 2.0 on. Tolerance: bisection.
        Assert.Equal([(1.5, 4.0)], fit.SettingsWithin(15, double.PositiveInfinity).Select(Rounded));
        Assert.Equal([(2.0, 4.0)], fit.SettingsWithin(15, double.PositiveInfinity, _ => 5).Select(Rounded));
        Assert.Empty(fit.SettingsWithin(50, 60));
    }

    [Fact]
    public void The_interval_of_the_slope_covers_the_truth_as_often_as_it_says()
    {
        var random = new Random(7);
        int covered = 0;
        for (int run = 0; run < 1000; run++)
        {
            double[] values = [.. Supply.Select(v => 2 * v + 0.1 * Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble()))];
            ConditionFit fit = ConditionFit.Of(Supply, values);
            covered += Math.Abs(fit.Line.Coefficients[1] - 2) <= fit.SlopeExpandedUncertainty ? 1 : 0;
        }
        // 950 expected; the binomial spread is √(1000 · 0.95 · 0.05) = 6.9: four of those.
        Assert.InRange(covered, 922, 978);
    }

    private static (double, double) Rounded((double From, double To) range) => (Math.Round(range.From, 9), Math.Round(range.To, 9));
}
