using ScopeReader.Levels;
using ScopeReader.Readings;
using ScopeReader.Signals;
using static ScopeReader.Tests.Waves;

namespace ScopeReader.Tests.Levels;

public class FitnessFindingsTests
{
    private static string Text(ChannelMeasurement measured, string code) => measured.Findings.Single(f => f.Code == code).Text;

    [Fact]
    public void Few_samples_on_an_edge_ask_for_a_faster_rate() =>
        Assert.StartsWith("2.", Text(Measure(Square(50.37, 10000, 0.001, new SquareWave { RiseTime = 2.4 / 455e3 / 50.37 })), "few-samples-per-edge"), StringComparison.Ordinal);

    [Fact]
    public void Edges_between_two_samples_are_said_to_be_so() =>
        Assert.StartsWith("the edges fall between two samples", Text(Measure(Square(50.37, 10000, 0.001, new SquareWave { RiseTime = 0.5 / 455e3 / 50.37 })), "few-samples-per-edge"), StringComparison.Ordinal);

    [Fact]
    public void A_sine_near_half_the_sample_rate_may_be_an_alias()
    {
        var noise = new NormalNoise(1);
        Assert.StartsWith("2.70 samples per cycle: ", Text(Measure(Of(20000, i => Math.Sin(2 * Math.PI * i / 2.7) + 0.01 * noise.Normal())), "aliasing-doubt"), StringComparison.Ordinal);
    }

    // A converter of 8 bits over 40 V shows 1 V in 6.4 steps.
    [Fact]
    public void A_wave_of_few_codes_asks_for_a_smaller_range() =>
        Assert.StartsWith("the values take 7 steps of 156 mV", Text(Measure(Square(97.3, 20000, converter: new Converter(8, -20, 20))), "few-codes"), StringComparison.Ordinal);

    // The same with the plan's bits: of 256 codes, and the range could be 30 times smaller (a fifth kept in hand).
    [Fact]
    public void The_plans_bits_say_how_much_of_the_range_is_used() =>
        Assert.Equal("the wave spans 7 of the 256 codes that 8 bits have; a vertical range 30 times smaller would show as many times more of it",
            Text(Measure(Square(97.3, 20000, converter: new Converter(8, -20, 20)), new Plan { Chain = Exact with { Bits = 8 } }), "few-codes"));

    [Fact]
    public void More_codes_than_the_plans_bits_have_are_doubted() =>
        Assert.StartsWith("the values span ", Text(Measure(Square(97.3, 20000, 0.01, converter: new Converter(12, -0.5, 1.5)), new Plan { Chain = Exact with { Bits = 8 } }), "bits-doubt"), StringComparison.Ordinal);

    [Theory]
    [InlineData(0, 33)]
    [InlineData(2, 3)]
    public void Levels_that_belong_to_another_wave_are_not_used(double low, double high)
    {
        Plan plan = new() { Chain = Exact, Levels = LevelSettings.Default with { Low = low, High = high } };
        ChannelMeasurement measured = Measure(Square(97.3, 20000, 0.01), plan), own = Measure(Square(97.3, 20000, 0.01));

        Assert.Contains("do not belong to this wave, whose states lie at", Text(measured, "levels-off-the-wave"), StringComparison.Ordinal);
        Assert.Equal(own.Reading(Quantities.RiseTime).Value, measured.Reading(Quantities.RiseTime).Value, 1e-15);
    }

    [Fact]
    public void Levels_near_the_waves_own_are_used() =>
        Assert.DoesNotContain(Measure(Square(97.3, 20000, 0.01), new Plan { Chain = Exact, Levels = LevelSettings.Default with { Low = 0.05, High = 1.1 } }).Findings, f => f.Code == "levels-off-the-wave");
}
