using ScopeReader.Captures;
using ScopeReader.Frequency;
using ScopeReader.Readings;
using ScopeReader.Signals;
using static ScopeReader.Tests.Waves;

namespace ScopeReader.Tests.Frequency;

public class FrequencyAnalyserTests
{
    // Source: the made wave's frequency. Tolerance: four stated standard uncertainties, themselves held in bounds.
    [Theory]
    [InlineData(5.3, 0.03, "crossings")]
    [InlineData(20.7, 0.01, "harmonic-fit")]
    [InlineData(50.37, 0.01, "harmonic-fit")]
    [InlineData(97.3, 0.1, "harmonic-fit")]
    public void Frequency_of_a_noisy_square_wave(double samplesPerCycle, double noise, string method)
    {
        Reading reading = Measure(Square(samplesPerCycle, 20000, noise, new SquareWave { RiseTime = (samplesPerCycle > 10 ? 2.5 : 0.6) / 455e3 / samplesPerCycle })).Reading(Quantities.Frequency);

        Assert.InRange(reading.Value - 455e3, -4 * reading.Budget.StandardUncertainty, 4 * reading.Budget.StandardUncertainty);
        Assert.InRange(reading.Budget.StandardUncertainty / 455e3, 1e-9, 20e-6);
        Assert.Equal(method, reading.Method);
    }

    [Theory]
    [InlineData(2.7)]
    [InlineData(20.7)]
    [InlineData(97.3)]
    public void A_sine_is_measured_by_its_fit(double samplesPerCycle)
    {
        var noise = new NormalNoise(8);
        Reading reading = Measure(Of(20000, i => Math.Sin(2 * Math.PI * i / samplesPerCycle + 1) + 0.01 * noise.Normal(), 1)).Reading(Quantities.Frequency);

        Assert.Equal("sine-fit", reading.Method);
        Assert.Equal("primary: on a sine the fit uses every sample", reading.Note);
        Assert.InRange(reading.Value - 1 / samplesPerCycle, -4 * reading.Budget.StandardUncertainty, 4 * reading.Budget.StandardUncertainty);
    }

    [Fact]
    public void Stated_uncertainties_are_the_spread_of_repeated_captures()
    {
        Quantity[] quantities = [Quantities.Frequency, Quantities.HighWidth, Quantities.LowWidth, Quantities.DutyFactor];
        Reading[][] runs = [.. Enumerable.Range(1, 60).Select(seed =>
        {
            ChannelMeasurement measured = Measure(Square(47.3, 4000, 0.02, new SquareWave { RiseTime = 150e-9, DutyFactor = 0.4 }, (ulong)seed));
            return quantities.Select(measured.Reading).ToArray();
        })];
        for (int q = 0; q < quantities.Length; q++)
        {
            double mean = runs.Average(r => r[q].Value), spread = Math.Sqrt(runs.Sum(r => Math.Pow(r[q].Value - mean, 2)) / (runs.Length - 1));
            // Tolerance: the 0.8 to 1.3 that is asked of every quantity, and three times the 9 % to which 60 runs know a spread.
            Assert.InRange(runs.Average(r => r[q].Budget.StandardUncertainty) / spread, 0.8 * 0.73, 1.3 * 1.27);
        }
    }

    // The trap: 50.001 samples a cycle keeps every crossing at one place between two samples, and averaging does not help.
    [Theory]
    [InlineData(0.5)]
    [InlineData(1)]
    [InlineData(2)]
    public void Near_commensurate_sampling_stays_inside_the_stated_bound_and_is_found(double edgeSamples)
    {
        ChannelMeasurement measured = Measure(Square(50.001, 10000, wave: new SquareWave { RiseTime = edgeSamples / 455e3 / 50.001 }));
        Reading reading = measured.Reading(Quantities.Frequency);

        Assert.InRange(reading.Value - 455e3, -reading.Budget.ExpandedUncertainty, reading.Budget.ExpandedUncertainty);
        Assert.Contains(reading.Budget.Terms, t => t.Name == "interpolation" && t.Distribution == Distribution.Rectangular);
        Assert.StartsWith("50.00", measured.Findings.Single(f => f.Code == "near-commensurate-sampling").Text, StringComparison.Ordinal);
    }

    // Same edges at 50.37: methods of this kind leave 0.06 ppm with edges of one sample (simulated outside this project).
    [Fact]
    public void Sampling_that_spreads_the_crossings_needs_no_bound()
    {
        ChannelMeasurement measured = Measure(Square(50.37, 10000, wave: new SquareWave { RiseTime = 1 / 455e3 / 50.37 }));

        Assert.Equal(455e3, measured.Reading(Quantities.Frequency).Value, 0.06e-6 * 455e3);
        Assert.DoesNotContain(measured.Findings, f => f.Code == "near-commensurate-sampling");
    }

    [Theory]
    [InlineData(3, 2, 0)]
    [InlineData(0.01, -5, 0)]
    [InlineData(1, 0, 1.7)]
    public void Gain_offset_and_start_time_change_nothing(double gain, double offset, double start)
    {
        double[] samples = Square(47.3, 4000, 0.02).Samples.ToArray();
        ChannelMeasurement one = Measure(Of(samples)), other = Measure(new Waveform("made", "V", new TimeAxis(start, 1e-8, AxisSource.Column), [.. samples.Select(v => gain * v + offset)]));

        foreach (Quantity quantity in new[] { Quantities.Frequency, Quantities.Period, Quantities.DutyFactor, Quantities.HighWidth })
        {
            // Tolerance: rounding of 5 V under a 10 mV swing, carried to instants by the slope: 1e-12 of the value.
            Assert.Equal(1, other.Reading(quantity).Value / one.Reading(quantity).Value, 1e-10);
            Assert.Equal(1, other.Reading(quantity).Budget.StandardUncertainty / one.Reading(quantity).Budget.StandardUncertainty, 1e-6);
        }
    }

