using ScopeReader.Edges;
using ScopeReader.Signals;
using static ScopeReader.Tests.Waves;

namespace ScopeReader.Tests.Edges;

public class TransitionsTests
{
    // Closed form: the straight line from 0 to 1 between samples 2 and 3 passes 0.5 half-way.
    [Fact]
    public void The_instant_is_on_the_straight_line_between_two_samples() =>
        Assert.Equal([new Transition(true, 2, 2.5), new Transition(false, 4, 4.5)], Transitions.Find([0, 0, 0, 1, 1, 0, 0], 0, 1, 0));

    [Fact]
    public void A_sample_on_the_level_itself_starts_the_interval() =>
        Assert.Equal([new Transition(true, 2, 2)], Transitions.Find([0, 0, 0.5, 1, 1], 0, 1, 0));

    // By definition: first crossing at 1.5, last at 3.5.
    [Fact]
    public void Of_several_crossings_inside_a_passage_it_is_the_mean_of_first_and_last() =>
        Assert.Equal(2.5, Transitions.Find([0, 0.4, 0.6, 0.4, 0.6, 1], 0, 1, 0).Single().Instant, 1e-12);

    [Fact]
    public void A_runt_is_no_passage() => Assert.Empty(Transitions.Find([0, 0.3, 0.6, 0.3, 0, 0], 0, 1, 0));

    // Source: the made wave has two edges a cycle. 500 samples a cycle with σ = 5 % of amplitude give four times as many without hysteresis.
    [Theory]
    [InlineData(20.7)]
    [InlineData(500)]
    public void Noise_makes_no_extra_edges(double samplesPerCycle)
    {
        var noise = new NormalNoise(2);
        double[] samples = [.. Enumerable.Range(0, 50000).Select(i => Math.Sin(2 * Math.PI * (i + 0.25) / samplesPerCycle) + 0.05 * noise.Normal())];

        // Tolerance: one edge at either end may be cut off.
        Assert.Equal(2 * 50000 / samplesPerCycle, Transitions.Find(samples, -1, 1, 0.05).Count, 1.0);
    }

    [Fact]
    public void Ringing_makes_no_extra_edges()
    {
        var wave = new SquareWave { Resonance = new Resonance(8e6, 0.05) };

        Assert.Equal(2 * 10000 / 275.1, Transitions.Find(Square(275.1, 10000, wave: wave).Samples, 0, 1, 0.01).Count, 1.0);
    }

    [Fact]
    public void Levels_the_wrong_way_round_are_a_mistake_of_the_caller() =>
        Assert.Throws<ArgumentException>(() => Transitions.Find([0, 1], 1, 0, 0));
}
