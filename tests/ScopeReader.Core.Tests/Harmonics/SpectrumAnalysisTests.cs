using ScopeReader.Captures;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Harmonics;

public class SpectrumAnalysisTests
{
    private static readonly SpectrumLines Source = Traces.Lines;

    private static readonly Plan Known = new()
    {
        Nominal = 455e3,
        Chain = new MeasuringChain { TimebaseTolerancePpm = 0, GainTolerancePercent = 0, FlatnessDb = 0 },
    };

    [Fact]
    public void Lines_without_noise_are_where_and_as_high_as_they_were_made()
    {
        ReadingSheet sheet = Measure(Source.Take());
        // A Gaussian filter makes the parabola exact: what is left is the rounding of the levels. The neighbour's skirt, 455 kHz
        // away in a filter of 5 kHz, is nothing.
        Assert.Equal(455.3e3, Value(sheet, "peak-frequency"), 1e-3);
        Assert.Equal(-10, Value(sheet, "peak-power"), 1e-6);
        Assert.Equal(-35, Value(sheet, "harmonic-2"), 1e-6);
        Assert.Equal(-50, Value(sheet, "harmonic-3"), 1e-6);
        Assert.Equal(-35, Value(sheet, "worst-harmonic"), 1e-6);
        Assert.Equal(300 / 455e3 * 1e6, Value(sheet, "frequency-error"), 1e-2);
    }

    [Fact]
    public void Points_a_kilohertz_apart_are_said_to_be_too_coarse_for_ppm()
    {
        // A tenth of a point, 100 Hz of 455 kHz, is 220 ppm; the 95 % bound of a rectangle is 0.95 of that: 209 ppm, to two digits 210.
        Assert.Contains("±210 ppm at best", Measure(Source.Take()).Findings.Single(f => f.Code == "frequency-from-trace").Text, StringComparison.Ordinal);
    }

    [Fact]
    public void Harmonics_beyond_the_span_or_in_the_noise_have_reasons()
    {
        ReadingSheet sheet = Measure((Source with { NoiseDbm = -85, Sweeps = 10 }).Take());
        Assert.Equal("outside-span", sheet.NotMeasured.Single(n => n.Quantity.Id == "harmonic-5").Code);
        NotMeasured four = sheet.NotMeasured.Single(n => n.Quantity.Id == "harmonic-4");
        Assert.Equal("below-noise", four.Code);
        // The noise is -75 dBc; the bound lies 3 dB or a little more above it.
        Assert.InRange(double.Parse(four.Reason.Split(' ')[1], System.Globalization.CultureInfo.InvariantCulture), -73, -69);
    }

    [Fact]
    public void Noise_is_taken_off_a_line_near_it()
    {
        // A line of -60 dBc, 10 dB above the noise: line and noise read 0.41 dB (1.1 in power) above the line. 20,000 sweeps leave 0.02 dB.
        SpectrumLines near = Source with { Lines = [new(455.3e3, -10), new(2 * 455.3e3, -70)], NoiseDbm = -80, Sweeps = 20_000, Count = 601, Start = 400e3, Stop = 1e6 };
        Assert.Equal(-60, Value(Measure(near.Take()), "harmonic-2"), 0.1);
    }

    [Fact]
    public void Feed_through_at_the_start_of_the_span_is_no_line()
    {
        SpectrumLines withFeedThrough = Source with { Start = 0, Lines = [.. Source.Lines, new(0, 5)] };
        Assert.Equal(455.3e3, Value(Measure(withFeedThrough.Take()), "peak-frequency"), 1e-3);
    }

    [Fact]
    public void Strongest_line_may_be_the_second_harmonic()
    {
        SpectrumLines doubled = Source with { Lines = [new(455.3e3, -20), new(2 * 455.3e3, -10), new(3 * 455.3e3, -40)] };
        foreach (Plan plan in new[] { Known, Known with { Nominal = null } })
        {
            ReadingSheet sheet = Measure(doubled.Take(), plan);
            Assert.Equal(2 * 455.3e3, Value(sheet, "peak-frequency"), 1e-3);
            Assert.Equal(10, Value(sheet, "harmonic-2"), 1e-6);
            Assert.Equal(-20, Value(sheet, "harmonic-3"), 1e-6);
        }
    }

    [Fact]
    public void Volts_and_microvolts_become_dBV_and_watts_dBm()
    {
        SpectrumTrace trace = Source.Take();
        double[] dbm = trace.Levels.ToArray(), f = trace.Frequencies.ToArray();
        // The same numbers on other scales: -10 dB relative to 1 V, to 1 µV and to 1 mW.
        Assert.Equal(-10, Value(Measure(new SpectrumTrace("v", "V", f, [.. dbm.Select(v => Math.Pow(10, v / 20))])), "peak-level"), 1e-6);
        Assert.Equal(-130, Value(Measure(new SpectrumTrace("u", "dBµV", f, dbm)), "peak-level"), 1e-6);
        Assert.Equal(20, Value(Measure(new SpectrumTrace("w", "W", f, [.. dbm.Select(v => Math.Pow(10, v / 10))])), "peak-power"), 1e-6);
        Assert.All(Measure(new SpectrumTrace("a", "A", f, dbm)).NotMeasured, n => Assert.Equal("unit", n.Code));
    }

    [Fact]
    public void Line_between_points_that_are_too_far_apart_is_refused()
    {
        ReadingSheet sheet = Measure((Source with { Count = 101 }).Take());
        Assert.Empty(sheet.Readings);
        Assert.Equal("unresolved", sheet.NotMeasured.Single(n => n.Quantity == Quantities.PeakFrequency).Code);
    }

    [Fact]
    public void Noise_alone_has_no_line()
    {
        // One record of a hundred may show one by the threshold's construction: this seed is not that one.
        ReadingSheet sheet = Measure((Source with { Lines = [], NoiseDbm = -80 }).Take());
        Assert.Equal("no-line", sheet.NotMeasured.Single(n => n.Quantity == Quantities.PeakFrequency).Code);
        Assert.Equal("no-line", sheet.NotMeasured.Single(n => n.Quantity == Quantities.WorstHarmonic).Code);
        // What noise has, it has without a line: -80 dBm in 5 kHz · 1.0645.
        Assert.Equal(["channel-power", "noise-density"], sheet.Readings.Select(r => r.Quantity.Id).Order());
        Assert.Equal(-80 - 10 * Math.Log10(5322.3), Value(sheet, "noise-density"), 0.5);
    }

    private static ReadingSheet Measure(SpectrumTrace trace, Plan? plan = null)
    {
        var sheet = new ReadingSheet();
        SpectrumAnalysis.Measure(trace, plan ?? Known, sheet);
        return sheet;
    }

    private static double Value(ReadingSheet sheet, string id) => sheet.Readings.Single(r => r.Quantity.Id == id).Value;
}
