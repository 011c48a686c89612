using ScopeReader.Captures;
using ScopeReader.Edges;
using ScopeReader.Readings;
using ScopeReader.Ringing;
using ScopeReader.Tests.Edges;

namespace ScopeReader.Tests.Ringing;

/// <summary>Ringing of known frequency, decay and amplitude after one edge, and what the person is told.</summary>
public class RingingAnalyserTests
{
    // 25 MHz, 60 ns to 1/e, 40 % of the step carried back to its 50 % instant at 0, after a Gaussian edge of 2 ns.
    private const double Frequency = 25e6, Decay = 60e-9, Amplitude = 40;

    [Fact]
    public void Noise_free_ringing_is_given_back()
    {
        ReadingSheet sheet = Measure(Plan.Empty, Ringing);
        // The edge is over 4 of its standard deviations after the middle: what is left of it, 3e-5 of the step, is 1e-4 of the ringing.
        Assert.Equal(Frequency, sheet.Value(Quantities.RingingFrequency), 1e-4 * Frequency);
        Assert.Equal(Decay, sheet.Value(Quantities.RingingDecayTime), 1e-3 * Decay);
        // Definition: α/√(α² + ω²).
        double ratio = 1 / double.Hypot(1, 2 * Math.PI * Frequency * Decay);
        Assert.Equal(ratio, sheet.Value(Quantities.RingingDampingRatio), 1e-3 * ratio);
        Assert.Equal(0.5 / ratio, sheet.Value(Quantities.RingingQ), 1e-3 * 0.5 / ratio);
        // The sine rises with the edge and moves its 50 % instant by under 0.1 ns, 0.2 % of the decay.
        Assert.Equal(Amplitude, sheet.Value(Quantities.RingingAmplitude), 2e-3 * Amplitude);
    }

    [Fact]
    public void Finding_says_what_to_try_first()
    {
        Finding finding = Assert.Single(Measure(Plan.Empty, Ringing).Findings, f => f.Code == "ringing");
        Assert.Equal("it rings at 25.0 MHz after the rising edge: 40 % of amplitude at the edge, down to 1/e in 1.5 cycles. "
            + "Shorten the probe's ground lead first: ringing that moves up is the probe's own. "
            + "If it stays where it is with the shortest ground, it is the board's: try a resistor in series at the driver, or a resistor and capacitor in series across the node.",
            Rounded(finding.Text));
    }

    [Theory]
    // A lead of 150 mm and 240 pF make 25 MHz: D26 scaled by √(10/240).
    [InlineData(240e-12, "That is near 25 MHz, which a ground lead of 150 mm and 240 pF make: suspect the probe first, and shorten its ground lead;")]
    [InlineData(10e-12, "That is far from 120 MHz, which a ground lead of 150 mm and 10.0 pF make: the ground lead is not the likely cause.")]
    public void Stated_ground_lead_is_compared(double capacitance, string sentence)
    {
        var plan = new Plan { Chain = MeasuringChain.Unknown with { GroundLead = 0.15, ProbeCapacitance = capacitance } };
        Assert.Contains(sentence, Assert.Single(Measure(plan, Ringing).Findings, f => f.Code == "ringing").Text, StringComparison.Ordinal);
    }

    [Fact]
    public void Two_modes_are_told_apart()
    {
        // Beside the 25 MHz of this file, 61 MHz of 15 % with 40 ns to 1/e: two and a half decay times hold six of its cycles.
        ReadingSheet sheet = Measure(Plan.Empty, t => Ringing(t) + (t > 0 ? 0.15 * Math.Exp(-t / 40e-9) * Math.Sin(2 * Math.PI * 61e6 * t) : 0));
        // What is left of the edge is 1e-4 of the ringing, as in the test of one mode; the weaker one has it thrice.
        Assert.Equal(Frequency, sheet.Value(Quantities.RingingFrequency), 3e-4 * Frequency);
        Assert.Equal(Decay, sheet.Value(Quantities.RingingDecayTime), 3e-3 * Decay);
        Reading beside = Assert.Single(sheet.Readings, r => r.Method == "rising-edge-fit-mode-2" && r.Quantity == Quantities.RingingFrequency);
        Assert.Equal(61e6, beside.Value, 3e-4 * 61e6);
        Assert.False(beside.IsPrimary);
        Assert.DoesNotContain(sheet.Readings, r => r.Method == "rising-edge-fit-mode-3");
    }

