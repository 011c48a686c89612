using ScopeReader.Numerics;
using static ScopeReader.Tests.Numerics.CertifiedData;

namespace ScopeReader.Tests.Numerics;

public class PolynomialFitTests
{
    [Fact]
    public void Norris_agrees_with_its_certified_values_to_12_digits()
    {
        double[][] columns = Columns("norris.csv");
        PolynomialFit fit = PolynomialFit.Of(columns[1], columns[0], 1);

        // G07 to G12: NIST StRD, certified.
        AssertDigits(12, -0.262323073774029, fit.Coefficients[0]);
        AssertDigits(12, 1.00211681802045, fit.Coefficients[1]);
        AssertDigits(12, 0.232818234301152, fit.StandardUncertainties[0]);
        AssertDigits(12, 0.000429796848199937, fit.StandardUncertainties[1]);
        AssertDigits(12, 0.884796396144373, fit.ResidualDeviation);
        AssertDigits(12, 26.6173985294224, fit.ResidualSumOfSquares);
    }

    [Fact]
    public void Pontius_agrees_with_its_certified_values_to_12_digits()
    {
        double[][] columns = Columns("pontius.csv");
        PolynomialFit fit = PolynomialFit.Of(columns[1], columns[0], 2);

        // G13 to G17: NIST StRD, certified. Nine digits are what is asked of a parabola this badly conditioned.
        AssertDigits(12, 0.000673565789473684, fit.Coefficients[0]);
        AssertDigits(12, 7.32059160401003e-07, fit.Coefficients[1]);
        AssertDigits(12, -3.16081871345029e-15, fit.Coefficients[2]);
        AssertDigits(12, 1.57817399981659e-10, fit.StandardUncertainties[1]);
        AssertDigits(12, 0.000205177424076185, fit.ResidualDeviation);
    }

    [Fact]
    public void NoInt1_agrees_with_its_certified_values_to_12_digits()
    {
        (double[] x, double[] y) = NoInt1();
        PolynomialFit fit = PolynomialFit.Of(x, y, 1, throughOrigin: true);

        // G27, G28: NIST StRD, certified.
        AssertDigits(12, 2.07438016528926, fit.Coefficients[0]);
        AssertDigits(12, 0.0165289256198347, fit.StandardUncertainties[0]);
    }

    [Fact]
    public void A_line_through_supply_voltages_has_the_slope_worked_out_by_hand()
    {
        PolynomialFit fit = PolynomialFit.Of([4.5, 4.75, 5, 5.25, 5.5], [-1.1, -0.4, 0.1, 0.4, 1.0], 1);

        // G56, G57: least squares by hand, Sxy/Sxx = 1.25/0.625 and s² = 0.04/3. Tolerances: the check list's.
        Assert.Equal(2, fit.Coefficients[1], 1e-12);
        Assert.Equal(0.146059348668044, fit.StandardUncertainties[1], 1e-9);
    }

    [Fact]
    public void The_curve_between_points_and_its_uncertainty_follow_the_formulas_for_a_line()
    {
        double[] x = [1, 2, 3, 4, 6], y = [2.1, 3.9, 6.2, 7.8, 12.3];
        PolynomialFit fit = PolynomialFit.Of(x, y, 1);
        double mean = x.Average(), sxx = x.Sum(v => (v - mean) * (v - mean)), s = fit.ResidualDeviation;

        // Closed form: u² = s² (1/n + (x − mean)²/Sxx), and s² more for one new reading. Tolerance: rounding.
        Assert.Equal(s * Math.Sqrt(0.2 + (5 - mean) * (5 - mean) / sxx), fit.UncertaintyAt(5), 1e-13);
        Assert.Equal(s * Math.Sqrt(1.2 + (5 - mean) * (5 - mean) / sxx), fit.PredictionUncertaintyAt(5), 1e-13);
        Assert.Equal(fit.Coefficients[0] + 5 * fit.Coefficients[1], fit.At(5), 1e-12);
    }

    [Fact]
    public void Too_few_different_points_are_refused() =>
        Assert.Throws<ArgumentException>(() => PolynomialFit.Of([1, 1, 2, 2], [1, 2, 3, 4], 2));

    internal static void AssertDigits(double expected, double certified, double found) =>
        Assert.True(Digits(certified, found) >= expected, FormattableString.Invariant($"certified {certified:R}, found {found:R}: {Digits(certified, found):F1} digits, expected {expected}"));
}
