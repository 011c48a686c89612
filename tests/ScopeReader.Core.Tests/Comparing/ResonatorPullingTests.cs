using ScopeReader.Comparing;

namespace ScopeReader.Tests.Comparing;

public class ResonatorPullingTests
{
    private const double Series = 10e6, Motional = 20e-15, Shunt = 5e-12;
    private static readonly double[] Loads = [8e-12, 10e-12, 12e-12, 15e-12, 18e-12, 22e-12, 27e-12, 33e-12];

    [Fact]
    public void The_capacitances_of_a_made_resonator_come_back()
    {
        ResonatorPulling fit = ResonatorPulling.Fit(Loads, [.. Loads.Select(Pulled)])!;

        // Closed form, no noise. Tolerance: 1e-16 in the frequency is 1e-12 of the 1e-4 that pulling moves it; the search stops at about the root of that.
        Assert.Equal(Motional, fit.MotionalCapacitance, 1e-5 * Motional);
        Assert.Equal(Shunt, fit.ShuntCapacitance, 1e-5 * Shunt);
        Assert.Equal(Series, fit.SeriesFrequency, 1e-8 * Series);
        // G01: 434.78 ppm by the linear formula, 434.69 exactly. Tolerance: the check list's.
        Assert.Equal(434.782608695652, (fit.At(18e-12) / fit.SeriesFrequency - 1) * 1e6, 0.15);
    }

    [Fact]
    public void Stated_uncertainties_are_the_spread_of_repeated_fits()
    {
        var random = new Random(10);
        var fits = new List<ResonatorPulling>();
        for (int run = 0; run < 400; run++)
            fits.Add(ResonatorPulling.Fit(Loads, [.. Loads.Select(c => Pulled(c) * (1 + 1e-7 * Math.Sqrt(-2 * Math.Log(1 - random.NextDouble())) * Math.Cos(2 * Math.PI * random.NextDouble())))])!);

        // Spread of 400 is known to 1/√800 = 3.5 %, and the mean of stated ones, on 5 degrees of freedom, to less and 5 % low: 0.8 to 1.3 is what is asked.
        Assert.InRange(Ratio(fits, f => f.MotionalUncertainty, f => f.MotionalCapacitance), 0.8, 1.3);
        Assert.InRange(Ratio(fits, f => f.ShuntUncertainty, f => f.ShuntCapacitance), 0.8, 1.3);
    }

    [Fact]
    public void Points_that_do_not_bend_like_a_resonators_give_nothing()
    {
        Assert.Null(ResonatorPulling.Fit(Loads.AsSpan(0, 3), [1, 2, 3]));
        Assert.Null(ResonatorPulling.Fit(Loads, [.. Loads.Select(c => 1e6 + 1e12 * c)]));
    }

    private static double Pulled(double load) => Series * Math.Sqrt(1 + Motional / (Shunt + load));

    private static double Ratio(List<ResonatorPulling> fits, Func<ResonatorPulling, double> stated, Func<ResonatorPulling, double> value)
    {
        double mean = fits.Average(value);
        return fits.Average(stated) / Math.Sqrt(fits.Sum(f => (value(f) - mean) * (value(f) - mean)) / (fits.Count - 1));
    }
}
