using ScopeReader.Ringing;

namespace ScopeReader.Tests.Ringing;

public class GroundLeadTests
{
    // D22: straight wire at high frequency, Rosa 1908 / Grover (from memory), held against the Neumann integral. D22's tolerance.
    [Fact]
    public void Straight_wire_has_the_inductance_of_the_short_formula() =>
        Assert.Equal(113.692234553359e-9, GroundLead.Inductance(100e-3, 0.25e-3), 0.1e-9);

    // D18: closed form.
    [Fact]
    public void Ten_picofarad_and_a_hundred_nanohenry_resonate_at_159_MHz() =>
        Assert.Equal(159.154943091895e6, GroundLead.Resonance(100e-9, 10e-12), 0.001);

    // D26: 150 mm of wire of 0.4 mm radius and 10 pF.
    [Fact]
    public void Usual_ground_lead_rings_near_123_MHz() =>
        Assert.Equal(122.571222572693e6, GroundLead.Estimate(150e-3, 10e-12), 1);
}
