using ScopeReader.Captures;
using ScopeReader.Edges;
using ScopeReader.Numerics;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Edges;

/// <summary>The chain's bandwidth taken out of a duration: how wrong that is for shapes that are not Gaussian, and when it is refused.</summary>
public class ChainCorrectionTests
{
    // A15 the other way round: variances subtract.
    [Fact]
    public void Five_with_a_chain_of_four_is_three() => Assert.Equal(3e-9, ChainBandwidth.Corrected(5e-9, 4e-9), 1e-20);

    [Fact]
    public void A_chain_that_takes_as_long_leaves_nothing() => Assert.Equal(0, ChainBandwidth.Corrected(4e-9, 4e-9));

    // Linear ramps through a single pole: a pole of time constant 1 has a duration of ln 9. The ramp of 10 to 90 % duration T takes T/0.8.
    [Theory]
    [InlineData(1, 1.28091693456183)] // A17
    [InlineData(2, -2.37143742826713)] // A18
    [InlineData(3, -2.28655229483555)] // A19
    [InlineData(5, -1.06078158497918)] // A20
    public void Ramp_through_a_pole_is_corrected_to_within_the_published_error(double ratio, double errorPercent)
    {
        double chain = Math.Log(9), own = ratio * chain, length = own / 0.8;
        double Integral(double t) => t <= 0 ? 0 : t - 1 + Math.Exp(-t);
        (ReadingSheet sheet, _) = Steps.Measure(Steps.Record(t => (Integral(t) - Integral(t - length)) / length, 0.02, 20, 60));
        // In percent of the duration: a ramp's corners lie near the 10 and 90 % levels and bend the reader's cubic by 2e-4.
        Assert.Equal(errorPercent, 100 * (ChainBandwidth.Corrected(sheet.Value(Quantities.RiseTime), chain) / own - 1), 0.02);
    }

    [Fact]
    public void Two_equal_poles_are_corrected_sixteen_percent_high()
    {
        // A16 and A32: 1 − (1 + t) e^−t; the root of the sum of squares is 7.46 % short of it, the corrected value 15.57 % long.
        (ReadingSheet sheet, _) = Steps.Measure(Steps.Record(t => t < 0 ? 0 : 1 - (1 + t) * Math.Exp(-t), 0.02, 20, 60));
        double measured = sheet.Value(Quantities.RiseTime), one = Math.Log(9);
        Assert.Equal(-7.46189960248728, 100 * (ChainBandwidth.Combine(one, one) / measured - 1), 0.005);
        Assert.Equal(15.5659207217423, 100 * (ChainBandwidth.Corrected(measured, one) / one - 1), 0.005);
    }

    [Fact]
    public void Gaussian_edge_through_a_gaussian_chain_is_given_back()
    {
        // 4 ns through 100 MHz: √(4² + 3.396²) = 5.247 ns, which is 1.55 times the chain's.
        ReadingSheet sheet = Measure(4e-9, Chain());
        Reading corrected = sheet.Primary(Quantities.RiseTimeCorrected)!;
        Assert.Equal(4e-9, corrected.Value, 1e-12);
        // The shape's bound at own over chain of 1.178: 16 − 11 · 0.178 = 14.0 %, and nearly nothing else.
        Assert.InRange(corrected.Budget.ExpandedUncertainty / corrected.Value, 0.95 * 0.140, 1.01 * 0.140);
        Assert.Equal("a gaussian response of 3.40 ns taken out, its measured bandwidth taken as exact; uncorrected 5.25 ns", corrected.Note);
        Assert.Equal(["timebase"], corrected.Budget.Missing);
    }

    [Fact]
    public void Uncertainty_is_magnified_as_the_square_loses_digits()
    {
        // A35 is (5/3)² = 2.78 relative to the value itself; the sensitivity of √(m² − c²) to m is m over the root: 5/3 at 5 and 4.
        double step = 1e-6 * 5e-9, slope = (ChainBandwidth.Corrected(5e-9 + step, 4e-9) - ChainBandwidth.Corrected(5e-9 - step, 4e-9)) / (2 * step);
        Assert.Equal(2.77777777777778, slope * 5 / 3, 2e-6);
    }

    [Theory]
    [InlineData(3e-9, BandwidthBasis.Measured, ChainResponse.Gaussian, "the 4.53 ns measured are too close to the chain's own 3.4 ns to be taken apart: the edge itself takes at most what was measured")]
    [InlineData(6e-9, BandwidthBasis.Measured, ChainResponse.Flat, "a flat response overshoots and shortens edges: taking its duration out makes the result worse")]
    [InlineData(4e-9, BandwidthBasis.Measured, ChainResponse.Unknown, "the chain's response is not stated, and one that overshoots makes a corrected value worse than the measured one; add response = \"gaussian\" to [chain] if it rolls off gently")]
    [InlineData(4e-9, BandwidthBasis.Catalogue, ChainResponse.Gaussian, "a catalogue bandwidth is a least: the edge itself takes at most the 5.25 ns measured and at least 4.00 ns; measure the bandwidth and say bandwidth-basis = \"measured\" for a value")]
    public void It_is_refused_where_it_would_mislead(double own, BandwidthBasis basis, ChainResponse response, string reason)
    {
        ReadingSheet sheet = Measure(own, Chain() with { BandwidthBasis = basis, Response = response });
        NotMeasured refused = Assert.Single(sheet.NotMeasured, n => n.Quantity == Quantities.RiseTimeCorrected);
        Assert.Equal(reason, refused.Reason);
        // At most what was measured, to its own uncertainty.
        Assert.InRange(refused.AtMost!.Value, sheet.Value(Quantities.RiseTime), 1.01 * sheet.Value(Quantities.RiseTime));
    }

    [Fact]
    public void Without_a_bandwidth_nothing_is_taken_out() =>
        Assert.Equal("what the chain adds is unknown: add input-bandwidth, bandwidth-basis and response to [chain]",
            Measure(4e-9, MeasuringChain.Unknown).NotMeasured.Single(n => n.Quantity == Quantities.RiseTimeCorrected).Reason);

    private static MeasuringChain Chain() => MeasuringChain.Unknown with { InputBandwidth = 100e6, BandwidthBasis = BandwidthBasis.Measured, Response = ChainResponse.Gaussian };

    // A Gaussian edge of its own duration, as a Gaussian chain of 100 MHz shows it.
    private static ReadingSheet Measure(double own, MeasuringChain chain)
    {
        double sigma = ChainBandwidth.Combine(own, ChainBandwidth.Gaussian / 100e6) / 2.5631031310892007;
        return Steps.Measure(Steps.Record(t => BoundedNormal.NormalCumulative(t / sigma), 0.05e-9, 40e-9, 100e-9), plan: new Plan { Chain = chain }).Sheet;
    }
}
