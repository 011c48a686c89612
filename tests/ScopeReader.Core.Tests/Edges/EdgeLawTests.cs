using ScopeReader.Captures;
using ScopeReader.Levels;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Edges;

/// <summary>What must not change, or change in a known way, when a capture is moved, scaled or turned over.</summary>
public class EdgeLawTests
{
    private static readonly Quantity[] Times = [Quantities.RiseTime, Quantities.FallTime, Quantities.RiseSettling];
    private static readonly Quantity[] Shares = [Quantities.RiseOvershoot, Quantities.RiseUndershoot, Quantities.FallOvershoot];
    private static readonly Quantity[] Ringing = [Quantities.RingingDampingRatio, Quantities.RingingAmplitude, Quantities.RingingQ];

    // Everything here is rounding, which windows that take a point in or leave it out can raise to a few parts in 1e8.
    private const double Same = 1e-6;

    private static readonly Waveform Original = new Recording { Interval = 4e-9, Count = 8_000, Noise = 0.004 }
        .Take(new SquareWave { RiseTime = 40e-9, Resonance = new Resonance(9e6, 0.12, 0.5) }.Signal);

    private static readonly ReadingSheet Reference = Sheet(Original);

    [Theory]
    [InlineData(3.7, 0)]
    [InlineData(0.02, -1.3)]
    public void Gain_and_offset_leave_times_and_shares_unchanged(double gain, double offset)
    {
        ReadingSheet sheet = Sheet(Changed(v => gain * v + offset, Original.Axis));
        foreach (Quantity quantity in (Quantity[])[.. Times, .. Shares, .. Ringing, Quantities.RingingFrequency])
            Assert.Equal(1, sheet.Value(quantity) / Reference.Value(quantity), Same);
        Assert.Equal(gain, sheet.Value(Quantities.RiseSlew) / Reference.Value(Quantities.RiseSlew), gain * Same);
    }

    [Fact]
    public void Time_shift_changes_nothing()
    {
        ReadingSheet sheet = Sheet(Changed(v => v, new TimeAxis(0.3, 4e-9, AxisSource.Column)));
        foreach (Quantity quantity in (Quantity[])[.. Times, .. Shares, .. Ringing, Quantities.RingingFrequency])
            Assert.Equal(Reference.Value(quantity), sheet.Value(quantity));
    }

    [Fact]
    public void Slower_sampling_of_a_slower_wave_scales_times_and_frequencies()
    {
        ReadingSheet sheet = Sheet(Changed(v => v, new TimeAxis(0, 1000 * 4e-9, AxisSource.Column)));
        foreach (Quantity quantity in Times)
            Assert.Equal(1000, sheet.Value(quantity) / Reference.Value(quantity), 1000 * Same);
        Assert.Equal(1e-3, sheet.Value(Quantities.RingingFrequency) / Reference.Value(Quantities.RingingFrequency), 1e-3 * Same);
        foreach (Quantity quantity in (Quantity[])[.. Shares, .. Ringing])
            Assert.Equal(1, sheet.Value(quantity) / Reference.Value(quantity), Same);
    }

    [Fact]
    public void Turned_over_rising_edges_are_falling_ones()
    {
        ReadingSheet sheet = Sheet(Changed(v => -v, Original.Axis));
        Assert.Equal(1, sheet.Value(Quantities.FallTime) / Reference.Value(Quantities.RiseTime), Same);
        Assert.Equal(1, sheet.Value(Quantities.FallOvershoot) / Reference.Value(Quantities.RiseOvershoot), Same);
        Assert.Equal(-1, sheet.Value(Quantities.FallSlew) / Reference.Value(Quantities.RiseSlew), Same);
    }

    [Fact]
    public void Without_an_interval_times_are_in_samples()
    {
        ReadingSheet sheet = Sheet(Changed(v => v, TimeAxis.PerSample));
        Reading rise = sheet.Primary(Quantities.RiseTime)!, ringing = sheet.Primary(Quantities.RingingFrequency)!;
        Assert.Equal(("sample", "1/sample"), (rise.Unit, ringing.Unit));
        Assert.Equal(1, rise.Value * 4e-9 / Reference.Value(Quantities.RiseTime), Same);
        Assert.Equal(1, ringing.Value / 4e-9 / Reference.Value(Quantities.RingingFrequency), Same);
        Assert.Equal("V/sample", sheet.Primary(Quantities.RiseSlew)!.Unit);
    }

    [Fact]
    public void Reference_levels_of_the_plan_are_used_and_named()
    {
        var plan = new Plan { Levels = LevelSettings.Default with { ReferenceLowPercent = 20, ReferenceHighPercent = 80 } };
        Reading rise = Sheet(Original, plan).Primary(Quantities.RiseTime)!;
        // The settling edge of a light resonance: between the ramp's 1.33 and the single pole's 1.58 (methods: IEEE 181 shapes).
        Assert.InRange(Reference.Value(Quantities.RiseTime) / rise.Value, 1.33, 1.58);
        Assert.StartsWith("20 to 80 %, ", rise.Note, StringComparison.Ordinal);
    }

    [Fact]
    public void Timebase_calibration_takes_its_error_out_of_times()
    {
        var plan = new Plan { Chain = MeasuringChain.Unknown with { TimebaseReadsPpm = 1000, TimebaseUncertaintyPpm = 1 } };
        // An instrument that reads frequencies 1000 ppm high shows times that much short.
        Assert.Equal(1.001, Sheet(Original, plan).Value(Quantities.RiseTime) / Reference.Value(Quantities.RiseTime), 1e-9);
        Assert.Equal(1 / 1.001, Sheet(Original, plan).Value(Quantities.RingingFrequency) / Reference.Value(Quantities.RingingFrequency), 1e-9);
    }

    private static Waveform Changed(Func<double, double> value, TimeAxis axis) =>
        new("made", "V", axis, [.. Original.Samples.ToArray().Select(value)]);

    private static ReadingSheet Sheet(Waveform waveform, Plan? plan = null)
    {
        var sheet = new ReadingSheet();
        Plan p = plan ?? Plan.Empty;
        WaveformAnalysis.Measure(new WaveformJob(waveform, p, new ChainErrors(p, waveform.Axis), sheet, default));
        return sheet;
    }
}
