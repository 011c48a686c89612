using ScopeReader.Edges;

namespace ScopeReader.Tests.Edges;

public class RuntTests
{
    // Ten pulses of 20 samples high and 20 low, straight from 0 to 1, with a shape put over some samples.
    private static double[] Pulses(params (int At, double Value)[] changes)
    {
        double[] samples = [.. Enumerable.Range(0, 400).Select(i => i / 20 % 2 == 1 ? 1.0 : 0)];
        foreach (var (at, value) in changes)
            samples[at] = value;
        return samples;
    }

    private static IReadOnlyList<Runt> Find(double[] samples) => Runt.Find(samples, 0, 1, 0.01, Transitions.Find(samples, 0, 1, 0.01));

    [Fact]
    public void A_pulse_that_turns_back_is_one() =>
        Assert.Equal([new Runt(91, false, 0.6)], Find(Pulses((90, 0.4), (91, 0.6), (92, 0.35))));

    [Fact]
    public void A_dip_of_the_high_state_is_one() => Assert.Equal([new Runt(70, true, 0.55)], Find(Pulses((70, 0.45))));

    [Fact]
    public void A_pulse_that_reaches_the_other_state_is_none() => Assert.Empty(Find(Pulses((90, 0.5), (91, 0.95), (92, 0.5))));

    [Fact]
    public void What_stays_on_its_own_side_is_none() => Assert.Empty(Find(Pulses((90, 0.25), (70, 0.75))));

    [Fact]
    public void What_every_edge_has_after_it_is_ringing() =>
        Assert.Empty(Find(Pulses([.. Enumerable.Range(0, 10).Select(k => (43 + 40 * (k % 9), 0.4))])));
}
