using ScopeReader.Ringing;

namespace ScopeReader.Tests.Ringing;

/// <summary>Closed forms of the second-order response, held against rows that were computed from sampled responses and root searches.</summary>
public class SecondOrderTests
{
    // The rows are printed with 15 digits: what is left is the rounding of a few operations.
    private const double Printed = 1e-12;

    [Theory]
    [InlineData(0.05, 85.4467893006756)] // D01, closed form and sampled step
    [InlineData(0.1, 72.9247614287671)] // D02
    [InlineData(0.2, 52.6620599330303)] // D03
    [InlineData(0.5, 16.303353482158)] // D04
    [InlineData(0.7071067811865476, 4.32139182637722)] // D05
    public void Overshoot_follows_from_the_damping_ratio(double dampingRatio, double percent) =>
        Assert.Equal(percent, 100 * SecondOrder.Overshoot(dampingRatio), percent * Printed);

    // D06: inverse by root search.
    [Fact]
    public void Damping_ratio_follows_from_overshoot() =>
        Assert.Equal(0.403712751943421, SecondOrder.DampingRatioOf(0.25), Printed);

    // D07: largest value of the sampled response; D07's own tolerance, a step of that search.
    [Fact]
    public void First_peak_comes_after_half_a_damped_cycle() =>
        Assert.Equal(3.62759872846844, SecondOrder.PeakTime(0.5, 1), 1e-4);

    // D08, D09: closed form.
    [Fact]
    public void Successive_peaks_fall_by_the_logarithmic_decrement()
    {
        Assert.Equal(0.631483883399655, SecondOrder.LogarithmicDecrement(0.1), Printed);
        Assert.Equal(1.88039880262149, Math.Exp(SecondOrder.LogarithmicDecrement(0.1)), 2 * Printed);
    }

    // D10 and D38: 1/(2ζ), and Q/π cycles to 1/e for Q = 10.
    [Fact]
    public void Quality_counts_the_cycles_of_the_decay()
    {
        Assert.Equal(5, SecondOrder.Quality(0.1), Printed);
        Assert.Equal(3.18309886183791, SecondOrder.CyclesToDecay(10), 5 * Printed);
    }

    // D11: closed form.
    [Fact]
    public void Envelope_settles_later_than_the_response() =>
        Assert.Equal(8.11172808330807, SecondOrder.SettlingEnvelope(0.5, 1, 0.02), 10 * Printed);

    // D51: 50 MHz and 1e8 1/s, closed form.
    [Fact]
    public void Undamped_frequency_is_above_the_one_that_rings() =>
        Assert.Equal(52.4719254373788e6, SecondOrder.UndampedFrequency(50e6, 1e8), 52e6 * Printed);

    // Definition: a pair of poles at ω_n (-ζ ± j√(1−ζ²)) decays at ζω_n and rings at ω_n√(1−ζ²).
    [Theory]
    [InlineData(0.02)]
    [InlineData(0.4)]
    public void Damping_ratio_of_a_pole_pair_is_its_own(double dampingRatio) =>
        Assert.Equal(dampingRatio, SecondOrder.DampingRatio(1e6 * Math.Sqrt(1 - dampingRatio * dampingRatio), 2 * Math.PI * 1e6 * dampingRatio), Printed);
}
