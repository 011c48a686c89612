using ScopeReader.Captures;

namespace ScopeReader.Tests;

public class CautionsTests
{
    private static Measurement Measure(Channel channel, Plan? plan = null) =>
        Analysis.Measure(new Capture("made.csv", "", [channel], []), plan ?? Plan.Empty);

    private static Waveform Constant(double volts, string unit = "V") =>
        new("A", unit, TimeAxis.PerSample, [volts, volts, volts]);

    [Fact]
    public void Voltages_that_can_hurt_bring_the_mains_caution()
    {
        Assert.Contains(Cautions.Mains, Measure(Constant(-31)).Cautions);
        Assert.DoesNotContain(Cautions.Mains, Measure(Constant(29)).Cautions);
        Assert.DoesNotContain(Cautions.Mains, Measure(Constant(31, "mA")).Cautions);
    }

    [Fact]
    public void A_stated_probe_brings_the_ground_clip_caution()
    {
        var plan = new Plan { Chain = new MeasuringChain { ProbeFactor = 10 } };

        Assert.Equal([Cautions.Probe], Measure(Constant(1), plan).Cautions);
        Assert.Empty(Measure(Constant(1)).Cautions);
    }

    [Fact]
    public void A_spectrum_trace_brings_the_cautions_of_its_input_and_of_radiating() =>
        Assert.Equal([Cautions.SpectrumInput, Cautions.Radiating], Measure(new SpectrumTrace("T", "dBm", [1, 2, 3, 4, 5], [-90, -90, -20, -90, -90])).Cautions);
}
