using System.Globalization;
using ScopeReader.Numerics;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Numerics;

public class AveragedPeriodogramTests
{
    [Fact]
    public void Agrees_with_scipy()
    {
        // Reference/welch.csv: scipy.signal.welch with a Hann window, halves overlapping, no detrending, by tools/reference/welch.py.
        // Tolerance: sums of a hundred roundings of 1.1e-16.
        long x = 1234567890;
        var samples = new double[1000];
        for (int i = 0; i < samples.Length; i++)
        {
            samples[i] = x / 2147483647.0 - 0.5;
            x = 16807 * x % 2147483647;
        }
        var found = new AveragedPeriodogram(samples, 120, Window.Hann);
        (int Bin, double Density)[] expected = [.. Reference()];
        Assert.Equal(expected.Length, found.Power.Length);
        foreach ((int bin, double density) in expected)
            Assert.Equal(density, found.Density(bin, 0.01), 1e-12 * expected.Max(e => e.Density));
    }

    [Fact]
    public void Halves_that_overlap_under_a_Hann_window_make_use_of_nearly_all_samples()
    {
        // Closed form: c = 1 - sin²(2x)/2 on average 3/4, squared 19/32: (9/16)/(19/32) = 18/19.
        var noise = new NormalNoise(2);
        double[] samples = [.. Enumerable.Range(0, 100_000).Select(_ => noise.Normal())];
        var found = new AveragedPeriodogram(samples, 1000, Window.Hann);
        Assert.Equal(18.0 / 19, found.Efficiency, 1e-9);
        Assert.Equal((199, 100_000), (found.Segments, found.Covered));
        // The mean of what 100,000 samples give scatters by √2/√94737 = 0.45 %; four of those.
        double mean = 0;
        for (int k = 1; k < 500; k++)
            mean += found.Power[k] / 499;
        Assert.Equal(1, mean, 0.018);
    }

    private static IEnumerable<(int Bin, double Density)> Reference()
    {
        using var reader = new StreamReader(typeof(AveragedPeriodogramTests).Assembly.GetManifestResourceStream("welch.csv")!);
        while (reader.ReadLine() is { } line)
            if (line[0] != '#')
                yield return (int.Parse(line.Split(',')[0], CultureInfo.InvariantCulture), double.Parse(line.Split(',')[1], CultureInfo.InvariantCulture));
    }
}
