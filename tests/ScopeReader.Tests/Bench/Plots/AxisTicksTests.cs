using System.Globalization;
using CsCheck;
using ScopeReader.Bench.Plots;

namespace ScopeReader.Tests.Bench.Plots;

public class AxisTicksTests
{
    [Fact]
    public void Ticks_are_round_inside_the_axis_and_no_more_than_asked_for() =>
        Gen.Select(Gen.Double[-1, 1], Gen.Double[-9, 9], Gen.Int[2, 12]).Sample((place, decade, most) =>
        {
            double span = Math.Pow(10, decade), low = place * span, high = low + span;
            var ticks = new AxisTicks(low, high, most, "V");
            // At a step of span/most rounded up, at most one more tick than intervals fits; half a billionth for rounding.
            return ticks.Count <= most + 1 && Enumerable.Range(0, ticks.Count).All(i => ticks.At(i) >= low - span * 1e-8 && ticks.At(i) <= high + span * 1e-8);
        });

    [Theory]
    [InlineData(0, 2e-6, "µs", "0.0 0.5 1.0 1.5 2.0")]
    [InlineData(-0.2, 3.5, "V", "0 1 2 3")]
    [InlineData(-80, 0, "V", "−80 −60 −40 −20 0")]
    public void Labels_share_one_prefix(double low, double high, string unit, string labels)
    {
        var ticks = new AxisTicks(low, high, 4, unit is "µs" ? "s" : unit);
        Assert.Equal(unit, ticks.Unit);
        Assert.Equal(labels, string.Join(' ', Enumerable.Range(0, ticks.Count).Select(ticks.Label)));
        Assert.Null(ticks.From);
    }

    [Fact]
    public void Far_from_zero_and_close_together_labels_count_from_a_round_place()
    {
        var ticks = new AxisTicks(1.00000001, 1.000000051, 5, "s");
        Assert.Equal("1.00000001 s", ticks.From);
        Assert.Equal("ns", ticks.Unit);
        Assert.Equal("+0 +10 +20 +30 +40", string.Join(' ', Enumerable.Range(0, ticks.Count).Select(ticks.Label)));
        Assert.Equal(1.00000003, ticks.At(2), 1e-15); // a rounding of 1 s in a double is 1e-16
        Assert.True(double.Parse("1.00000001", CultureInfo.InvariantCulture) == ticks.Origin);
    }
}
