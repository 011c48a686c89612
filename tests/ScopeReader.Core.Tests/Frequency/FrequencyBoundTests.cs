using ScopeReader.Readings;
using ScopeReader.Signals;
using static ScopeReader.Tests.Waves;

namespace ScopeReader.Tests.Frequency;

/// <summary>The primary frequency against the Cramér-Rao bound: a tenth of the runs of <c>tools/Coverage --table bound</c>.</summary>
public class FrequencyBoundTests
{
    private const int Runs = 200;

    // B01: A = 1, σ = 0.01, N = 1000: 2.46561900905581e-7 cycles per sample (Rife and Boorstyn 1974, real form). Tolerance: the row's.
    [Fact]
    public void The_bound_is_the_published_one() => Assert.Equal(2.46561900905581e-7, new FrequencyTrial(new HarmonicSine { Frequency = 0.0531 }.Build(), 1000, 0.01).Bound, 4.93e-9);

    // Asked for: at most 1.10 times the bound for a sine of 10 cycles and more at 20 to 60 dB, bias under a tenth of u.
    // Tolerance: three standard errors of the simulation on either.
    [Theory]
    [InlineData(5.3, 53, 20)]
    [InlineData(5.3, 53, 60)]
    [InlineData(20.7, 207, 20)]
    [InlineData(20.7, 2000, 40)]
    [InlineData(50.001, 501, 60)]
    [InlineData(97.3, 973, 40)]
    public void A_sine_is_read_to_the_bound(double samplesPerCycle, int count, double decibels) =>
        Check(FrequencyTrial.Sine(samplesPerCycle, count, decibels).Run(Runs), 1.10);

    // Asked for: at most 1.25 times for a band-limited square wave of two samples or more on the edge.
    [Theory]
    [InlineData(20.7, 2, 2000, 40)]
    [InlineData(20.7, 4, 2000, 20)]
    [InlineData(50.001, 4, 2000, 60)]
    [InlineData(97.3, 4, 4000, 40)]
    public void A_square_wave_is_read_near_the_bound(double samplesPerCycle, double edge, int count, double decibels) =>
        Check(FrequencyTrial.Square(samplesPerCycle, edge, count, decibels).Run(Runs), 1.25);

    private static void Check(FrequencyTally tally, double most)
    {
        Assert.Equal(0, tally.Refused);
        Assert.InRange(tally.Ratio, 0.5, most + 3 * tally.RatioError);
        Assert.InRange(tally.BiasShare, 0, 0.1 + 3 * tally.RootMeanSquare / tally.Stated / Math.Sqrt(tally.Runs));
        // 93 % asked for; so many runs know a share of 95 % to √(0.95·0.05/n).
        Assert.InRange(tally.Cover, 0.93 - 3 * Math.Sqrt(0.0475 / tally.Runs), 1);
    }

    // Asked for: within 1e-9 relative, noise-free, for a sine of 1,000 cycles.
    [Fact]
    public void A_sine_of_a_thousand_cycles_without_noise_is_read_exactly()
    {
        double f = 1 / 20.7;
        Reading reading = Measure(Of(20_700, i => Math.Sin(2 * Math.PI * f * i + 0.4), 1)).Reading(Quantities.Frequency);

        Assert.Equal("sine-fit", reading.Method);
        Assert.Equal(1, reading.Value / f, 1e-9);
    }

    // Records too long for the joint fit go by the template on parts, and stay near the bound.
    [Fact]
    public void A_long_record_is_read_near_the_bound_too() => Check(FrequencyTrial.Square(20.7, 4, 250_000, 40).Run(20), 1.25);
}
