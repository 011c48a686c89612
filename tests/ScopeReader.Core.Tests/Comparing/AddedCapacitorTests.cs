using ScopeReader.Captures;
using ScopeReader.Comparing;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Comparing;

public class AddedCapacitorTests
{
    private static ComparedSide Ringing(string file, double frequency, double relative = 0, double dampingRatio = 0)
    {
        var wave = new Waveform("Node", "V", new TimeAxis(0, 1e-9, AxisSource.Column), [0, 1]);
        Reading[] readings =
        [
            new(Quantities.RingingFrequency, frequency, "Hz", new Budget([BudgetTerm.Normal("fit", relative * frequency)]), "rising-edge-fit"),
            new(Quantities.RingingDampingRatio, dampingRatio, "1", new Budget([]), "rising-edge-fit"),
        ];
        return new ComparedSide([new Measurement(new Capture(file, "", [wave], []), [new ChannelMeasurement(wave, readings, [], [], [])], [], Outcome.Unjudged)]);
    }

    private static Comparison Tell(ComparedSide without, ComparedSide with, double added, double? tolerance) =>
        new AddedCapacitor(added, tolerance).Tell(Comparison.Of(without, [with]));

    private static Reading Value(Comparison comparison, Quantity quantity) => Assert.Single(comparison.Readings, r => r.Quantity == quantity);

    [Fact]
    public void Half_the_frequency_is_a_third_of_the_added_capacitance() =>
        // D14, closed form.
        Assert.Equal(10e-12, Value(Tell(Ringing("a", 100e6), Ringing("b", 50e6), 30e-12, null), Quantities.RingingCapacitance).Value, 1e-23);

    [Fact]
    public void Capacitance_and_inductance_follow_from_two_frequencies()
    {
        Comparison comparison = Tell(Ringing("a", 85e6), Ringing("b", 60e6), 47e-12, null);
        Assert.Equal(46.6758620689655e-12, Value(comparison, Quantities.RingingCapacitance).Value, 1e-21); // D15
        Assert.Equal(75.1121276398346e-9, Value(comparison, Quantities.RingingInductance).Value, 1e-15); // D16
        Assert.All(comparison.Readings, r => Assert.Equal(["added-capacitance"], r.Budget.Missing));
    }

    [Fact]
    public void Uncertainties_propagate_to_first_order()
    {
        // D17: 5 % and twice 0.5 % make 5.74 %. A rectangle of half-width √3 · 5 % has a standard uncertainty of 5 %.
        Comparison comparison = Tell(Ringing("a", 85e6, 0.005), Ringing("b", 60e6, 0.005), 47e-12, 0.05 * Math.Sqrt(3));
        Reading c = Value(comparison, Quantities.RingingCapacitance), l = Value(comparison, Quantities.RingingInductance);
        Assert.Equal(5.73976678193969, 100 * c.Budget.StandardUncertainty / c.Value, 1e-9);
        // L = (1/f2² − 1/f1²)/(4π² C): relative sensitivities 2/(ρ − 1) to f1 and 2ρ/(ρ − 1) to f2, by hand.
        double rho = 85.0 / 60 * (85.0 / 60), expected = Math.Sqrt(0.05 * 0.05 + 0.005 * 0.005 * (4 + 4 * rho * rho) / ((rho - 1) * (rho - 1)));
        Assert.Equal(expected, l.Budget.StandardUncertainty / l.Value, 1e-12);
    }

    [Fact]
    public void Resistance_tops_up_the_damping_that_is_there()
    {
        // f0 = f/√(1 − ζ²); √(L/C) = 1/(2π f0 C); 2 (0.5 − 0.1) of it, by hand. A capacitor that lowers f0 to a half: C = 10 pF.
        double f = 100e6 * Math.Sqrt(1 - 0.01), half = 50e6 * Math.Sqrt(1 - 0.01), expected = 0.8 / (2 * Math.PI * 100e6 * 10e-12);
        Assert.Equal(expected, Value(Tell(Ringing("a", f, 0, 0.1), Ringing("b", half, 0, 0.1), 30e-12, 0), Quantities.DampingResistance).Value, 1e-9);
    }

    [Fact]
    public void Findings_give_wire_resistor_and_snubber()
    {
        Comparison comparison = Tell(Ringing("a", 85e6), Ringing("b", 60e6), 47e-12, 0);
        // A wire of 75 nH by the full form of Rosa's formula is 70 mm; √(L/C) = 40.1 ohm; D31: 0.943 of that, 3 C = 140 pF.
        Assert.Equal("what rings is 75 nH with 47 pF: the inductance of 70 mm of wire 0.5 mm thick with its return far away (Rosa, Grover). "
            + "Look for a loop of that length: ground lead, jumper, supply and return.", Assert.Single(comparison.Findings, f => f.Code == "ringing-loop").Text);
        Assert.Equal("40 ohm more in series at the driver bring the damping ratio from 0.00 to 0.5. Or a snubber across the node, 38 ohm in series with 140 pF: "
            + "damping ratio 0.5 where the loop has no other; its loss is C V² f. Shortening the loop comes before either.", Assert.Single(comparison.Findings, f => f.Code == "ringing-cure").Text);
    }

    [Fact]
    public void A_capacitor_that_lowers_nothing_tells_nothing()
    {
        Comparison comparison = Tell(Ringing("a", 60e6), Ringing("b", 85e6), 47e-12, 0.05);
        Assert.Empty(comparison.Readings);
        Assert.Equal(3, comparison.NotMeasured.Count);
        Assert.All(comparison.NotMeasured, n => Assert.Equal("the added capacitor has not lowered the ringing (60.00 MHz without, 85.00 MHz with it): put it across the node that rings, and name the capture without it first", n.Reason));
    }
}
