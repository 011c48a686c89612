using System.Globalization;
using System.Numerics;
using MathNet.Numerics.IntegralTransforms;
using ScopeReader.Numerics;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Numerics;

public class RealTransformTests
{
    [Fact]
    public void Agrees_with_numpy_at_every_kind_of_length()
    {
        // Reference/rfft.csv: numpy.fft.rfft, by tools/reference/rfft.py. Tolerance: both round log2 N stages to 1.1e-16 of the
        // largest value; 2e-15 of it is what is asked of both together.
        long x = 1234567890;
        foreach (IGrouping<int, (int Length, int Bin, Complex Value)> one in ReferenceBins().GroupBy(b => b.Length))
        {
            var samples = new double[one.Key];
            for (int i = 0; i < samples.Length; i++)
            {
                samples[i] = x / 2147483647.0 - 0.5;
                x = 16807 * x % 2147483647;
            }
            Complex[] found = Forward(samples);
            double tolerance = 2e-15 * one.Max(b => b.Value.Magnitude);
            foreach ((int _, int bin, Complex value) in one)
                Assert.True((found[bin] - value).Magnitude <= tolerance, $"length {one.Key}, bin {bin}: {found[bin]} for {value}");
        }
    }

    [Theory]
    [InlineData(16)]
    [InlineData(4096)]
    [InlineData(65536)]
    public void Agrees_with_FftSharp_at_powers_of_two(int length)
    {
        // FftSharp's own transform is good to 8e-16 of the largest value (measured against numpy); ours adds under 1e-15.
        double[] samples = Noise(length);
        Complex[] found = Forward(samples), other = FftSharp.FFT.ForwardReal(samples);
        AssertClose(other, found, 2e-15);
    }

    [Theory]
    // Each is good to 2 to 3e-16 of the largest value on average (measured against numpy); a worst bin has some times that, in both.
    [InlineData(16, 2e-15)]
    [InlineData(65536, 2e-15)]
    // Off powers of two MathNet's chirp is good to 4e-11 of the largest value only (measured against numpy).
    [InlineData(97, 1e-10)]
    [InlineData(1000, 1e-10)]
    public void Agrees_with_MathNet_without_its_scaling(int length, double tolerance)
    {
        double[] samples = Noise(length);
        Complex[] other = [.. samples.Select(v => new Complex(v, 0))];
        Fourier.Forward(other, FourierOptions.NoScaling);
        AssertClose(other[..(length / 2 + 1)], Forward(samples), tolerance);
    }

    [Theory]
    [InlineData(1 << 16, 1000)]
    [InlineData(1_000_000, 12345)]
    [InlineData(99_991, 4321)] // A prime.
    [InlineData(2 * 49_999, 3)] // Twice a prime.
    public void A_cosine_of_whole_cycles_is_one_line_of_half_the_length(int length, int cycles)
    {
        // Closed form: X_k = N/2 at the line, 0 elsewhere. Samples and stages each round to 1.1e-16 of the largest value.
        var samples = new double[length];
        for (int n = 0; n < length; n++)
            samples[n] = Math.Cos(2 * Math.PI * ((long)n * cycles % length) / length);
        var expected = new Complex[length / 2 + 1];
        expected[cycles] = length / 2.0;
        AssertClose(expected, Forward(samples), 1e-15);
    }

    [Fact]
    public void Energy_is_that_of_the_samples()
    {
        // Parseval: Σ x² = (1/N) Σ |X|² over both sides. Tolerance: sums of a thousand terms rounded to 1.1e-16 each.
        double[] samples = Noise(999);
        double bins = 0;
        Complex[] found = Forward(samples);
        for (int k = 0; k < found.Length; k++)
            bins += (k == 0 ? 1 : 2) * found[k].Magnitude * found[k].Magnitude / samples.Length;
        Assert.Equal(samples.Sum(v => v * v), bins, 1e-11);
    }

    [Fact]
    public void Wrong_lengths_are_refused() =>
        Assert.Throws<ArgumentException>(() => new RealTransform(8).Forward(new double[7], new double[5], new double[5]));

    [Theory]
    [InlineData(1, 1)]
    [InlineData(1023, 1000)] // 2^3 5^3; between them 1001 to 1023 all have a prime factor above 5, by hand.
    [InlineData(1 << 20, 1 << 20)]
    public void Fast_lengths_have_no_prime_factor_above_five(int most, int expected) =>
        Assert.Equal(expected, RealTransform.FastLengthAtMost(most));

    private static Complex[] Forward(double[] samples)
    {
        var transform = new RealTransform(samples.Length);
        double[] re = new double[transform.Bins], im = new double[transform.Bins];
        transform.Forward(samples, re, im);
        return [.. re.Zip(im, (r, i) => new Complex(r, i))];
    }

    private static double[] Noise(int length)
    {
        var noise = new NormalNoise(7);
        return [.. Enumerable.Range(0, length).Select(_ => noise.Normal())];
    }

    private static void AssertClose(Complex[] expected, Complex[] found, double ofLargest)
    {
        Assert.Equal(expected.Length, found.Length);
        double tolerance = ofLargest * expected.Max(v => v.Magnitude);
        for (int k = 0; k < found.Length; k++)
            Assert.True((found[k] - expected[k]).Magnitude <= tolerance, $"bin {k}: {found[k]} for {expected[k]}");
    }

    private static IEnumerable<(int Length, int Bin, Complex Value)> ReferenceBins()
    {
        using var reader = new StreamReader(typeof(RealTransformTests).Assembly.GetManifestResourceStream("rfft.csv")!);
        while (reader.ReadLine() is { } line)
            if (line[0] != '#')
            {
                string[] cells = line.Split(',');
                yield return (int.Parse(cells[0], CultureInfo.InvariantCulture), int.Parse(cells[1], CultureInfo.InvariantCulture),
                    new Complex(double.Parse(cells[2], CultureInfo.InvariantCulture), double.Parse(cells[3], CultureInfo.InvariantCulture)));
            }
    }
}
