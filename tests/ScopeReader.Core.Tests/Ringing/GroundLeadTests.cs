using ScopeReader.Ringing;

namespace ScopeReader.Tests.Ringing;

public class GroundLeadTests
{
    // D26: 150 mm of wire of 0.4 mm radius and 10 pF.
    [Fact]
    public void Usual_ground_lead_rings_near_123_MHz() =>
        Assert.Equal(122.571222572693e6, GroundLead.Estimate(150e-3, 10e-12), 1);
}
