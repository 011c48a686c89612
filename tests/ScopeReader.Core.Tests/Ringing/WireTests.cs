using ScopeReader.Ringing;

namespace ScopeReader.Tests.Ringing;

/// <summary>Rosa 1908, Grover 1946 (from memory), each held against the Neumann integral; the tolerances are the table's.</summary>
public class WireTests
{
    private const double Nano = 1e-9;

    // D21 and D22: 100 mm of 0.25 mm radius.
    [Fact]
    public void Long_straight_wire_has_the_inductance_of_the_short_formulas()
    {
        Assert.Equal(118.692234553359 * Nano, Wire.LongStraightSlow(100e-3, 0.25e-3), 0.1 * Nano);
        Assert.Equal(113.692234553359 * Nano, Wire.LongStraight(100e-3, 0.25e-3), 0.1 * Nano);
    }

    // D23 and D24: 25 mm, 0.86 nH/mm.
    [Fact]
    public void Short_straight_wire_has_the_inductance_of_the_full_formula()
    {
        Assert.Equal(21.5414618343026 * Nano, Wire.Straight(25e-3, 0.25e-3), 1e-6 * Nano);
        Assert.Equal(0.861658473372105 * Nano, Wire.Straight(25e-3, 0.25e-3) / 25, 1e-6 * Nano);
    }

    // D25: a loop of 20 mm of wire of 0.5 mm.
    [Fact]
    public void Loop_has_the_inductance_of_the_short_formula() => Assert.Equal(94.7082364540311 * Nano, Wire.Loop(20e-3, 0.5e-3), 0.1 * Nano);

    // D23 the other way round: bisection to the last bit.
    [Fact]
    public void Length_of_an_inductance_is_the_inverse() => Assert.Equal(25e-3, Wire.LengthOf(21.5414618343026 * Nano, 0.25e-3), 1e-10);
}
