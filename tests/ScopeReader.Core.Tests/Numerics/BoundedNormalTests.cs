using CsCheck;
using ScopeReader.Numerics;

namespace ScopeReader.Tests.Numerics;

public class BoundedNormalTests
{
    [Fact]
    public void A_lone_rectangle_holds_95_percent_in_95_percent_of_its_width() =>
        // Closed form: the share of a rectangle inside ±x is x/a. Tolerance: a few last places.
        Assert.Equal(0.95 * 3, new BoundedNormal(3, 0).HalfWidth(0.95), 1e-14);

    [Fact]
    public void A_lone_normal_holds_95_percent_in_1_96_sigma() =>
        // Closed form: the 97.5 % quantile of the standard normal, 1.959963984540054 (any table). Tolerance: the quantile's own 1e-12.
        Assert.Equal(1.959963984540054 * 2, new BoundedNormal(0, 2).HalfWidth(0.95), 1e-11);

    [Theory]
    [InlineData(3, 2)]
    [InlineData(3, 0)]
    [InlineData(0, 2)]
    public void Some_error_is_certain_and_an_endless_one_impossible(double halfWidth, double sigma)
    {
        // Axioms of probability. A limit with one bound asks for exactly these.
        var error = new BoundedNormal(halfWidth, sigma);
        Assert.Equal(1, error.Cumulative(double.PositiveInfinity));
        Assert.Equal(0, error.Cumulative(double.NegativeInfinity));
    }

    [Fact]
    public void Two_equal_spreads_agree_with_a_convolution_by_quadrature()
    {
        // Source: Simpson's rule over the rectangle of the normal distribution function (by the series below),
        // a = √3, σ = 1 (both standard uncertainties 1), at x = 2. Tolerance: Simpson's error with 2000 steps is below 1e-12.
        double a = Math.Sqrt(3), x = 2, sum = 0;
        const int steps = 2000;
        for (int i = 0; i <= steps; i++)
        {
            double t = -a + 2 * a * i / steps;
            sum += (i == 0 || i == steps ? 1 : i % 2 == 1 ? 4 : 2) * Phi(x - t);
        }
        double expected = sum * (2 * a / steps / 3) / (2 * a);

        Assert.Equal(expected, new BoundedNormal(a, 1).Cumulative(x), 1e-11);
    }

    [Fact]
    public void The_interval_never_leaves_the_bound_by_more_than_the_normal_part_allows() =>
        Gen.Select(Gen.Double[0, 10], Gen.Double[0, 10]).Sample((a, sigma) =>
        {
            double u = new BoundedNormal(a, sigma).HalfWidth(0.95);
            // Laws: no narrower than either part alone, no wider than both added. 1e-9: bisection and rounding.
            return u >= Math.Max(0.95 * a, 1.95996 * sigma) * (1 - 1e-9) && u <= a + 1.95997 * sigma + 1e-12;
        });

    [Fact]
    public void Half_width_and_cumulative_are_inverse() =>
        Gen.Select(Gen.Double[1e-3, 1e3], Gen.Double[1e-3, 1e3], Gen.Double[0.5, 0.999]).Sample((a, sigma, share) =>
        {
            var error = new BoundedNormal(a, sigma);
            // Rounding of differences of numbers a/σ large: at most 1e6 here, so 1e-16 × 1e6, with room.
            return Math.Abs(2 * error.Cumulative(error.HalfWidth(share)) - 1 - share) < 1e-8;
        });

    // The normal distribution function by its Taylor series (Abramowitz and Stegun 26.2.11): another route than the code's.
    private static double Phi(double z)
    {
        double term = z, sum = z;
        for (int n = 3; n < 200; n += 2)
        {
            term *= z * z / n;
            sum += term;
        }
        return 0.5 + sum * Math.Exp(-z * z / 2) / Math.Sqrt(2 * Math.PI);
    }
}
