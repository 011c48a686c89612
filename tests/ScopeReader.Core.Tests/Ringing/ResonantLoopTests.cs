using ScopeReader.Ringing;

namespace ScopeReader.Tests.Ringing;

public class ResonantLoopTests
{
    // D18: closed form.
    [Fact]
    public void Ten_picofarad_and_a_hundred_nanohenry_resonate_at_159_MHz() =>
        Assert.Equal(159.154943091895e6, ResonantLoop.Frequency(100e-9, 10e-12), 1);

    // D19 and D20: 20 nH with 20 pF.
    [Fact]
    public void Critical_resistance_is_twice_the_characteristic_impedance()
    {
        Assert.Equal(31.6227766016838, ResonantLoop.Impedance(20e-9, 20e-12), 1e-9);
        Assert.Equal(63.2455532033676, ResonantLoop.SeriesResistance(20e-9, 20e-12, 1), 1e-9);
    }

    // D27 to D36 and D50: derived, held against a scan of the three poles of the loop with its snubber.
    [Theory]
    [InlineData(1, 1.68179283050743, 0.207106781186548)]
    [InlineData(2, 1.13975352847739, 0.366025403784439)]
    [InlineData(3, 0.942809041582063, 0.5)]
    [InlineData(4, 0.835925381220528, 0.618033988749895)]
    [InlineData(6, 0.717252845109808, 0.822875655532295)]
    [InlineData(8, 0.649519052838329, 1)]
    public void Snubber_has_the_best_resistance_for_its_capacitance(double ratio, double resistance, double dampingRatio)
    {
        // Unit inductance and capacitance: √(L/C) = 1. The scan's own tolerances are 0.002 and 0.001.
        Snubber snubber = Snubber.Of(1, 1, ratio);
        Assert.Equal(resistance, snubber.Resistance, 1e-4);
        Assert.Equal(dampingRatio, snubber.DampingRatio, 1e-9);
        Assert.Equal(ratio, snubber.Capacitance, 1e-12);
    }

    // D37: 1 nF, 24 V, 100 kHz.
    [Fact]
    public void Snubber_turns_its_charge_into_heat() => Assert.Equal(0.0576, new Snubber(10, 1e-9, 0.5).Loss(24, 100e3), 1e-12);
}
