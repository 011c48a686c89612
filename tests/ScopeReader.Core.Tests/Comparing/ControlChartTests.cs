using ScopeReader.Comparing;

namespace ScopeReader.Tests.Comparing;

public class ControlChartTests
{
    [Fact]
    public void Limits_are_2_66_mean_moving_ranges_about_the_mean()
    {
        // By hand: ranges 2, 2, 2, 2 about a mean of 10.8; 3/1.128 = 2.66 (the printed constant of the chart for individuals, half its last digit times 2).
        ControlChart chart = ControlChart.Of([10, 12, 10, 12, 10])!;
        Assert.Equal(10.8 + 2.66 * 2, chart.High, 0.01);
        Assert.Equal(10.8 - 2.66 * 2, chart.Low, 0.01);
        Assert.Empty(chart.Outside);
    }

    [Fact]
    public void A_stray_reading_is_named() =>
        Assert.Equal([7], ControlChart.Of([5, 5.1, 4.9, 5, 5.1, 5, 4.9, 9, 5, 5.1, 4.9, 5, 5.1, 5, 4.9, 5, 5.1, 4.9, 5, 5.1, 5])!.Outside);

    [Fact]
    public void Two_readings_make_no_chart() => Assert.Null(ControlChart.Of([1, 2]));
}
