using ScopeReader.Captures;
using ScopeReader.Frequency;
using ScopeReader.Harmonics;
using ScopeReader.Levels;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Harmonics;

public class HarmonicAnalyserTests
{
    private static readonly MeasuringChain Known = new() { GainTolerancePercent = 0, FlatnessDb = 0, Impedance = 50 };

    [Fact]
    public void Harmonics_without_noise_are_those_that_were_put_in()
    {
        ReadingSheet sheet = Measure(Source(-40, -55, -70));
        // A joint fit has no method error: what is left are roundings, 1e-15 of the fundamental, 3e-12 of a line of -70 dBc.
        Assert.Equal(-40, Value(sheet, "harmonic-2"), 1e-9);
        Assert.Equal(-55, Value(sheet, "harmonic-3"), 1e-9);
        Assert.Equal(-70, Value(sheet, "harmonic-4"), 1e-9);
        Assert.Equal(-40, Value(sheet, "worst-harmonic"), 1e-9);
        Assert.Equal(100 * Math.Sqrt(1e-4 + Math.Pow(10, -5.5) + 1e-7), Value(sheet, "thd"), 1e-9);
        // 1 V peak is 1/√2 V rms: -3.0103 dBV, and with E55's 13.0103 dB 10 dBm in 50 ohm.
        Assert.Equal(-3.01029995663981, Value(sheet, "fundamental-level"), 1e-9);
        Assert.Equal(10, Value(sheet, "fundamental-power"), 1e-9);
    }

    [Fact]
    public void Square_wave_has_its_series_however_few_periods_there_are()
    {
        var wave = new SquareWave { Frequency = 1e6, RiseTime = 40e-9, DutyFactor = 0.3 };
        var taken = new Recording { Interval = 4e-9, Count = 1037 }.Take(wave.Signal);
        ReadingSheet sheet = Measure(taken, 1e6 * 4e-9);
        // Edges of 10 samples leave nothing above half of the sample rate: exp(-2π²(125·0.0156)²) = 1e-33. Rounding as above.
        foreach (string id in new[] { "harmonic-2", "harmonic-3", "harmonic-5", "thd", "thd-r" })
            Assert.Equal(wave.Truth()[id], Value(sheet, id), 1e-6);
    }

    [Fact]
    public void Harmonic_under_the_noise_is_a_bound_and_no_number()
    {
        // E71, E72: SNR 50 dB, N 10000: noise alone is -86.99 dBc on average, one in a hundred 6.63 dB above that.
        Waveform taken = new Recording { Interval = 1e-8, Count = 10_000, Noise = Math.Sqrt(0.5e-5), Seed = 4 }.Take(Source().Signal);
        ReadingSheet sheet = Measure(taken, 1.003e6 * 1e-8);
        NotMeasured reason = sheet.NotMeasured.First(n => n.Code == "below-noise" && n.Quantity.Id.StartsWith("harmonic-", StringComparison.Ordinal));
        double bound = double.Parse(reason.Reason.Split(' ')[1], System.Globalization.CultureInfo.InvariantCulture);
        // A median of 400 densities is good to 7 %, 0.3 dB; three times that.
        Assert.Equal(-86.9897000433602 + 6.63245684363444, bound, 0.9);
        Assert.Contains(sheet.NotMeasured, n => n.Quantity == Quantities.Thd && n.Reason.StartsWith("< ", StringComparison.Ordinal));
    }

    [Fact]
    public void Harmonics_above_half_of_the_sample_rate_are_refused_with_the_rate_that_shows_them()
    {
        ReadingSheet sheet = Measure(new Recording { Interval = 1e-7, Count = 10_000 }.Take(Source(-40, -55, -70).Signal), 1.003e6 * 1e-7);
        Assert.Contains(sheet.Readings, r => r.Quantity.Id == "harmonic-4");
        NotMeasured reason = sheet.NotMeasured.Single(n => n.Quantity.Id == "harmonic-5");
        Assert.Equal("above-nyquist", reason.Code);
        // 2.2 · 5 · 1.003 MHz.
        Assert.Equal("harmonic 5 lies above half of the sample rate; sample at 11 MSa/s or more", reason.Reason);
        Assert.Equal("above-nyquist", sheet.NotMeasured.Single(n => n.Quantity == Quantities.Thd).Code);
    }