    // Law: twice the interval, half the frequency, in value and uncertainty.
    [Fact]
    public void The_sample_rate_scales_times_and_frequencies()
    {
        double[] samples = Square(47.3, 4000, 0.02).Samples.ToArray();
        ChannelMeasurement one = Measure(Of(samples)), other = Measure(Of(samples, 2e-8));

        Assert.Equal(0.5, other.Reading(Quantities.Frequency).Value / one.Reading(Quantities.Frequency).Value, 1e-14);
        Assert.Equal(2, other.Reading(Quantities.HighWidth).Budget.StandardUncertainty / one.Reading(Quantities.HighWidth).Budget.StandardUncertainty, 1e-12);
        Assert.Equal(1, other.Reading(Quantities.DutyFactor).Value / one.Reading(Quantities.DutyFactor).Value, 1e-14);
    }

    // C01: 10.000123 MHz against 10 MHz is 12.3 ppm, closed form.
    [Fact]
    public void Deviation_from_nominal_is_in_millionths() => Assert.Equal(12.3, FrequencyAnalyser.PartsPerMillion(10.000123e6, 10e6), 1e-9);

    // C02: 10.000123 MHz on an instrument that shows 1 MHz as 1.000018 MHz is -5.69989740184677 ppm from 10 MHz.
    [Fact]
    public void A_calibrated_timebase_corrects_the_frequency()
    {
        var plan = new Plan { Nominal = 10e6, Chain = Exact with { TimebaseTolerancePpm = null, TimebaseReadsPpm = 18, TimebaseUncertaintyPpm = 0.1 } };
        Reading reading = Measure(Of(20000, i => Math.Sin(2 * Math.PI * 10.000123e6 * i * 3.1e-9), 3.1e-9), plan).Reading(Quantities.FrequencyError);

        // Tolerance: 1e-6 ppm, as the table has it; the noise-free fit is better than that.
        Assert.Equal(-5.69989740184677, reading.Value, 1e-6);
        Assert.Equal(0.1, reading.Budget.StandardUncertainty, 0.001);
    }

    // A31: 250 ns high in 1 µs is a duty factor of 0.25.
    [Fact]
    public void Duty_factor_is_width_over_period()
    {
        ChannelMeasurement measured = Measure(Square(103.7, 20000, wave: new SquareWave { Frequency = 1e6, DutyFactor = 0.25, RiseTime = 40e-9 }));

        // Tolerance: 1e-5 of a period is a thousandth of a sample, what a noise-free edge of four samples is read to.
        Assert.Equal(25, measured.Reading(Quantities.DutyFactor).Value, 1e-3);
        Assert.Equal(250e-9, measured.Reading(Quantities.HighWidth).Value, 1e-11);
        Assert.Equal(750e-9, measured.Reading(Quantities.LowWidth).Value, 1e-11);
    }

    [Fact]
    public void Without_an_interval_everything_is_per_sample()
    {
        ChannelMeasurement measured = Measure(new Waveform("made", "V", TimeAxis.PerSample, Square(47.3, 4000).Samples.ToArray()), new Plan { Nominal = 455e3 });

        Assert.Equal("1/sample", measured.Reading(Quantities.Frequency).Unit);
        Assert.Equal("sample", measured.Reading(Quantities.HighWidth).Unit);
        Assert.Equal("the file states no sample interval; give it with --interval or --rate", measured.Reason(Quantities.FrequencyError));
    }

    [Fact]
    public void Without_a_nominal_the_key_and_the_option_are_named() =>
        Assert.Equal("no nominal frequency to compare with; add nominal to the plan, or give --nominal", Measure(Square(47.3, 4000)).Reason(Quantities.FrequencyError));

    [Fact]
    public void One_edge_is_no_frequency() =>
        Assert.Equal("the record holds 1 edge, and a period needs two of one direction; capture more cycles", Measure(Square(275.1, 150)).Reason(Quantities.Frequency));

    [Fact]
    public void Noise_has_no_frequency()
    {
        var noise = new NormalNoise(9);
        Assert.Equal("the edges keep no steady period; check the trigger, and that one signal is on the channel", Measure(Of(20000, _ => noise.Normal())).Reason(Quantities.Frequency));
    }

    [Fact]
    public void A_probe_with_capacitance_may_pull_the_source() => Assert.Equal(
        "the probe adds 10 pF to the node: at an oscillator's own pin that pulls the frequency, a crystal's typically by 10 to 30 ppm per pF (common practice), and no budget covers it; measure at a buffered output, or repeat with a smaller capacitance",
        Measure(Square(47.3, 4000), new Plan { Chain = Exact with { ProbeCapacitance = 10e-12 } }).Findings.Single(f => f.Code == "probe-loading").Text);

    [Fact]
    public void Few_cycles_are_said() => Assert.Equal(
        "4.2 cycles in the record: the frequency rests on little; ten times the record makes it about thirty times as certain",
        Measure(Square(47.3, 200)).Findings.Single(f => f.Code == "few-cycles").Text);
}
