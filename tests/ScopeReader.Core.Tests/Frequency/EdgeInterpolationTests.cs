using ScopeReader.Frequency;

namespace ScopeReader.Tests.Frequency;

public class EdgeInterpolationTests
{
    // B31 to B35: peak error of linear interpolation on a Gaussian edge, computed by two routes outside this project.
    // Tolerance: the 1.5 % that the fitted formula claims from one sample up.
    [Theory]
    [InlineData(1, 0.0898977250351623)]
    [InlineData(2, 0.0255282333059505)]
    [InlineData(3, 0.0115556720797997)]
    [InlineData(4, 0.00653831414948649)]
    [InlineData(8, 0.00164338393860377)]
    public void Peak_error_of_a_straight_line_on_a_Gaussian_edge(double duration, double error) =>
        Assert.Equal(error, EdgeInterpolation.LargestError(duration), 0.015 * error);

    // B30: on shorter edges the formula overstates, and never more than half a sample.
    [Theory]
    [InlineData(0, 0.5)]
    [InlineData(0.5, 0.211684172264918)]
    public void Shorter_edges_are_not_understated(double duration, double error) =>
        Assert.InRange(EdgeInterpolation.LargestError(duration), error, 0.5);

    // B36: 3 e/N with e = 0.0899 and N = 10,000 is 26.97 ppm. Tolerance: the formula's 1.5 %.
    [Fact]
    public void Bound_of_the_relative_frequency_error() =>
        Assert.Equal(26.97e-6, EdgeInterpolation.RelativeBound(EdgeInterpolation.LargestError(1), 10000), 0.015 * 26.97e-6);

    // Closed form: crossings wrap cycles · |m p − round(m p)| times; under five count as staying.
    [Theory]
    [InlineData(50.001, 200, 1)]
    [InlineData(50.37, 200, 0)]
    [InlineData(50.5001, 200, 2)]
    [InlineData(50.3334, 200, 3)]
    public void Near_commensurate_sampling_is_told(double period, double cycles, int multiple) =>
        Assert.Equal(multiple, EdgeInterpolation.CommensurateMultiple(period, cycles));
}
