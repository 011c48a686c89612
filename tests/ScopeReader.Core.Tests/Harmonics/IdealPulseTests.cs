using ScopeReader.Harmonics;

namespace ScopeReader.Tests.Harmonics;

public class IdealPulseTests
{
    // Tolerances are the rows' own.
    [Theory]
    [InlineData(0.5, 3, -9.54242509439325)] // E01, closed form
    [InlineData(0.5, 5, -13.9794000867204)] // E02
    [InlineData(0.5, 7, -16.9019608002851)] // E03
    [InlineData(0.5, 9, -19.0848501887865)] // E04
    [InlineData(0.25, 2, -3.01029995663981)] // E05
    [InlineData(0.25, 3, -9.54242509439325)] // E06
    [InlineData(0.51, 2, -30.0584313647016)] // E07
    public void Rectangular_wave_has_the_harmonics_of_its_series(double duty, int harmonic, double expected) =>
        Assert.Equal(expected, IdealPulse.LevelDbc(duty, harmonic), 1e-5);

    [Fact]
    public void Second_harmonic_of_40_dBc_tells_the_duty_factor() => // E08, closed form
        Assert.Equal(0.00318315191587307, IdealPulse.DutyDeviation(-40), 1e-9);

    [Fact]
    public void Trapezoid_of_a_tenth_has_a_lower_third_harmonic() => // E09, closed form
        Assert.Equal(-10.7253445787873, IdealPulse.TrapezoidLevelDbc(0.5, 0.1, 3), 1e-5);

    [Fact]
    public void Gaussian_edges_take_off_what_their_transform_says() => // E10, closed form
        Assert.Equal(-0.548648285435028, IdealPulse.GaussianEdgeDb(0.02, 3), 0.002);

    [Theory]
    [InlineData(0.5)]
    [InlineData(0.3)]
    public void Alike_Gaussian_edges_take_the_same_off_whatever_the_duty_factor(double duty) =>
        // Closed form: c_k of the rectangle times exp(-2π²k²s²). Tolerance: rounding.
        Assert.Equal(IdealPulse.LevelDbc(duty, 3) + IdealPulse.GaussianEdgeDb(0.02, 3), IdealPulse.EdgedLevelDbc(duty, 0.02, 0.02, 3), 1e-9);

    [Fact]
    public void Unlike_edges_make_even_harmonics_of_a_square_wave() =>
        // Closed form: at 50 % and even k the exponentials differ by g_r - g_f alone: (e^(-2π²·4·0.0004) - 1)/2 over (e^(-2π²·0.0004) + 1).
        Assert.Equal(20 * Math.Log10((1 - Math.Exp(-8 * Math.PI * Math.PI * 4e-4)) / 2 / (1 + Math.Exp(-2 * Math.PI * Math.PI * 4e-4))), IdealPulse.EdgedLevelDbc(0.5, 0.02, 0, 2), 1e-9);
}
