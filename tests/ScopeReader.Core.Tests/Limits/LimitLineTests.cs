using ScopeReader.Limits;

namespace ScopeReader.Tests.Limits;

public class LimitLineTests
{
    [Theory]
    [InlineData(1e6, -40)]
    [InlineData(2e6, -50)] // Half-way.
    [InlineData(3e6, -60)]
    public void Linear_line_is_straight_over_the_frequency(double frequency, double level) =>
        Assert.Equal(level, new LimitLine("mask", "dBm", [(1e6, -40), (3e6, -60)]).LevelAt(frequency)!.Value, 1e-12);

    [Theory]
    [InlineData(1e5, -40)]
    [InlineData(1e6, -50)] // The geometric mean of the ends is half-way.
    [InlineData(1e7, -60)]
    public void Logarithmic_line_is_straight_over_the_logarithm(double frequency, double level) =>
        Assert.Equal(level, new LimitLine("mask", "dBµV", [(1e5, -40), (1e7, -60)], LineInterpolation.Logarithmic).LevelAt(frequency)!.Value, 1e-9);

    [Theory]
    [InlineData(LineSide.Upper, -60)]
    [InlineData(LineSide.Lower, -40)]
    public void Step_has_the_stricter_of_its_levels(LineSide side, double level)
    {
        var line = new LimitLine("mask", "dBm", [(1e6, -40), (2e6, -40), (2e6, -60), (3e6, -60)]) { Side = side };
        Assert.Equal(level, line.LevelAt(2e6));
        Assert.Equal(-40, line.LevelAt(1.9e6));
        Assert.Equal(-60, line.LevelAt(2.1e6));
    }

    [Fact]
    public void There_is_no_line_beyond_its_ends()
    {
        var line = new LimitLine("mask", "dBm", [(1e6, -40), (2e6, -40)]);
        Assert.Null(line.LevelAt(0.999e6));
        Assert.Null(line.LevelAt(2.001e6));
    }

    [Fact]
    public void Points_that_are_no_line_are_refused()
    {
        Assert.Throws<ArgumentException>(() => new LimitLine("mask", "dBm", [(1e6, -40)]));
        Assert.Throws<ArgumentException>(() => new LimitLine("mask", "dBm", [(2e6, -40), (1e6, -40)]));
        Assert.Throws<ArgumentException>(() => new LimitLine("mask", "dBm", [(0, -40), (1e6, -40)], LineInterpolation.Logarithmic));
        Assert.Throws<ArgumentException>(() => new LimitLine("mask", "dBm", [(1e6, double.NaN), (2e6, -40)]));
        Assert.Throws<ArgumentException>(() => new LimitLine("mask", "dB", [(1e6, -40), (2e6, -40)]));
    }
}
