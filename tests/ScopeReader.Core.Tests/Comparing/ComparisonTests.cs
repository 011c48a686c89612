using ScopeReader.Captures;
using ScopeReader.Comparing;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Comparing;

public class ComparisonTests
{
    private static readonly Waveform Wave = new("Node", "V", new TimeAxis(0, 1e-8, AxisSource.Column), [0, 1, 0, 1]);

    private static Reading Rise(double value, double noise = 0.1, double timebase = 0.3, params string[] missing) =>
        new(Quantities.RiseTime, value, "s", new Budget([BudgetTerm.Normal("noise", noise), BudgetTerm.Rectangular("timebase", timebase, ofChain: true)], missing), "averaged-edge");

    private static Measurement Of(string file, params Reading[] readings) => Of(file, "Node", readings);

    private static Measurement Of(string file, string channel, params Reading[] readings)
    {
        var wave = new Waveform(channel, "V", Wave.Axis, Wave.Samples.ToArray());
        return new Measurement(new Capture(file, "", [wave], []), [new ChannelMeasurement(wave, readings, [], [], [])], [], Outcome.Unjudged);
    }

    private static ComparedSide Side(params Measurement[] captures) => new(captures);

    [Fact]
    public void Captures_of_one_chain_differ_by_their_own_noise_alone()
    {
        Difference d = Assert.Single(Comparison.Of(Side(Of("a", Rise(10))), [Side(Of("b", Rise(10.3)))]).Differences);
        Assert.Equal((10, 10.3), (d.Reference, d.Value));
        Assert.Equal(0.3, d.Change, 1e-12);
        // JCGM 100 eq. (10): √(0.1² + 0.1²), and 1.96 of it for a normal distribution.
        Assert.Equal(0.1 * Math.Sqrt(2), d.Budget.StandardUncertainty, 1e-12);
        Assert.Equal(1.959964 * 0.1 * Math.Sqrt(2), d.Budget.ExpandedUncertainty, 1e-5);
        Assert.True(d.IsSignificant);
    }

    [Fact]
    public void Captures_of_two_chains_have_both_chains_errors()
    {
        Difference d = Assert.Single(Comparison.Of(Side(Of("a", Rise(10))), [Side(Of("b", Rise(10.3)))], isSameChain: false).Differences);
        // Two rectangles of half-width 0.3 have a variance of 0.03 each, and 0.01 each of noise.
        Assert.Equal(Math.Sqrt(0.08), d.Budget.StandardUncertainty, 1e-12);
        Assert.False(d.IsSignificant);
    }

    [Fact]
    public void With_an_unstated_term_of_another_chain_nobody_can_tell()
    {
        ComparedSide a = Side(Of("a", Rise(10, 0.1, 0, "timebase"))), b = Side(Of("b", Rise(99, 0.1, 0, "timebase")));
        Assert.Null(Assert.Single(Comparison.Of(a, [b], isSameChain: false).Differences).IsSignificant);
        Assert.True(Assert.Single(Comparison.Of(a, [b]).Differences).IsSignificant);
    }

    [Fact]
    public void Repeats_bring_their_scatter_and_their_few_degrees_of_freedom()
    {
        Difference d = Assert.Single(Comparison.Of(Side(Of("a1", Rise(1)), Of("a2", Rise(2)), Of("a3", Rise(3))), [Side(Of("b1", Rise(4)), Of("b2", Rise(6)))]).Differences);
        Assert.Equal((2, 5, 3, 2), (d.Reference, d.Value, d.ReferenceCount, d.Count));
        // By hand: s² = 1 of three and 2 of two, so u² = 1/3 + 2/2 = 4/3. Welch and Satterthwaite, JCGM 100 eq. (G.2b):
        // (4/3)²/((1/3)²/2 + 1²/1) = 1.6842.
        Assert.Equal(Math.Sqrt(4.0 / 3), d.Budget.StandardUncertainty, 1e-12);
        Assert.Equal(1.6842, d.Budget.DegreesOfFreedom!.Value, 1e-4);
        Assert.False(d.IsSignificant);
    }

    [Fact]
    public void A_single_capture_beside_repeats_is_taken_to_scatter_as_they_do()
    {
        Difference d = Assert.Single(Comparison.Of(Side(Of("a1", Rise(1)), Of("a2", Rise(2)), Of("a3", Rise(3))), [Side(Of("b", Rise(5)))]).Differences);
        // s = 1: √(1/3 + 1).
        Assert.Equal(Math.Sqrt(4.0 / 3), d.Budget.StandardUncertainty, 1e-12);
    }

    [Fact]
    public void Channels_of_different_names_pair_where_each_is_the_only_one()
    {
        Assert.Single(Comparison.Of(Side(Of("a", "Node", Rise(1))), [Side(Of("b", "Input 2", Rise(1)))]).Differences);
        Comparison comparison = Comparison.Of(Side(Of("a", "Node", Rise(1))), [Side(Spectrum("b"))]);
        Assert.Empty(comparison.Differences);
        Assert.Equal("Node of a has no counterpart of its name and kind in b", Assert.Single(comparison.Findings, f => f.Code == "channel-alone").Text);
    }

