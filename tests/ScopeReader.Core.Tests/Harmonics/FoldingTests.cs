using ScopeReader.Harmonics;

namespace ScopeReader.Tests.Harmonics;

public class FoldingTests
{
    [Theory]
    [InlineData(27.3, 20, 7.3)] // E65, closed form
    [InlineData(24, 20, 4)] // E66
    [InlineData(30, 25, 5)] // E67
    [InlineData(99, 40, 19)] // E68
    public void Frequencies_above_half_of_the_sample_rate_come_down(double frequency, double sampleRate, double expected) =>
        Assert.Equal(expected, Folding.Apparent(frequency, sampleRate), 1e-9); // The rows' tolerance.
}
