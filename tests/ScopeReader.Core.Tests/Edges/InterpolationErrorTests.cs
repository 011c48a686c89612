using ScopeReader.Edges;

namespace ScopeReader.Tests.Edges;

public class InterpolationErrorTests
{
    [Theory]
    [InlineData(0.5, 0.211684172264918)] // B30: stationary point in extended precision, and a search
    [InlineData(1, 0.0898977250351623)] // B31
    [InlineData(2, 0.0255282333059505)] // B32
    [InlineData(3, 0.0115556720797997)] // B33
    [InlineData(4, 0.00653831414948649)] // B34
    [InlineData(8, 0.00164338393860377)] // B35
    public void Straight_line_is_off_a_Gaussian_edge_by_the_tabulated_peak(double duration, double samples) =>
        // The rows' own tolerance.
        Assert.Equal(samples, InterpolationError.LinearAtMiddle(duration), 2e-6);
}
