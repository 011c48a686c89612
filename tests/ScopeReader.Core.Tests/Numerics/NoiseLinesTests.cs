using ScopeReader.Numerics;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Numerics;

public class NoiseLinesTests
{
    private const int Count = 100_000;

    [Fact]
    public void Lines_have_their_place_and_height_and_leave_the_noise_alone()
    {
        // Amplitudes 0.02 and 0.05 in noise of 0.1: u = √(3σ²/N) = 5.5e-4 at the middle of a bin, 1.18 times that at its edge; four of those.
        NoiseLines found = Lines(0.1, (0.0912345, 0.05), (0.3, 0.02));
        Assert.Equal(2, found.Lines.Count);
        Assert.Equal(0.05, found.Lines[0].Amplitude, 4 * found.Lines[0].Uncertainty);
        Assert.InRange(found.Lines[0].Uncertainty, 5.3e-4, 6.6e-4);
        Assert.Equal(0.0912345, found.Lines[0].Frequency, 4 * found.Lines[0].FrequencyUncertainty);
        Assert.Equal(0.02, found.Lines[1].Amplitude, 4 * found.Lines[1].Uncertainty);
        // The mean square of half of the samples' worth scatters by √(2/51429) = 0.6 %; four of those.
        Assert.Equal(0.01, found.Variance, 0.025 * 0.01);
    }

    [Fact]
    public void White_noise_makes_use_of_18_of_35_samples_under_a_Hann_window()
    {
        // (Σw²)²/(N Σw⁴) = (3/8)²/(35/128) = 18/35, closed form. The mean of 50,000 squared powers scatters by √20/√50000 = 2 %; four of those.
        NoiseLines found = Lines(0.1);
        Assert.Empty(found.Lines);
        Assert.Equal(Count * 18.0 / 35, found.DegreesOfFreedom, 0.08 * Count);
    }

    private static NoiseLines Lines(double sigma, params (double Frequency, double Amplitude)[] lines)
    {
        var noise = new NormalNoise(11);
        double[] samples = [.. Enumerable.Range(0, Count).Select(i => sigma * noise.Normal() + lines.Sum(l => l.Amplitude * Math.Cos(2 * Math.PI * l.Frequency * i + 1)))];
        // A fundamental of 0.4 cycles a sample: its model has taken the noise there only.
        return new NoiseLines(new NoiseSpectrum(samples, 0.4, 3));
    }
}
