using ScopeReader.Captures;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Ringing;

/// <summary>What oscillates, by what was made; the whole confusion matrix is printed by tools/Coverage --table kinds.</summary>
public class KindOfRingingTests
{
    private const double Ring = 0.08, Repetition = 0.002;

    // 20 cycles of the ringing a level, 30 edges, noise 20 dB below the ringing's amplitude.
    private static ChannelMeasurement Measure(bool rings = false, Func<int, bool, double>? added = null, double periods = 15.3, double noise = 0.014)
    {
        var resonance = new Resonance(Ring, 0.04);
        var wave = new SquareWave
        {
            Frequency = Repetition,
            RiseTime = 5,
            Resonance = rings ? resonance with { Share = 0.2 / resonance.Ringing(5 / SquareWave.RiseTimeOverSigma).Magnitude } : null,
        };
        double[] samples = new Recording { Interval = 1, Count = (int)(periods / Repetition), Delay = 100, Noise = noise, Seed = 9 }.Samples(wave.Signal);
        for (int i = 0; i < samples.Length; i++)
            samples[i] += added?.Invoke(i, (i + 100) * Repetition % 1 < 0.5) ?? 0;
        return Analysis.Measure(new Capture("made.csv", "", [new Waveform("A", "V", new TimeAxis(0, 1e-9, AxisSource.Column), samples)], []), Plan.Empty).Channels[0];
    }

    private static Finding Kind(ChannelMeasurement channel) => Assert.Single(channel.Findings, f => f.Code == "ringing-kind");

    private static double Tone(int i, double frequency = 0.0813) => 0.2 * Math.Cos(2 * Math.PI * frequency * i + 1);

    [Fact]
    public void Clean_edges_have_none()
    {
        ChannelMeasurement channel = Measure();
        Assert.Equal("none", Kind(channel).Value);
        Assert.Contains(channel.NotMeasured, n => n.Quantity == Quantities.OscillationFrequency && n.Code == "no-oscillation");
    }

    [Fact]
    public void Ringing_comes_with_the_edges()
    {
        Finding kind = Kind(Measure(rings: true));
        Assert.Equal(("edge-excited", null, null), (kind.Value, kind.Level, kind.Locked));
        // One polarity's edges, of 15 periods of which the shortest do not count.
        Assert.Matches(@"^ringing starts at each edge and dies away: it is not an oscillation of its own\. After 1\d edges its phase is the same \(resultant (0\.99|1\.00), "
            + @"by chance under one in a million\), and before the next edge its envelope is down to \d+(\.\d)? %\.$", kind.Text);
    }

    [Theory]
    [InlineData(0.0813, false)]
    // The 40th harmonic of the wave: every edge finds it in the same phase.
    [InlineData(0.08, true)]
    public void An_oscillation_of_its_own_is_told_with_frequency_and_level(double frequency, bool locked)
    {
        ChannelMeasurement channel = Measure(added: (i, _) => Tone(i, frequency));
        Finding kind = Kind(channel);
        Assert.Equal(("free-running", "both", locked), (kind.Value, kind.Level, kind.Locked));
        Reading f = channel.Primary(Quantities.OscillationFrequency)!, level = channel.Primary(Quantities.OscillationLevel)!;
        // Four standard uncertainties: one test in 16,000 would be beyond.
        Assert.Equal(frequency * 1e9, f.Value, 4 * f.Budget.StandardUncertainty);
        Assert.Equal(0.2 / Math.Sqrt(2), level.Value, 4 * level.Budget.StandardUncertainty);
        Assert.InRange(level.Budget.StandardUncertainty, 1e-5, 0.01 * level.Value);
        Assert.Equal("what oscillates after the edges is not started by them", channel.NotMeasured.First(n => n.Quantity == Quantities.RingingQ).Reason);
    }

    [Theory]
    [InlineData(true, "high")]
    [InlineData(false, "low")]
    public void An_oscillation_on_one_level_is_told_apart(bool onHigh, string level)
    {
        Finding kind = Kind(Measure(added: (i, high) => high == onHigh ? Tone(i) : 0));
        Assert.Equal(("free-running", level), (kind.Value, kind.Level));
        Assert.Contains($"on the {level} level only", kind.Text, StringComparison.Ordinal);
    }

    [Fact]
    public void An_oscillation_that_starts_anew_on_each_level_is_no_noise()
    {
        var random = new NormalNoise(4);
        bool before = false;
        double phase = 0;
        Finding kind = Kind(Measure(added: (i, high) =>
        {
            if (high != before)
                (before, phase) = (high, random.Uniform());
            return 0.2 * Math.Cos(2 * Math.PI * (0.0813 * i + phase));
        }));
        Assert.Equal("free-running", kind.Value);
        Assert.Contains("It starts anew on each level, in no fixed phase.", kind.Text, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(0.0813)]
    [InlineData(0.08)]
    public void Both_are_told_from_either(double frequency) => Assert.Equal("both", Kind(Measure(rings: true, added: (i, _) => Tone(i, frequency))).Value);

    [Fact]
    public void Noise_of_a_narrow_band_is_neither()
    {
        // Two poles at the ringing's frequency, Q = 10.
        double radius = Math.Exp(-Math.PI * Ring / 10), a = 2 * radius * Math.Cos(2 * Math.PI * Ring), before = 0, last = 0;
        var random = new NormalNoise(5);
        Finding kind = Kind(Measure(added: (_, _) =>
        {
            (before, last) = (last, a * last - radius * radius * before + 0.02 * random.Normal());
            return last;
        }));
        Assert.Equal("noise", kind.Value);
    }

    [Fact]
    public void Four_edges_give_a_reason_and_no_kind()
    {
        ChannelMeasurement channel = Measure(rings: true, periods: 2.1);
        Assert.DoesNotContain(channel.Findings, f => f.Code == "ringing-kind");
        Assert.Equal("whether an oscillation comes with the edges or is there by itself shows from 5 edges on, and the record holds 4; take a longer record",
            channel.NotMeasured.Single(n => n.Quantity == Quantities.OscillationFrequency).Reason);
    }
}
