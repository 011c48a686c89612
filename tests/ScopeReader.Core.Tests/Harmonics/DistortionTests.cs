using ScopeReader.Harmonics;

namespace ScopeReader.Tests.Harmonics;

public class DistortionTests
{
    // The series to 100,000 harmonics: what is left out of Σ 1/k² is under 1e-5 of a sum of order 1, half of that in the root.
    private const int Terms = 100_000;
    private const double Truncation = 0.002;

    [Fact]
    public void Square_wave_has_48_percent_to_the_fundamental_and_44_to_the_whole()
    {
        double thd = Distortion.ToFundamental(Series(k => k % 2 == 1 ? 1.0 / k : 0));
        Assert.Equal(48.3425847608679, 100 * thd, Truncation); // E11: sqrt(pi^2/8 - 1), closed form
        Assert.Equal(43.5236178254173, 100 * Distortion.ToWhole(thd), Truncation); // E12
    }

    [Fact]
    public void Sawtooth_has_80_percent() => // E13: series
        Assert.Equal(80.3077870974058, 100 * Distortion.ToFundamental(Series(k => 1.0 / k)), Truncation);

    [Fact]
    public void Triangle_has_12_percent() => // E14: series
        Assert.Equal(12.1152926519305, 100 * Distortion.ToFundamental(Series(k => k % 2 == 1 ? 1.0 / k / k : 0)), 1e-6);

    [Fact]
    public void Square_wave_to_its_ninth_harmonic_has_43_percent() => // E15: closed form
        Assert.Equal(42.879476837849, 100 * Distortion.ToFundamental([1, 0, 1 / 3.0, 0, 1 / 5.0, 0, 1 / 7.0, 0, 1 / 9.0]), 1e-9);

    [Fact]
    public void Effective_bits_are_those_of_the_ideal_converter()
    {
        Assert.Equal(6.88288343459612, Distortion.EffectiveBits(43.2), 1e-9); // E17, IEEE 1057/1241 (from memory)
        Assert.Equal(8, Distortion.EffectiveBits(49.9257118967938), 1e-9); // E16, closed form
    }

    private static double[] Series(Func<int, double> amplitude) => [.. Enumerable.Range(1, Terms).Select(amplitude)];
}
