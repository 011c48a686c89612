using ScopeReader.Edges;
using ScopeReader.Frequency;

namespace ScopeReader.Tests.Frequency;

public class EdgeInterpolationTests
{
    // B36: 3 e/N with e = 0.0899 and N = 10,000 is 26.97 ppm. Tolerance: the last digit of 26.97.
    [Fact]
    public void Bound_of_the_relative_frequency_error() =>
        Assert.Equal(26.97e-6, EdgeInterpolation.RelativeBound(InterpolationError.LinearAtMiddle(1), 10000), 0.005e-6);

    // Closed form: crossings wrap cycles · |m p − round(m p)| times; under five count as staying.
    [Theory]
    [InlineData(50.001, 200, 1)]
    [InlineData(50.37, 200, 0)]
    [InlineData(50.5001, 200, 2)]
    [InlineData(50.3334, 200, 3)]
    public void Near_commensurate_sampling_is_told(double period, double cycles, int multiple) =>
        Assert.Equal(multiple, EdgeInterpolation.CommensurateMultiple(period, cycles));
}
