using ScopeReader.Ringing;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Ringing;

public class DampedSinusoidFitTests
{
    // The case of D43 to D45: amplitude 1, 0.05 cycles a sample, Q = 10, phase 0.3, noise 0.01, 300 samples, offset fitted.
    private const double Frequency = 0.05, Quality = 10, Phase = 0.3, Noise = 0.01;
    private const int Count = 300;
    private static readonly double Decay = Math.PI * Frequency / Quality;
    private static readonly DampedSinusoid Curve = new(Frequency, Decay, Math.Cos(Phase), -Math.Sin(Phase), 0.1);

    [Fact]
    public void Noise_free_samples_give_the_pole_back()
    {
        // D39, D40: y = 0.9^n cos(0.7 n), 40 samples; |z| = 0.9, arg z = 0.7. Tolerance: the rows' own, 1e-10.
        double[] times = Times(40), values = [.. times.Select(n => Math.Pow(0.9, n) * Math.Cos(0.7 * n))];
        DampedSinusoidFit fit = DampedSinusoidFit.From(times, values, Constant(40, 1), 0.1, 0.2)!;
        Assert.Equal(0.9, Math.Exp(-fit.Curve.Decay), 1e-10);
        Assert.Equal(0.7, 2 * Math.PI * fit.Curve.Frequency, 1e-10);
    }

    [Fact]
    public void Covariance_is_the_Cramer_Rao_bound()
    {
        double[,] covariance = DampedSinusoidFit.Covariance(Times(Count), Constant(Count, Noise * Noise), Curve)!;
        // D43, D44: exact Fisher matrix in extended precision. Tolerance: nine of their 15 digits, what the scaled 5 by 5 system keeps.
        Assert.Equal(1.24845961735975e-5, Math.Sqrt(covariance[0, 0]), 1.2e-14);
        Assert.Equal(7.89044506321026e-5, Math.Sqrt(covariance[1, 1]), 8e-14);
        // D45: rule for long records, (2σ/πA)√(α³). Its tolerance: 2 %.
        Assert.Equal(1.2533141373155e-5, Math.Sqrt(covariance[0, 0]), 3e-7);
    }

    [Fact]
    public void Spread_of_noisy_fits_is_the_stated_uncertainty()
    {
        const int Seeds = 400;
        double[] times = Times(Count), variances = Constant(Count, Noise * Noise);
        double frequencies = 0, decays = 0, statedFrequency = 0, statedDecay = 0;
        for (ulong seed = 1; seed <= Seeds; seed++)
        {
            var noise = new NormalNoise(seed);
            double[] values = [.. times.Select(t => Curve.At(t) + Noise * noise.Normal())];
            DampedSinusoidFit fit = DampedSinusoidFit.From(times, values, variances, 0.048, 0.02)!;
            frequencies += Math.Pow(fit.Curve.Frequency - Frequency, 2);
            decays += Math.Pow(fit.Curve.Decay - Decay, 2);
            statedFrequency += fit.Uncertainty([1, 0, 0, 0, 0]);
            statedDecay += fit.Uncertainty([0, 1, 0, 0, 0]);
        }
        // The rms of 400 errors is itself known to 1/√800 = 3.5 %: three of those.
        Assert.Equal(1, statedFrequency / Seeds / Math.Sqrt(frequencies / Seeds), 0.11);
        Assert.Equal(1, statedDecay / Seeds / Math.Sqrt(decays / Seeds), 0.11);
    }

    [Fact]
    public void Time_scale_scales_frequency_and_decay()
    {
        const double Scale = 3.7e-9;
        double[] times = Times(Count), values = [.. times.Select(Curve.At)], scaled = [.. times.Select(t => t * Scale)];
        DampedSinusoidFit fit = DampedSinusoidFit.From(scaled, values, Constant(Count, 1), 0.049 / Scale, 0.02 / Scale)!;
        // Exact but for rounding, which 300 sums of products of 16 digits leave at 1e-10.
        Assert.Equal(Frequency, fit.Curve.Frequency * Scale, 1e-10);
        Assert.Equal(Decay, fit.Curve.Decay * Scale, 1e-10);
    }

    [Fact]
    public void Five_points_are_too_few_for_five_unknowns() =>
        Assert.Null(DampedSinusoidFit.From(Times(5), Constant(5, 1), Constant(5, 1), 0.1, 0.1));

    private static double[] Times(int count) => [.. Enumerable.Range(0, count).Select(i => (double)i)];

    private static double[] Constant(int count, double value) => [.. Enumerable.Repeat(value, count)];
}
