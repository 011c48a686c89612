using ScopeReader.Frequency;
using ScopeReader.Numerics;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Frequency;

public class SineFitTests
{
    [Theory]
    [InlineData(0)]
    [InlineData(0.6)]
    [InlineData(-0.6)]
    public void Four_parameters_without_noise_come_back(double binsOff)
    {
        // B06, B07: f 0.01237, A 2.5, N 2000, IEEE 1057's method. Tolerances are those rows'. The fit converges from 0.6 bin (methods).
        double[] samples = Sine(2000, 0.01237, 2.5, 0.7, offset: -3);
        SineFit fit = SineFit.From(samples, 0.01237 + binsOff / 2000)!;
        Assert.Equal(0.01237, fit.Frequency, 1e-12);
        Assert.Equal(2.5, fit.Amplitude, 1e-9);
        Assert.Equal(-3, fit.Offset, 1e-9);
        // Phase at the middle of the record: 0.7 rad at the first sample and 999.5 samples on.
        Assert.Equal(Math.IEEERemainder(0.7 + 2 * Math.PI * 0.01237 * 999.5, 2 * Math.PI), fit.Phase, 1e-9);
        Assert.InRange(fit.ResidualRms, 0, 1e-12);
    }

    [Fact]
    public void Start_a_whole_bin_away_is_not_settled_on_another_frequency() =>
        Assert.True(SineFit.From(Sine(2000, 0.01237, 1, 0), 0.01237 + 1.5 / 2000) is not { } fit || Math.Abs(fit.Frequency - 0.01237) < 1e-12);

    [Fact]
    public void Three_parameters_at_a_wrong_frequency_leave_the_known_residual()
    {
        // B82: A·|dw|·N/√24 = 0.0204124 V for dw 1e-5 rad/sample, N 10000; the row's tolerance.
        SineFit fit = SineFit.At(Sine(10000, 0.0531, 1, 0.3), 0.0531 + 1e-5 / (2 * Math.PI))!;
        Assert.Equal(0.0204124145231932, fit.ResidualRms, 3e-4);
    }

    [Fact]
    public void Three_parameters_at_a_wrong_frequency_shrink_the_amplitude_by_sinc()
    {
        // B83: sinc(0.1) = 0.98363 for a tenth of a cycle over the record; the row's tolerance.
        SineFit fit = SineFit.At(Sine(10000, 0.0531, 1, 0.3), 0.0531 + 0.1 / 10000)!;
        Assert.Equal(0.983631643083466, fit.Amplitude, 3e-4);
    }

    [Fact]
    public void Residual_of_an_ideal_converter_is_its_step_over_root_twelve()
    {
        // F08: 254 codes peak to peak, residual 0.288675 LSB; the row's tolerance.
        double[] samples = Sine(10007, 0.01237, 127, 0.3);
        for (int i = 0; i < samples.Length; i++)
            samples[i] = Math.Round(samples[i]);
        Assert.Equal(0.288675134594813, SineFit.From(samples, 0.01237)!.ResidualRms, 0.01);
    }

    [Fact]
    public void Covariance_is_the_bound()
    {
        // B01 to B03: N 1000, f 0.0531, A 1, σ 0.01. The rows' tolerance of 2 % is what the asymptotic form lacks.
        HarmonicFit fit = HarmonicFit.From(Sine(1000, 0.0531, 1, 0.3), 0.0531, 1)!;
        Assert.Equal(2.46561900905581e-07, 0.01 * Math.Sqrt(fit.FrequencyVariance), 4.93e-9);
        Assert.Equal(0.000447213595499958, 0.01 * Math.Sqrt(fit.Variances(1).Cosine), 8.94e-6);
        Assert.Equal(0.000447213595499958, 0.01 * Math.Sqrt(fit.Variances(1).Sine), 8.94e-6);
    }

    [Fact]
    public void Stated_uncertainty_of_a_sine_in_noise_is_the_bound()
    {
        // B05: C 100 cycles, η 40 dB, N 10000: 0.551329 ppm. The noise is read off one record's median: 7 % either way.
        const double f = 0.01003;
        double[] samples = Sine(10000, f, 1, 0.3);
        AddNoise(samples, 1 / Math.Sqrt(2e4), 3);
        FrequencyEstimate estimate = SineFit.Estimate(samples, f)!;
        Assert.Equal(0.551328895421792 / 1.003, 1e6 * new Budget(estimate.Terms).StandardUncertainty / f, 0.15 * 0.55);
        Assert.Equal(f, estimate.CyclesPerSample, 4 * 0.5513e-6 * f);
    }

    [Fact]
    public void Noise_that_is_thin_near_the_sample_rate_counts_as_it_is_near_the_tone()
    {
        // White noise averaged in pairs has cos²(πf) of its density: twice the residual's variance near zero frequency.
        const double f = 0.01003;
        var noise = new NormalNoise(5);
        double[] samples = Sine(20000, f, 1, 0.3);
        double before = noise.Normal();
        for (int i = 0; i < samples.Length; i++)
        {
            double next = noise.Normal();
            samples[i] += 0.01 * (before + next) / 2;
            before = next;
        }
        double bound = Math.Sqrt(6) * 0.01 / (Math.PI * Math.Pow(20000, 1.5));
        // One record's median: 7 % either way, three times.
        Assert.Equal(bound, new Budget(SineFit.Estimate(samples, f)!.Terms).StandardUncertainty, 0.2 * bound);
    }

    [Fact]
    public void Two_cycles_are_too_few() => Assert.Null(SineFit.Estimate(Sine(100, 0.02, 1, 0), 0.02));

    internal static double[] Sine(int count, double frequency, double amplitude, double phase, double offset = 0)
    {
        var samples = new double[count];
        for (int i = 0; i < count; i++)
            samples[i] = offset + amplitude * Math.Cos(2 * Math.PI * frequency * i + phase);
        return samples;
    }

    internal static void AddNoise(double[] samples, double rms, ulong seed)
    {
        var noise = new NormalNoise(seed);
        for (int i = 0; i < samples.Length; i++)
            samples[i] += rms * noise.Normal();
    }
}
