using ScopeReader.Frequency;
using ScopeReader.Readings;
using ScopeReader.Signals;
using static ScopeReader.Tests.Waves;

namespace ScopeReader.Tests.Frequency;

public class JitterTests
{
    private const double Period = 97.3;

    // Edges of a smooth shape, each moved by white timing noise, samples.
    private static ChannelMeasurement Jittery(double jitter, double noise, ulong seed, int count = 20_000)
    {
        var draw = new NormalNoise(seed);
        double[] moved = [.. Enumerable.Range(0, (int)(2 * count / Period) + 3).Select(_ => jitter * draw.Normal())];
        return Measure(Of(count, i =>
        {
            int k = (int)(2 * i / Period + 0.5);
            double step = 0.5 * (1 + Math.Tanh((i - k * Period / 2 - moved[k]) / 1.5));
            return (k % 2 == 0 ? step : 1 - step) + noise * draw.Normal();
        }, 1e-9));
    }

    // B23 to B25: white edge noise s gives √2 s, √6 s, and √3 between them; closed forms. Tolerance: the row's, and with 100,000 edges 0.4 %.
    [Fact]
    public void White_edge_noise_gives_its_roots()
    {
        var draw = new NormalNoise(3);
        double[] instants = [.. Enumerable.Range(0, 100_000).Select(k => 10.0 * k + draw.Normal())];
        Jitter jitter = Jitter.Of(instants, [.. Enumerable.Range(0, instants.Length)], 10, 0);

        Assert.Equal(1.4142135623731, jitter.Period, 0.01);
        Assert.Equal(2.44948974278318, jitter.CycleToCycle, 0.02);
        Assert.Equal(1.73205080756888, jitter.CycleToCycle / jitter.Period, 0.007);
    }

    [Fact]
    public void A_missing_edge_makes_no_period()
    {
        Jitter jitter = Jitter.Of([0, 10, 20, 40, 50, 60], [0, 1, 2, 4, 5, 6], 10, 0);

        Assert.Equal((4, 2, 6), (jitter.Periods, jitter.Pairs, jitter.Edges));
        Assert.Equal(0, jitter.Period, 1e-12);
    }

    // Source: the jitter that was put in, 0.3 samples of 1 ns: √2 and √6 times 0.3 ns. Over 30 captures of 205 edges.
    [Fact]
    public void The_stated_interval_holds_the_jitter_that_was_put_in()
    {
        int covered = 0, of = 0;
        for (ulong seed = 1; seed <= 30; seed++)
        {
            ChannelMeasurement measured = Jittery(0.3, 0.01, seed);
            foreach (var (quantity, truth) in new[] { (Quantities.PeriodJitter, Math.Sqrt(2) * 0.3e-9), (Quantities.CycleToCycleJitter, Math.Sqrt(6) * 0.3e-9) })
            {
                Reading reading = measured.Reading(quantity);
                covered += Math.Abs(reading.Value - truth) <= reading.Budget.ExpandedUncertainty ? 1 : 0;
                of++;
            }
        }
        // 95 % of 60 are 57; the two of a capture go together, so three standard deviations are 3·√(60·0.05·0.95·2) = 7.
        Assert.InRange(covered, of - 10, of);
    }

    [Fact]
    public void Jitter_below_the_digitisers_own_is_a_bound()
    {
        ChannelMeasurement measured = Jittery(0, 0.02, 1);

        foreach (Quantity quantity in new[] { Quantities.PeriodJitter, Quantities.CycleToCycleJitter, Quantities.TimeIntervalError, Quantities.AllanDeviation })
        {
            NotMeasured why = measured.NotMeasured.Single(n => n.Quantity == quantity);
            Assert.Contains("the digitiser's own noise alone gives", why.Reason, StringComparison.Ordinal);
            Assert.True(why.AtMost > 0);
        }
        // The bound must lie above nothing at all and below a sample.
        Assert.InRange(measured.NotMeasured.Single(n => n.Quantity == Quantities.PeriodJitter).AtMost!.Value, 1e-11, 1e-9);
    }

    [Fact]
    public void Too_few_periods_are_no_statistic() =>
        Assert.Equal("4 whole periods are too few to speak of jitter; capture 12 or more", Jittery(0.3, 0.01, 1, 500).Reason(Quantities.PeriodJitter));

    // White timing noise s gives an Allan deviation of √3 s/τ (closed form: second differences have 6 s²).
    [Fact]
    public void White_edge_noise_gives_its_allan_deviation()
    {
        Reading reading = Jittery(0.3, 0.01, 2, 100_000).Readings.Single(r => r.Quantity == Quantities.AllanDeviation && !r.IsPrimary && r.Method == "overlapping-10");

        // Tolerance: four stated standard uncertainties.
        Assert.Equal(Math.Sqrt(3) * 0.3 / (10 * Period), reading.Value, 4 * reading.Budget.StandardUncertainty);
    }

    // Closed form: a sweep of 100 ppm over 20,000 samples of 10 ns, 200 µs, is 0.5 ppm/µs.
    [Fact]
    public void Drift_is_what_was_put_in()
    {
        var draw = new NormalNoise(4);
        Reading reading = Measure(Of(20_000, i =>
        {
            double t = i / 20_000.0;
            return Math.Sin(2 * Math.PI * 205 * (t + 100e-6 * (t * t - t) / 2)) + 0.01 * draw.Normal();
        })).Reading(Quantities.FrequencyDrift);

        Assert.Equal("ppm/s", reading.Unit);
        Assert.Equal(100 / 200e-6, reading.Value, 4 * reading.Budget.StandardUncertainty);
        // The bound of a parabola's curvature, 2·σ/(√2·πA)·√(180/N)/(N² f): 1.04e4 ppm/s; 64 parts of which the scatter is taken know it to a fifth.
        Assert.InRange(reading.Budget.StandardUncertainty, 0.6e4, 1.6e4);
    }
}
