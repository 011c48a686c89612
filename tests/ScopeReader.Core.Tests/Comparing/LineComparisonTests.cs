using ScopeReader.Captures;
using ScopeReader.Comparing;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Comparing;

public class LineComparisonTests
{
    private static readonly Plan Known = new() { Chain = new MeasuringChain { TimebaseTolerancePpm = 25, GainTolerancePercent = 3, OffsetTolerance = 0, FlatnessDb = 0.5, Impedance = 50 } };

    private static readonly SpectrumLines Trace = new()
    {
        // 0.2 V peak in 50 ohm is -3.979 dBm.
        Lines = [new(455e3, -3.979), new(910e3, -43.979), new(1365e3, -53.979)],
        Start = 100e3,
        Stop = 2.1e6,
        Count = 2001,
        ResolutionBandwidth = 5e3,
        NoiseDbm = -90,
        Sweeps = 10,
    };

    [Fact]
    public void Waveform_and_trace_of_one_source_agree_line_by_line()
    {
        Comparison comparison = Compare(Sine(-40, -50), Trace.Take());
        Assert.Equal(["frequency", "fundamental-power", "fundamental-level", "harmonic-2", "harmonic-3", "worst-harmonic"], comparison.Differences.Select(d => d.Quantity.Id));
        Assert.All(comparison.Differences, d => Assert.False(d.IsSignificant));
        Assert.Equal("2 harmonics were compared line by line, and none differs by more than its uncertainty", comparison.Findings.Single(f => f.Code == "lines").Text);
        Assert.DoesNotContain(comparison.Findings, f => f.Code == "channel-alone");
    }

    [Fact]
    public void Line_that_differs_is_named()
    {
        // The trace's third harmonic is 5 dB lower than the waveform's: two flatnesses of ±0.5 dB do not explain it.
        Comparison comparison = Compare(Trace.Take(), Sine(-40, -45));
        Assert.StartsWith("of 2 harmonics compared line by line, harmonic-3 (+5.0 dB) differ", comparison.Findings.Single(f => f.Code == "lines").Text, StringComparison.Ordinal);
        // Both chains count: the sum of two rectangles of 0.5 dB and a little noise.
        Assert.InRange(comparison.Differences.Single(d => d.Quantity.Id == "harmonic-2").Budget.StandardUncertainty, 0.5 * Math.Sqrt(2.0 / 3), 0.5);
    }

    [Fact]
    public void Lines_that_only_one_of_two_traces_has_are_named()
    {
        Comparison comparison = Compare(Trace.Take(), (Trace with { Lines = [Trace.Lines[0], Trace.Lines[2], new(700e3, -50)] }).Take());
        // Noise 40 dB down moves a top by hundredths of a kilohertz.
        Assert.Matches("^only the reference shows a line at (909.9|910.0). kHz .-4[34].. dBm.$", comparison.Findings.Single(f => f.Code == "lines-gone").Text);
        Assert.Matches("^the reference does not show a line at (699.9|700.0). kHz .-(49|50).. dBm.$", comparison.Findings.Single(f => f.Code == "lines-new").Text);
    }

    private static Waveform Sine(double second, double third) => new Recording { Interval = 2e-8, Count = 50_000, Noise = 1e-4, Delay = 1e-7 }
        .Take(new HarmonicSine { Frequency = 455e3, Amplitude = 0.2, Harmonics = [new(2, second, 30), new(3, third, 60)] }.Build());

    private static Comparison Compare(Channel reference, Channel compared) => Comparison.Of(Side("a", reference), [Side("b", compared)]);

    private static ComparedSide Side(string name, Channel channel) => new([Analysis.Measure(new Capture(name, "", [channel], []), Known)]);
}
