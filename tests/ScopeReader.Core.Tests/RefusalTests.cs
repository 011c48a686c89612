using ScopeReader.Captures;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Tests;

/// <summary>What a capture cannot support gets a reason and no number.</summary>
public class RefusalTests
{
    private static ChannelMeasurement Measure(Waveform waveform) =>
        Analysis.Measure(new Capture("made.csv", "", [waveform], []), Plan.Empty).Channels[0];

    private static Waveform Of(double[] samples, double interval = 1e-8) => new("A", "V", new TimeAxis(0, interval, AxisSource.Column), samples);

    private static string Reason(ChannelMeasurement channel, Quantity quantity)
    {
        Assert.DoesNotContain(channel.Readings, r => r.Quantity == quantity);
        return Assert.Single(channel.NotMeasured, n => n.Quantity == quantity).Reason;
    }

    [Theory]
    [InlineData(1e-200, 1e-8)]
    [InlineData(1e200, 1e-8)]
    [InlineData(1, 1e-290)]
    public void Values_that_no_bench_has_are_refused(double scale, double interval)
    {
        double[] samples = [.. Enumerable.Range(0, 1000).Select(i => scale * (i / 50 % 2))];

        Assert.Equal("values or times lie beyond anything a bench can have; check the file's units and the plan's scale",
            Reason(Measure(Of(samples, interval)), Quantities.Frequency));
    }

    [Fact]
    public void A_flat_record_has_no_mean_with_an_uncertainty() =>
        Assert.Equal("every sample is 1.500 V: how fine the converter's steps are does not show, and so no uncertainty can be stated",
            Reason(Measure(Of([.. Enumerable.Repeat(1.5, 100)])), Quantities.Mean));

    [Theory]
    [InlineData(1)]
    [InlineData(12)]
    [InlineData(15)]
    public void An_edge_shorter_than_two_sample_intervals_is_refused(double nanoseconds)
    {
        PeriodicSignal wave = new SquareWave { RiseTime = nanoseconds * 1e-9, FallTime = nanoseconds * 1e-9 }.Signal;
        ChannelMeasurement channel = Measure(new Recording { Interval = 1e-8, Count = 20_000, Noise = 0.003 }.Take(wave));

        Assert.Matches("^the edge takes fewer than two sample intervals, at most 20\\.0 ns: its course shows in no sample; sample at [2-4]00 MHz or faster, "
            + "or take 500 edges or more at a rate that is no multiple of the wave's$", Reason(channel, Quantities.RiseTime));
        Assert.DoesNotContain(channel.Findings, f => f.Code == "edge-shape");
    }

    [Fact]
    public void Many_edges_that_come_evenly_show_what_none_does()
    {
        // 1.2 sample intervals, 600 edges, 219.78 samples a cycle: the place between samples wraps 60 times.
        PeriodicSignal wave = new SquareWave { RiseTime = 12e-9, FallTime = 12e-9 }.Signal;
        ChannelMeasurement channel = Measure(new Recording { Interval = 1e-8, Count = 66_000, Noise = 0.01 }.Take(wave));

        Reading rise = channel.Primary(Quantities.RiseTime)!;
        // Four standard uncertainties, which the simulated table bears out.
        Assert.Equal(12e-9, rise.Value, 4 * rise.Budget.StandardUncertainty);
        Assert.InRange(rise.Budget.ExpandedUncertainty, 0, 0.05 * 12e-9);
        Assert.Contains("edges folded on the period, and holds if they are alike and come evenly", channel.Findings.First(f => f.Code == "equivalent-time").Text, StringComparison.Ordinal);
    }
}