    [Fact]
    public void Voltage_has_no_power_without_an_impedance()
    {
        ReadingSheet sheet = Measure(Source(-40), Known with { Impedance = null });
        Assert.Contains("add impedance to [chain]", sheet.NotMeasured.Single(n => n.Quantity == Quantities.FundamentalPower).Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void Unstated_flatness_leaves_harmonics_as_indicated()
    {
        ReadingSheet sheet = Measure(Source(-40), MeasuringChain.Unknown);
        Assert.Equal(["flatness"], sheet.Readings.Single(r => r.Quantity.Id == "harmonic-2").Budget.Missing);
        Assert.Equal(["gain", "flatness"], sheet.Readings.Single(r => r.Quantity.Id == "fundamental-level").Budget.Missing);
    }

    [Fact]
    public void Two_cycles_are_too_few()
    {
        ReadingSheet sheet = Measure(new Recording { Interval = 1e-8, Count = 200 }.Take(Source(-40).Signal), 1.003e6 * 1e-8);
        Assert.Empty(sheet.Readings);
        Assert.All(sheet.NotMeasured, n => Assert.Equal("too-few-cycles", n.Code));
    }

    [Fact]
    public void Line_at_the_instruments_own_floor_is_named()
    {
        ReadingSheet sheet = Measure(Source(-40, -55), Known with { DistortionFloorDbc = -50 });
        Assert.StartsWith("harmonic-3: at the instrument's own floor of -50.0 dBc", sheet.Findings.Single(f => f.Code == "own-distortion").Text, StringComparison.Ordinal);
    }

    [Fact]
    public void Roll_off_counts_beyond_a_third_of_the_bandwidth()
    {
        ReadingSheet sheet = Measure(Source(-40, -55, -70), Known with { InputBandwidth = 10e6 });
        // 0.3 · 10 MHz lies between harmonics 2 and 3; a Gaussian response loses 3.0103·0.1003²·(4² - 1) = 0.4543 dB at 4 against 1.
        Assert.DoesNotContain(Terms(sheet, "harmonic-2"), t => t.Name == "roll-off");
        Assert.Contains(Terms(sheet, "harmonic-3"), t => t.Name == "roll-off");
        Assert.Equal(0.4543 / Math.Sqrt(3), Terms(sheet, "harmonic-4").Single(t => t.Name == "roll-off").Contribution, 1e-4);
        Assert.Equal("bandwidth", sheet.Findings.Single(f => f.Code == "roll-off").Value);
    }

    [Fact]
    public void Third_harmonic_of_a_square_wave_is_called_its_shape()
    {
        var sheet = new ReadingSheet();
        sheet.Add(new Reading(Quantities.DutyFactor, 50, "%", new Budget([]), "made"));
        Waveform taken = new Recording { Interval = 1e-8, Count = 10_000 }.Take(new SquareWave { Frequency = 1.003e6 }.Signal);
        Measure(taken, 1.003e6 * 1e-8, Known, sheet);
        // E01: 9.54 dB; edges of 50 ns (s = 0.01957 of a period) take 8.686·2π²·8·s² = 0.53 dB more.
        Assert.StartsWith("harmonic 3 is -10.1 dBc, and an ideal pulse of 50.0 % duty factor has -9.5 dBc", sheet.Findings.Single(f => f.Code == "pulse-harmonics").Text, StringComparison.Ordinal);
    }

    [Fact]
    public void Frequency_that_is_a_tenth_of_a_cycle_off_over_the_record_is_put_right()
    {
        // Without, harmonic 4 would read sinc(0.4) = -2.4 dB low.
        Waveform taken = new Recording { Interval = 1e-8, Count = 10_000 }.Take(Source(-40, -55, -60).Signal);
        ReadingSheet sheet = Measure(taken, 1.003e6 * 1e-8 + 0.1 / 10_000, Known, new ReadingSheet(), uncertainty: 0.1 / 10_000);
        Assert.Equal(-60, Value(sheet, "harmonic-4"), 1e-6);
    }

    [Fact]
    public void Clipped_wave_has_no_harmonics_of_its_own()
    {
        ReadingSheet sheet = Measure(new WaveFitness(null, ClippedEnds.Top));
        Assert.Empty(sheet.Readings);
        Assert.All(sheet.NotMeasured, n => Assert.Equal("clipped", n.Code));
    }

    [Theory]
    [InlineData(SteadinessKind.NotPeriodic, 0, 0)]
    [InlineData(SteadinessKind.Interrupted, 0, 0)]
    [InlineData(SteadinessKind.AmplitudeModulated, 0, 0.3)]
    [InlineData(SteadinessKind.PhaseModulated, 0.08, 0)] // (2π·0.08)²/2 = 13 % of the fundamental may be lost.
    public void Wave_that_does_not_hold_still_has_no_harmonics(SteadinessKind kind, double phase, double range)
    {
        ReadingSheet sheet = Measure(new WaveFitness(new Steadiness(kind) { PhaseExcursion = phase, AmplitudeRange = range, Absent = 0.25 }, ClippedEnds.None));
        Assert.Empty(sheet.Readings);
        Assert.All(sheet.NotMeasured, n => Assert.Equal("unsteady", n.Code));
    }

    [Fact]
    public void Small_wander_is_a_term_that_grows_as_the_square_of_the_order()
    {
        // (2πk·0.002)²/2 of the amplitude at most: 8.686·7.9e-5·k² dB.
        ReadingSheet sheet = Measure(new WaveFitness(new Steadiness(SteadinessKind.Drifting) { PhaseExcursion = 0.002 }, ClippedEnds.None));
        double half = 8.685889638 * Math.Pow(2 * Math.PI * 0.002, 2) / 2;
        Assert.Equal(4 * half / Math.Sqrt(3), Terms(sheet, "harmonic-2").Single(t => t.Name == "unsteady wave").Contribution, 1e-9);
        Assert.Equal(16 * half / Math.Sqrt(3), Terms(sheet, "harmonic-4").Single(t => t.Name == "unsteady wave").Contribution, 1e-9);
    }

    private static ReadingSheet Measure(WaveFitness fitness)
    {
        var sheet = new ReadingSheet();
        Waveform waveform = new Recording { Interval = 1e-8, Count = 10_000, Noise = 1e-5 }.Take(Source(-40, -55, -60).Signal);
        var plan = new Plan { Chain = Known };
        HarmonicAnalyser.Measure(new WaveformJob(waveform, plan, new ChainErrors(plan, waveform.Axis), sheet, CancellationToken.None) { Fitness = fitness },
            new FrequencyEstimate("made", 1.003e6 * 1e-8, [BudgetTerm.Normal("made", 1e-12)], 1));
        return sheet;
    }

    [Fact]
    public void Harmonics_from_above_half_of_the_sample_rate_are_called_by_their_order()
    {
        // 9.09 samples a cycle: harmonics 5 to 7 lie at 0.55, 0.66, 0.77 of the sample rate and show at 0.45, 0.34, 0.23.
        double rate = 1.003e6 / 0.11;
        Waveform taken = new Recording { Interval = 1 / rate, Count = 10_000, Noise = 1e-3 }.Take(Source(-40, -200, -200, -200, -200, -50).Signal);
        ReadingSheet sheet = Measure(taken, 0.11);
        // 0.23 of 9.118 MHz; the level is good to 8.7·1e-3·√2e-4/3e-3 = 0.04 dB.
        Assert.StartsWith("folded by sampling from above half of the sample rate: harmonic 7 at 2.0972 MHz (-50.", sheet.Findings.Single(f => f.Code == "folded-harmonics").Text, StringComparison.Ordinal);
        Assert.Contains("where sampling folds it to, 2.0972 MHz, stands a line of -50.", sheet.NotMeasured.Single(n => n.Quantity.Id == "harmonic-7").Reason, StringComparison.Ordinal);
        Assert.Equal("above-nyquist", sheet.NotMeasured.Single(n => n.Quantity.Id == "harmonic-7").Code);
        Assert.DoesNotContain(sheet.Findings, f => f.Code == "spurs");
    }

    [Fact]
    public void Folded_harmonic_on_another_is_said_to_collide()
    {
        // Ten samples a cycle: harmonic 6 comes down on 4, 7 on 3, and so on.
        ReadingSheet sheet = Measure(new Recording { Interval = 1e-7 / 1.003, Count = 10_000 }.Take(Source(-40, -55, -70).Signal), 0.1);
        Assert.Contains("sampling folds it onto harmonic 3", sheet.NotMeasured.Single(n => n.Quantity.Id == "harmonic-7").Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void Square_wave_at_fifty_samples_a_cycle_names_what_falls_on_its_harmonics()
    {
        // Harmonics 49 and 51 come down on the fundamental, 47 on 3.
        Waveform taken = new Recording { Interval = 1 / (50 * 1.003e6), Count = 10_000, Noise = 1e-4 }.Take(new SquareWave { Frequency = 1.003e6, RiseTime = 4e-9, FallTime = 4e-9 }.Signal);
        ReadingSheet sheet = Measure(taken, 0.02);
        Assert.Contains("49 on the fundamental", sheet.Findings.Single(f => f.Code == "colliding-harmonics").Text, StringComparison.Ordinal);
        Assert.Contains(Terms(sheet, "harmonic-3"), t => t.Name == "other lines");
    }

    [Fact]
    public void Line_that_is_no_harmonic_is_found_and_is_the_strongest_other_line()
    {
        double[] samples = new Recording { Interval = 1e-8, Count = 10_000, Noise = 1e-3 }.Samples(Source(-60).Signal);
        for (int i = 0; i < samples.Length; i++)
            samples[i] += 0.01 * Math.Cos(2 * Math.PI * 0.0777 * i);
        ReadingSheet sheet = Measure(Waves.Of(samples), 1.003e6 * 1e-8);
        // u = √(3σ²/N) = 1.7e-5 of 0.01: 0.015 dB, up to 1.18 times that; four of those.
        Assert.Equal(40, Value(sheet, "sfdr"), 0.07);
        Assert.StartsWith("a line that is no harmonic: 7.7700 MHz (-40.0 dBc): another source", sheet.Findings.Single(f => f.Code == "spurs").Text, StringComparison.Ordinal);
    }

    [Fact]
    public void Ideal_converter_leaves_what_its_bits_allow()
    {
        // E16: 49.926 dB for 8 bits. A sine of 127.4 steps stays clear of the topmost code's end; it is 0.04 dB under full scale, and its
        // rounding has a mean square within 4 % of a twelfth (the Bessel sum of its steps), 0.17 dB.
        var converter = new Converter(8, -128 / 127.4, 128 / 127.4);
        Waveform taken = new Recording { Interval = 1e-8, Count = 50_000, Converter = converter }.Take(Source().Signal);
        ReadingSheet sheet = Measure(taken, 1.003e6 * 1e-8);
        Assert.Equal(49.9257118967938, Value(sheet, "sinad"), 0.22);
        Assert.Equal(8, Value(sheet, "enob"), 0.22 / 6.02);
        Assert.Equal("quantisation", sheet.NotMeasured.Single(n => n.Quantity == Quantities.NoiseFloor).Code);
    }

    [Fact]
    public void Noise_floor_is_the_noise_in_a_hertz_over_the_carrier()
    {
        // Closed form: 2σ²Δt over A²/2: 10 log(4·1e-6·1e-8) = -133.98 dBc/Hz; 5143 independent samples scatter by 2 %, 0.09 dB: four of those.
        ReadingSheet sheet = Measure(new Recording { Interval = 1e-8, Count = 10_000, Noise = 1e-3 }.Take(Source(-40).Signal), 1.003e6 * 1e-8);
        Assert.Equal(-133.979400086720, Value(sheet, "noise-floor"), 0.35);
    }

    [Fact]
    public void Wave_without_anything_beside_it_is_said_to_look_computed()
    {
        ReadingSheet sheet = Measure(Source());
        Assert.Equal("no-noise", sheet.NotMeasured.Single(n => n.Quantity == Quantities.NoiseFloor).Code);
        Assert.Equal("no-noise", sheet.NotMeasured.Single(n => n.Quantity == Quantities.Sinad).Code);
    }

    private static HarmonicSineSignal Source(params double[] levels) =>
        new(new HarmonicSine { Frequency = 1.003e6, Harmonics = [.. levels.Select((dbc, i) => new HarmonicLine(i + 2, dbc, 50 * i))] });

    private sealed class HarmonicSineSignal(HarmonicSine sine)
    {
        // Summed cosines: a table's cubic would leave lines of its own at -250 dB, which a noise-free fit shows.
        public ISignal Signal { get; } = new Summed(sine);

        private sealed class Summed(HarmonicSine sine) : ISignal
        {
            public double At(double time)
            {
                double x = 2 * Math.PI * sine.Frequency * time, sum = Math.Cos(x);
                foreach (HarmonicLine h in sine.Harmonics)
                    sum += Math.Pow(10, h.LevelDbc / 20) * Math.Cos(h.Number * x + h.PhaseDegrees * Math.PI / 180);
                return sum;
            }
        }
    }

    private static ReadingSheet Measure(HarmonicSineSignal source, MeasuringChain? chain = null) =>
        Measure(new Recording { Interval = 1e-8, Count = 10_000 }.Take(source.Signal), 1.003e6 * 1e-8, chain);

    private static ReadingSheet Measure(Waveform waveform, double frequency, MeasuringChain? chain = null, ReadingSheet? sheet = null, double uncertainty = 1e-12)
    {
        sheet ??= new ReadingSheet();
        var plan = new Plan { Chain = chain ?? Known, Levels = LevelSettings.Default };
        var job = new WaveformJob(waveform, plan, new ChainErrors(plan, waveform.Axis), sheet, CancellationToken.None);
        HarmonicAnalyser.Measure(job, new FrequencyEstimate("made", frequency, [BudgetTerm.Normal("made", uncertainty)], 1));
        return sheet;
    }

    private static double Value(ReadingSheet sheet, string id) => sheet.Readings.Single(r => r.Quantity.Id == id).Value;

    private static IReadOnlyList<BudgetTerm> Terms(ReadingSheet sheet, string id) => sheet.Readings.Single(r => r.Quantity.Id == id).Budget.Terms;
}
