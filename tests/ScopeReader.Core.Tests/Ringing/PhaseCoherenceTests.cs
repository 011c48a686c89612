using ScopeReader.Ringing;

namespace ScopeReader.Tests.Ringing;

public class PhaseCoherenceTests
{
    // D46 and D47: the 5 % points of Mardia's table (Statistics and Data Analysis in Geology, Table A.10). Tolerance: theirs.
    [Theory]
    [InlineData(10, 0.540)]
    [InlineData(20, 0.385)]
    public void Tabulated_five_percent_points_have_five_percent(int count, double resultant) =>
        Assert.Equal(0.05, PhaseCoherence.Probability(count, resultant), 0.0012);

    [Fact]
    public void Critical_value_of_ten_phases_is_the_tables()
    {
        // D48: Z = n r² = 2.919 at 5 % (Zar, from memory; confirmed by simulation). Tolerance: 0.02 of Z, 2 % of 0.05 by its slope e^-Z.
        Assert.Equal(0.05, PhaseCoherence.Probability(10, Math.Sqrt(2.919 / 10)), 0.001);
    }

    [Fact]
    public void One_phase_gathers_always() => Assert.Equal(1, PhaseCoherence.Probability(5, 0), 1e-12);
}
