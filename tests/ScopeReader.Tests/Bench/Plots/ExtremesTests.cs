using CsCheck;
using ScopeReader.Bench.Plots;

namespace ScopeReader.Tests.Bench.Plots;

public class ExtremesTests
{
    [Fact]
    public void Any_stretch_has_the_extremes_that_a_walk_through_it_finds() =>
        Gen.Select(Gen.Double[-1e3, 1e3].Array[1, 5000], Gen.Double.Unit, Gen.Double.Unit).Sample((record, a, b) =>
        {
            int start = (int)(a * (record.Length - 1)), end = start + 1 + (int)(b * (record.Length - start - 1));
            (double smallest, double largest) = new Extremes(record).Of(record, start, end);
            double[] stretch = record[start..end];
            return smallest == stretch.Min() && largest == stretch.Max();
        }, iter: 2000);

    [Fact]
    public void One_sample_in_a_million_is_not_lost()
    {
        double[] record = new double[1_000_000];
        record[654_321] = 1;
        var extremes = new Extremes(record);
        Assert.Equal((0.0, 1.0), extremes.Of(record, 600_000, 700_000));
        Assert.Equal((0.0, 0.0), extremes.Of(record, 654_322, 1_000_000));
    }
}
