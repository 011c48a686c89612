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

    [Fact]
    public void Harmonics_that_fold_onto_others_are_found()
    {
        // At 5 samples a cycle harmonic 4 comes down on the fundamental, 6 too; 5 on the mean. 0.2 + 1e-6 of a cycle: 4 shows 5e-6 away.
        Assert.Equal(1, Folding.Collision(0.2, 1000, 4, 3));
        Assert.Equal(0, Folding.Collision(0.2, 1000, 5, 3));
        // At 20 samples a cycle harmonic 10 lies on half of the sample rate, its own image.
        Assert.Equal(10, Folding.Collision(0.05, 1000, 10, 9));
        Assert.Null(Folding.Collision(0.21, 1000, 4, 3));
        Assert.Null(Folding.Collision(0.2 + 1e-3, 1000, 4, 3));
    }

    [Fact]
    public void Line_is_called_by_the_lowest_order_that_fits()
    {
        // Harmonic 7 of 0.1103 cycles a sample, 0.7721, shows at 0.2279.
        Assert.Equal(7, Folding.Order(0.2279, 1e-5, 0.1103, 0, 5, 20));
        Assert.Null(Folding.Order(0.2379, 1e-5, 0.1103, 0, 5, 20));
    }
}