    [Fact]
    public void What_one_side_lacks_is_named_with_its_reason()
    {
        Measurement without = Of("b");
        without = without with { Channels = [without.Channels[0] with { NotMeasured = [new NotMeasured(Quantities.RiseTime, "no-edge", "the record holds no rising edge")] }] };
        OneSided one = Assert.Single(Comparison.Of(Side(Of("a", Rise(1))), [Side(without)]).OneSided);
        Assert.Equal(("b", "the record holds no rising edge"), (one.File, one.Why!.Reason));
    }

    [Theory]
    [InlineData(1, 1, "a marked quantity differs by more than the noise of these two captures; probe placement is not included. Take the probe off, put it back and capture again; give such repeats with --with. The chain's own errors are shared and cancel.")]
    [InlineData(3, 2, "reproducibility of 3 and 2 captures is in the differences: probe placement is included as far as the probe was put back between them. The chain's own errors are shared and cancel.")]
    public void The_scope_says_what_is_included(int before, int after, string text)
    {
        Measurement[] Repeat(int n) => [.. Enumerable.Range(1, n).Select(i => Of($"{i}", Rise(i)))];
        Assert.Equal(text, Comparison.Of(Side(Repeat(before)), [Side(Repeat(after))]).Findings[^1].Text);
    }

    [Fact]
    public void One_wave_taken_at_two_sampling_phases_lies_on_itself()
    {
        // Edges of four samples, 50 of them: a phase of half a sample would show as 13 % of the step on the slope.
        var wave = new SquareWave { Frequency = 503.46e3, High = 2, RiseTime = 40e-9, Resonance = new Resonance(9e6, 0.12, 0.4) };
        Measurement Take(string file, double delay)
        {
            Waveform taken = new Recording { Interval = 1e-8, Count = 20_000, Delay = delay, Noise = 2e-4, Seed = 5 + (ulong)(1e9 * delay) }.Take(wave.Signal);
            return Analysis.Measure(new Capture(file, "", [taken], []), Plan.Empty);
        }
        Comparison comparison = Comparison.Of(Side(Take("a", 0)), [Side(Take("b", 5e-9))]);
        Overlay rising = comparison.Overlays[0];
        Assert.Equal(("rising edge, from the 50 % instant", "s", "V"), (rising.Title, rising.XUnit, rising.YUnit));
        // The resampled curves hold noise of 2e-4/√(a few dozen samples a point) and the straight line's bend over one step,
        // 2 ns of 40: 0.03 % of the step. 0.5 % of it is far above both, and far below half a sample on the slope.
        for (int i = 0; i < rising.Reference.Count; i++)
            Assert.Equal(rising.Reference[i], rising.Compared[i], 0.01);
        // 50 % of the step at the time of 0: by definition of the alignment, to a step of the grid.
        int middle = (int)Math.Round(-rising.Start / rising.Step);
        Assert.Equal(1, rising.Reference[middle], 2 * rising.Step / 40e-9);
    }

    [Fact]
    public void Spectra_show_a_line_at_its_frequency_and_level()
    {
        Measurement Take(double amplitude)
        {
            var sine = new HarmonicSine { Frequency = 455e3, Amplitude = amplitude };
            Waveform taken = new Recording { Interval = 8e-9, Count = 50_000, Noise = 1e-4 }.Take(sine.Build());
            return Analysis.Measure(new Capture("sine", "", [taken], []), Plan.Empty);
        }
        Overlay spectrum = Assert.Single(Comparison.Of(Side(Take(1)), [Side(Take(0.5))]).Overlays);
        int highest = 0;
        for (int i = 0; i < spectrum.Reference.Count; i++)
            highest = spectrum.Reference[i] > spectrum.Reference[highest] ? i : highest;
        // A cell is a 400th of 12 harmonics: 14 kHz. 1 V of amplitude is -3.01 dBV rms; a Hann window reads up to 1.42 dB low
        // half a bin off a line (Harris 1978, from memory).
        Assert.Equal(455e3, spectrum.Start + highest * spectrum.Step, spectrum.Step);
        Assert.InRange(spectrum.Reference[highest], -3.02 - 1.43, -3.0);
        Assert.Equal(-6.02, spectrum.Compared[highest] - spectrum.Reference[highest], 0.02);
    }

    private static Measurement Spectrum(string file)
    {
        var trace = new SpectrumTrace("Level", "dBm", [1e6, 2e6, 3e6], [-50, -10, -50]);
        return new Measurement(new Capture(file, "", [trace], []), [new ChannelMeasurement(trace, [], [], [], [])], [], Outcome.Unjudged);
    }
}
