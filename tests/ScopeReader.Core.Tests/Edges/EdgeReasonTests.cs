using ScopeReader.Captures;
using ScopeReader.Edges;
using ScopeReader.Levels;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Edges;

/// <summary>Captures that do not support a reading, and what the person is told.</summary>
public class EdgeReasonTests
{
    private static readonly double[] Low = new double[20], High = [.. Enumerable.Repeat(1.0, 30)];

    [Fact]
    public void Edge_between_two_samples_gives_no_rise_time() =>
        Assert.Equal("the whole edge lies between two samples 8.00 ns apart; sample faster", Reason(Quantities.RiseTime, [.. Low, .. High]));

    [Fact]
    public void Edge_with_two_samples_on_it_gives_a_bound() =>
        Assert.Equal("fewer than 3 samples lie on the edge, which takes at most 24.0 ns; sample faster", Reason(Quantities.RiseTime, [.. Low, 0.3, 0.7, .. High]));

    [Fact]
    public void Rising_record_has_no_falling_edge() =>
        Assert.Equal("the record holds no falling edge", Reason(Quantities.FallTime, [.. Low, 0.3, 0.7, .. High]));

    [Fact]
    public void Edge_that_the_record_cuts_off_is_refused() =>
        Assert.Equal("the record does not hold a whole edge; move the trigger or take a longer record", Reason(Quantities.RiseTime, [0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, .. High]));

    [Fact]
    public void Wave_without_states_has_no_edges()
    {
        var sheet = new ReadingSheet();
        var waveform = new Waveform("made", "V", TimeAxis.PerSample, [0, 1, 0, -1]);
        EdgeAnalyser.Measure(new WaveformJob(waveform, Plan.Empty, new ChainErrors(Plan.Empty, waveform.Axis), sheet, default), null, 0, [], null);
        Assert.Equal("the wave does not rest at two levels, so it has no edges", Assert.Single(sheet.NotMeasured, n => n.Quantity == Quantities.FallSettling).Reason);
        Assert.Empty(sheet.Readings);
    }

    [Fact]
    public void Ringing_that_lasts_to_the_end_has_not_settled() =>
        Assert.Equal("the wave has not settled to ±2 % when the next edge or the end of the record comes", Reason(Quantities.RiseSettling,
            Steps.Record(t => t < 0 ? 0 : 1 - 0.4 * Math.Exp(-t / 300) * Math.Cos(2 * Math.PI * t / 40), 1, 20, 400).Samples.ToArray()));

    [Fact]
    public void Smooth_edge_has_no_overshoot_to_speak_of()
    {
        double[] samples = Steps.Record(t => t < 0 ? 0 : 1 - Math.Exp(-t / 5), 1, 40, 100).Samples.ToArray();
        Assert.Equal("no excursion above 0.4 % of amplitude, the least that this capture can show", Reason(Quantities.RisePreshoot, samples, new(0, 1, 0.002, 0.002, 0)));
    }

    [Fact]
    public void Chain_slower_than_the_edge_is_named()
    {
        // 0.35/20 MHz is 17.5 ns; a Gaussian edge of 20 ns holds 87.5 % of that.
        var plan = new Plan { Chain = MeasuringChain.Unknown with { InputBandwidth = 20e6 } };
        Waveform waveform = Steps.Record(t => ScopeReader.Numerics.BoundedNormal.NormalCumulative(t * 2.5631031310892007 / 20e-9), 0.1e-9, 100e-9, 100e-9);
        Finding finding = Assert.Single(Steps.Measure(waveform, plan: plan).Sheet.Findings);
        Assert.Equal(("chain-bandwidth", "rise"), (finding.Code, finding.Value));
        Assert.Equal("the rise time of 20.0 ns holds up to 18 ns of the measuring chain's own (its stated bandwidths); the edge itself may take as little as 9.7 ns. "
            + "Use a chain of more bandwidth to see it.", finding.Text);
    }

    private static string Reason(Quantity quantity, double[] samples, StateLevels? levels = null)
    {
        var waveform = new Waveform("made", "V", new TimeAxis(0, 8e-9, AxisSource.Preamble), samples);
        return Assert.Single(Steps.Measure(waveform, levels).Sheet.NotMeasured, n => n.Quantity == quantity).Reason;
    }
}
