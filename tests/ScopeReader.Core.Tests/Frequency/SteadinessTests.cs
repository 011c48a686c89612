using ScopeReader.Readings;
using ScopeReader.Signals;
using static ScopeReader.Tests.Waves;

namespace ScopeReader.Tests.Frequency;

/// <summary>Records that are not one steady tone must not get the narrow interval of one.</summary>
public class SteadinessTests
{
    private const int Count = 20000;
    private const double F = 1 / 97.3, Turn = 2 * Math.PI;

    // What each wave is by construction; t runs from 0 to 1 over the record.
    private static ChannelMeasurement Made(string wave, double noise = 0.01)
    {
        var random = new NormalNoise(5);
        return Measure(Of(Count, i =>
        {
            double t = (double)i / Count, phase = Turn * F * i;
            return noise * random.Normal() + wave switch
            {
                "steady" => Math.Sin(phase),
                "steady square" => Math.Sin(phase) > 0 ? 1 : 0,
                "drift of 100 ppm" => Math.Sin(Turn * F * Count * (t + 100e-6 * (t * t - t) / 2)),
                "sweep over 10 %" => Math.Sin(Turn * F * Count * (t + 0.1 * (t * t - t) / 2)),
                "sweep over an octave" => Math.Sin(Turn * F * Count * (t + 0.67 * (t * t - t) / 2)),
                "two tones alike" => Math.Sin(phase) + Math.Sin(1.137 * phase),
                "two tones 10 dB apart" => Math.Sin(phase) + 0.3 * Math.Sin(1.137 * phase),
                "spur of -30 dB" => Math.Sin(phase) + 0.0316 * Math.Sin(3.37 * phase),
                "slow AM" => (1 + 0.5 * Math.Sin(Turn * 3.3 * t)) * Math.Sin(phase),
                "fast AM" => (1 + 0.3 * Math.Sin(Turn * 61.3 * t)) * Math.Sin(phase),
                "FM" => Math.Sin(phase + 0.05 * Math.Sin(Turn * 5 * t)),
                "burst" => t is > 0.3 and < 0.75 ? Math.Sin(phase) : 0,
                "gated clock" => t is > 0.3 and < 0.75 && Math.Sin(phase) > 0 ? 1 : 0,
                _ => throw new ArgumentException(wave),
            };
        }, 1));
    }

    [Theory]
    [InlineData("drift of 100 ppm", "drifting")]
    [InlineData("two tones 10 dB apart", "second-tone")]
    [InlineData("spur of -30 dB", "second-tone")]
    [InlineData("slow AM", "amplitude-modulated")]
    [InlineData("fast AM", "modulated")]
    [InlineData("FM", "phase-modulated")]
    [InlineData("burst", "interrupted")]
    [InlineData("gated clock", "interrupted")]
    public void What_is_not_one_steady_tone_is_found(string wave, string kind) =>
        Assert.Equal(kind, Made(wave).Findings.Single(f => f.Code == "not-one-steady-tone").Value);

    [Theory]
    [InlineData("sweep over 10 %")]
    [InlineData("sweep over an octave")]
    [InlineData("two tones alike")]
    public void What_has_no_one_frequency_is_refused(string wave)
    {
        ChannelMeasurement measured = Made(wave);

        Assert.DoesNotContain(measured.Readings, r => r.Quantity == Quantities.Frequency || r.Quantity == Quantities.Period);
        Assert.StartsWith("the record is not one steady tone: ", measured.Reason(Quantities.Frequency), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("steady")]
    [InlineData("steady square")]
    public void A_steady_wave_is_left_in_peace(string wave) => Assert.DoesNotContain(Made(wave).Findings, f => f.Code == "not-one-steady-tone");

    // Closed form: a sweep over s of f has parts that lie up to s/2 from the mean, and the interval must hold them (less an
    // eighth of the record, over which a part's frequency is taken).
    [Fact]
    public void The_interval_of_a_drifting_source_holds_the_drift()
    {
        Reading reading = Made("drift of 100 ppm").Reading(Quantities.Frequency);

        Assert.Equal(F, reading.Value, 2e-6 * F);
        Assert.InRange(reading.Budget.ExpandedUncertainty / F, 40e-6, 60e-6);
    }

    // A tone of ratio r moves the frequency by 6 asin(r)/(2π·πd) cycles a record at most, d its distance in cycles a record: r = 0.3, d = 28.2.
    [Fact]
    public void A_second_tone_widens_by_what_it_can_pull()
    {
        Reading reading = Made("two tones 10 dB apart").Reading(Quantities.Frequency);
        double d = 0.137 * F * Count, most = 6 * Math.Asin(0.3) / (Turn * Math.PI * d) / Count;

        // Tolerance: the ratio is read off noisy bins, to 5 %.
        Assert.Equal(most, reading.Budget.Terms.Single(t => t.Name == "unsteadiness").Contribution * Math.Sqrt(3), 0.05 * most);
        Assert.InRange(reading.Value - F, -most, most);
    }

    // Noise about a level between two codes looks like two states and is none.
    [Theory]
    [InlineData(0.1, 0)]
    [InlineData(0.15, 0)]
    [InlineData(0.05, 0.9)]
    public void Noise_on_a_few_codes_is_no_logic_signal(double noise, double memory)
    {
        var random = new NormalNoise(5);
        double wander = 0;
        ChannelMeasurement measured = Measure(Of(Count, _ =>
        {
            wander = memory * wander + noise * random.Normal();
            return Math.Round((0.3 + wander) / 0.25) * 0.25;
        }));

        Assert.DoesNotContain(measured.Readings, r => r.Quantity == Quantities.Amplitude || r.Quantity == Quantities.Frequency);
    }

    [Theory]
    [InlineData(8)]
    [InlineData(97.3)]
    public void A_logic_signal_of_two_values_is_one(double samplesPerCycle) =>
        Assert.Equal(1, Measure(Of(Count, i => i % samplesPerCycle < samplesPerCycle / 2 ? 1 : 0)).Reading(Quantities.Amplitude).Value, 1e-12);
}