    [Fact]
    public void Stated_capacitance_gives_the_inductance()
    {
        var plan = new Plan { Conditions = new Dictionary<string, Condition> { ["node-capacitance"] = new(20e-12, "F"), ["node-capacitance-tolerance"] = new(10, "%") } };
        ReadingSheet sheet = Measure(plan, Ringing);
        // L = 1/(4π² f0² C) with f0² = f² + (α/2π)²: 2 µH.
        double f0 = double.Hypot(Frequency, 1 / (2 * Math.PI * Decay)), expected = 1 / (4 * Math.PI * Math.PI * f0 * f0 * 20e-12);
        // Twice the 1e-4 of the frequency's own test.
        Assert.Equal(expected, sheet.Value(Quantities.RingingInductance), 3e-4 * expected);
        Assert.Equal("the plan states the node's capacitance; compare with --added measures it", sheet.NotMeasured.Single(n => n.Quantity == Quantities.RingingCapacitance).Reason);
        // The capacitance's bound of 10 % is by far the widest term: at most that, and no less than 95 % of it.
        Assert.InRange(sheet.Primary(Quantities.RingingInductance)!.Budget.ExpandedUncertainty, 0.095 * expected, 0.1 * expected);
        Assert.Contains(sheet.Findings, f => f.Code == "ringing-loop");
        Assert.Contains(sheet.Findings, f => f.Code == "ringing-cure");
    }

    [Fact]
    public void Without_a_capacitance_there_is_no_inductance() =>
        Assert.Equal("a frequency alone gives no inductance: state the node's capacitance as node-capacitance in [conditions], "
            + "or capture again with a known capacitor across the node and compare the two with --added", Measure(Plan.Empty, Ringing).NotMeasured.Single(n => n.Quantity == Quantities.RingingInductance).Reason);

    [Fact]
    public void Smooth_edge_does_not_ring()
    {
        ReadingSheet sheet = Measure(Plan.Empty, t => ScopeReader.Numerics.BoundedNormal.NormalCumulative(t / 3e-9));
        Assert.All(sheet.NotMeasured.Where(n => n.Quantity.Id.StartsWith("ringing", StringComparison.Ordinal)),
            n => Assert.Equal(("no-ringing", "no ringing above 0.001 % of amplitude after the edges"), (n.Code, n.Reason)));
        Assert.Equal(8, sheet.NotMeasured.Count(n => n.Code == "no-ringing"));
        Assert.DoesNotContain(sheet.Findings, f => f.Code == "ringing");
    }

    [Fact]
    public void Single_pole_edge_does_not_ring() =>
        Assert.Contains(Measure(Plan.Empty, t => t < 0 ? 0 : 1 - Math.Exp(-t / 20e-9)).NotMeasured, n => n.Quantity == Quantities.RingingQ && n.Code == "no-ringing");

    [Fact]
    public void Without_an_edge_there_is_nothing_to_ring()
    {
        var sheet = new ReadingSheet();
        var waveform = new Waveform("made", "V", TimeAxis.PerSample, [0, 0, 0]);
        RingingAnalyser.Measure(new WaveformJob(waveform, Plan.Empty, new ChainErrors(Plan.Empty, waveform.Axis), sheet, default), [], []);
        NotMeasured[] ringing = [.. sheet.NotMeasured.Where(n => n.Code == "no-edge")];
        Assert.Equal(8, ringing.Length);
        Assert.All(ringing, n => Assert.Equal("there is no edge that could have set anything ringing", n.Reason));
    }

    private static double Ringing(double t)
    {
        double step = ScopeReader.Numerics.BoundedNormal.NormalCumulative(t * 2.5631031310892007 / 2e-9);
        // A sine is 0 at the middle, so that the 50 % instant stays there.
        return step + (t > 0 ? Amplitude / 100 * Math.Exp(-t / Decay) * Math.Sin(2 * Math.PI * Frequency * t) : 0);
    }

    private static ReadingSheet Measure(Plan plan, Func<double, double> step)
    {
        Waveform waveform = Steps.Record(step, 0.25e-9, 100e-9, 800e-9);
        (ReadingSheet sheet, IReadOnlyList<MeasuredEdge> edges) = Steps.Measure(waveform, plan: plan);
        RingingAnalyser.Measure(new WaveformJob(waveform, plan, new ChainErrors(plan, waveform.Axis), sheet, default), edges, []);
        return sheet;
    }

    // The amplitude has two decimals in the text; its last one is not what this test is about.
    private static string Rounded(string text) => System.Text.RegularExpressions.Regex.Replace(text, @"(39\.9\d|40\.0\d) %", "40 %");
}
