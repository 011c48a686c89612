using ScopeReader.Captures;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Harmonics;

public class TraceMeasurementTests
{
    private static readonly SpectrumLines Source = Traces.Lines with { NoiseDbm = -85, Sweeps = 10 };

    private static readonly MeasuringChain Exact = new() { TimebaseTolerancePpm = 0, GainTolerancePercent = 0, FlatnessDb = 0 };

    [Fact]
    public void Line_as_narrow_as_the_filter_has_no_width_but_a_bound()
    {
        ReadingSheet sheet = Measure(Source.Take());
        NotMeasured three = sheet.NotMeasured.Single(n => n.Quantity == Quantities.Bandwidth3Db);
        Assert.Equal(("unresolved", "< 5.00 kHz: at most the resolution bandwidth of 5.00 kHz, whose filter is as wide there; narrow it"), (three.Code, three.Reason));
        // √2 times 5 kHz.
        Assert.StartsWith("< 7.07 kHz: at most", sheet.NotMeasured.Single(n => n.Quantity == Quantities.Bandwidth6Db).Reason, StringComparison.Ordinal);
        // 4.4645 times 5 kHz, and the noise is 75 dB down.
        Assert.StartsWith("< 22.3 kHz: at most", sheet.NotMeasured.Single(n => n.Quantity == Quantities.Bandwidth60Db).Reason, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void Line_wider_than_the_filter_has_its_own_width(bool gaussian)
    {
        // A line of 20 kHz seen through 5 kHz: Gaussian √(400 + 25) = 20.616 kHz; a Lorentzian one by Olivero and Longbothum's formula
        // 0.5346·20 + √(0.2166·400 + 25) = 21.259 kHz, near its top as a Gaussian of that width.
        double seen = gaussian ? Math.Sqrt(425) : 0.5346 * 20 + Math.Sqrt(0.2166 * 400 + 25);
        double[] f = [.. Enumerable.Range(0, 2001).Select(i => 1e6 + 100.0 * i)];
        var noise = new NormalNoise(5);
        // On a floor of -100 dBm that scatters by 3 %: nothing, 87 dB above it.
        double[] levels = [.. f.Select(x => 10 * Math.Log10(Math.Pow(10, -1 - 0.3010299956639812 * Math.Pow((x - 1.1e6) / (seen * 500), 2)) + 1e-10 * (1 + 0.03 * noise.Normal())))];
        Reading width = Measure(new SpectrumTrace("wide", "dBm", f, levels, 5e3)).Readings.Single(r => r.Quantity == Quantities.Bandwidth3Db);
        Assert.InRange(20e3, width.Value - width.Budget.ExpandedUncertainty, width.Value + width.Budget.ExpandedUncertainty);
        Assert.InRange(width.Budget.ExpandedUncertainty, 0, 1e3);
    }

    [Fact]
    public void Noise_that_is_too_near_leaves_the_widths_far_down_unmeasured()
    {
        NotMeasured sixty = Measure((Source with { NoiseDbm = -70 }).Take()).NotMeasured.Single(n => n.Quantity == Quantities.Bandwidth60Db);
        Assert.Equal("noise", sixty.Code);
        Assert.Contains("this width needs 70 dB", sixty.Reason, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(TraceAveraging.Power, 0.35)]
    [InlineData(TraceAveraging.Unknown, 1.6)]
    public void Noise_density_counts_the_filters_noise_bandwidth(TraceAveraging averaging, double most)
    {
        // -85 dBm in 5 kHz · 1.06447: -122.26 dBm/Hz.
        Reading density = Measure(Stated(Source.Take(), averaging)).Readings.Single(r => r.Quantity == Quantities.NoiseDensity);
        Assert.InRange(-85 - 10 * Math.Log10(5e3 * 1.06446701943123), density.Value - density.Budget.ExpandedUncertainty, density.Value + density.Budget.ExpandedUncertainty);
        Assert.InRange(density.Budget.ExpandedUncertainty, 0, most);
    }

    [Fact]
    public void Averaged_levels_are_corrected()
    {
        // Fifty sweeps averaged in dB: E60, 2.507 dB low. 2000 points of 50: 5.57/√100000 = 0.02 dB; the filter's bound is 0.25 dB.
        var noise = new NormalNoise(3);
        double[] f = [.. Enumerable.Range(0, 2001).Select(i => 100e3 + 1000.0 * i)], levels = [.. f.Select(_ => Enumerable.Range(0, 50).Average(_ => -80 + 10 * Math.Log10(-Math.Log(1 - noise.Uniform()))))];
        Reading density = Measure(Stated(new SpectrumTrace("noise", "dBm", f, levels, 1e3), TraceAveraging.Level)).Readings.Single(r => r.Quantity == Quantities.NoiseDensity);
        Assert.Equal(-80 - 10 * Math.Log10(1064.46701943123), density.Value, 0.08);
        Assert.Contains("2.51 dB added", density.Note, StringComparison.Ordinal);
    }

    [Fact]
    public void Peak_detector_has_no_noise_density()
    {
        ReadingSheet sheet = Measure(Stated(Source.Take(), TraceAveraging.Peak));
        Assert.Equal("peak-detector", sheet.NotMeasured.Single(n => n.Quantity == Quantities.NoiseDensity).Code);
    }

    [Fact]
    public void Channel_power_of_lines_is_their_sum()
    {
        // -10, -45 and -60 dBm, and 2 MHz of noise of -122.26 dBm/Hz, -59.25 dBm: 0.0015 dB above -10 dBm. The filter's bound is 0.25 dB.
        Reading power = Measure(Stated(Source.Take(), TraceAveraging.Power)).Readings.Single(r => r.Quantity == Quantities.ChannelPower);
        Assert.Equal(-9.9985, power.Value, 0.02);
    }

    [Fact]
    public void Points_further_apart_than_the_filter_is_wide_have_no_channel_power() =>
        Assert.Equal("point-spacing", Measure((Source with { Count = 301 }).Take()).NotMeasured.Single(n => n.Quantity == Quantities.ChannelPower).Code);

    [Fact]
    public void Gaussian_band_has_its_occupied_bandwidth()
    {
        // E63: 5.1517 σ = 515.17 kHz.
        Reading band = Measure(new GaussianBand().Take()).Readings.Single(r => r.Quantity == Quantities.OccupiedBandwidth);
        Assert.InRange(515165.86070978, band.Value - band.Budget.ExpandedUncertainty, band.Value + band.Budget.ExpandedUncertainty);
        Assert.InRange(band.Budget.ExpandedUncertainty, 0, 0.03 * 515e3);
    }

    [Fact]
    public void Occupied_bandwidth_is_refused_of_a_bare_line_and_of_a_span_that_the_signal_fills()
    {
        SpectrumLines one = Source with { Lines = [new(455.3e3, -10)], Start = 400e3, Stop = 500e3, Count = 1001, NoiseDbm = -100 };
        Assert.Equal("unresolved", Measure(one.Take()).NotMeasured.Single(n => n.Quantity == Quantities.OccupiedBandwidth).Code);
        Assert.Equal("noise", Measure(new GaussianBand { Start = 9.7e6, Stop = 10.3e6 }.Take()).NotMeasured.Single(n => n.Quantity == Quantities.OccupiedBandwidth).Code);
    }

    [Fact]
    public void Multiples_of_one_frequency_are_called_a_comb_and_other_lines_spurs()
    {
        ReadingSheet sheet = Measure((Source with { Lines = [.. Source.Lines, new(700e3, -50)] }).Take());
        Assert.Equal("3 lines are multiples of 455.30 kHz, up to 3 times: harmonics of one source", sheet.Findings.Single(f => f.Code == "comb").Text);
        // Noise 35 dB down moves the top by hundredths of a kilohertz.
        Assert.Matches("^a line that is no harmonic: (699.9|700.0). kHz .-(39.9|40.0|40.1) dBc.: ", sheet.Findings.Single(f => f.Code == "spurs").Text);
    }

    [Fact]
    public void Level_is_converted_with_a_stated_impedance_only()
    {
        // E55: dBm - dBV = 13.0103 dB in 50 ohm.
        SpectrumTrace trace = (Source with { NoiseDbm = null }).Take();
        Assert.Equal(-23.0102999566398, Measure(trace, Exact with { Impedance = 50 }).Readings.Single(r => r.Quantity == Quantities.PeakLevel).Value, 1e-6);
        Assert.Equal("no-impedance", Measure(trace).NotMeasured.Single(n => n.Quantity == Quantities.PeakLevel).Code);
    }

    [Fact]
    public void Without_a_resolution_bandwidth_there_is_no_power_and_widths_are_bounds()
    {
        SpectrumTrace trace = Source.Take();
        ReadingSheet sheet = Measure(new SpectrumTrace("t", "dBm", trace.Frequencies.ToArray(), trace.Levels.ToArray()));
        foreach (Quantity quantity in new[] { Quantities.ChannelPower, Quantities.NoiseDensity, Quantities.Bandwidth3Db })
            Assert.Equal("no-resolution-bandwidth", sheet.NotMeasured.Single(n => n.Quantity == quantity).Code);
    }

    private static SpectrumTrace Stated(SpectrumTrace trace, TraceAveraging averaging) =>
        new(trace.Name, trace.Unit, trace.Frequencies.ToArray(), trace.Levels.ToArray(), trace.ResolutionBandwidth) { Averaging = averaging };

    private static ReadingSheet Measure(SpectrumTrace trace, MeasuringChain? chain = null)
    {
        var sheet = new ReadingSheet();
        SpectrumAnalysis.Measure(trace, new Plan { Chain = chain ?? Exact }, sheet);
        return sheet;
    }
}
