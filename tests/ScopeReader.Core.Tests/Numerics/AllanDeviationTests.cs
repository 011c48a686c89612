using ScopeReader.Numerics;

namespace ScopeReader.Tests.Numerics;

public class AllanDeviationTests
{
    // B37 to B39: NIST SP 1065, 12.4: n0 = 1234567890, n(i+1) = 16807 n(i) mod (2^31 - 1).
    private static long[] Generated(int count)
    {
        var n = new long[count];
        n[0] = 1234567890;
        for (int i = 1; i < count; i++)
            n[i] = 16807 * n[i - 1] % 2147483647;
        return n;
    }

    private static double[] Phases(IEnumerable<double> frequencies)
    {
        double sum = 0;
        return [0, .. frequencies.Select(y => sum += y)];
    }

    [Fact]
    public void The_generator_is_that_of_the_published_test() => Assert.Equal([395529916, 1209410747, 633705974], Generated(4)[1..]);

    // B40 to B45: NIST SP 1065, table 31 (values seen in stored test files quoting its p. 108). Tolerance: half of the last printed digit, and rounding.
    [Theory]
    [InlineData(1, false, 0.2922319, 6e-8)]
    [InlineData(10, false, 0.09965736, 6e-9)]
    [InlineData(100, false, 0.03897804, 6e-9)]
    [InlineData(1, true, 0.2922319, 6e-8)]
    [InlineData(10, true, 0.09159953, 6e-9)]
    [InlineData(100, true, 0.03241343, 6e-9)]
    public void The_thousand_points_of_the_published_test(int averaged, bool overlapping, double printed, double tolerance) =>
        Assert.Equal(printed, AllanDeviation.Of(Phases(Generated(1000).Select(n => n / 2147483647.0)), 1, averaged, overlapping), tolerance);

    // B68 to B71: NBS Monograph 140 and NIST SP 1065, table 30.
    [Theory]
    [InlineData(1, false, 91.22945, 2e-5)]
    [InlineData(2, false, 115.8082, 6e-5)]
    [InlineData(1, true, 91.22945, 2e-5)]
    [InlineData(2, true, 85.95287, 2e-5)]
    public void The_nine_points_of_the_older_test(int averaged, bool overlapping, double printed, double tolerance) =>
        Assert.Equal(printed, AllanDeviation.Of(Phases([892, 809, 823, 798, 671, 644, 883, 903, 677]), 1, averaged, overlapping), tolerance);
}
