using ScopeReader.Captures;
using ScopeReader.Signals;

namespace ScopeReader.Tests;

/// <summary>The made captures that other tests trust: held against closed forms, not against the analysers.</summary>
public class SignalsTests
{
    private static readonly SquareWave Gentle = new() { Frequency = 455e3, RiseTime = 50e-9 };

    // The series ends where its terms vanish in a double; a level in dB rests on two of them.
    private const double RoundingDb = 1e-9;

    [Theory]
    [InlineData(0.5, 3, -9.54242509439325)] // E01, closed form
    [InlineData(0.5, 5, -13.9794000867204)] // E02
    [InlineData(0.5, 9, -19.0848501887865)] // E04
    [InlineData(0.25, 2, -3.01029995663981)] // E05
    [InlineData(0.25, 3, -9.54242509439325)] // E06
    [InlineData(0.51, 2, -30.0584313647016)] // E07
    public void Harmonics_are_those_of_a_rectangular_wave_times_the_edges_factor(double duty, int harmonic, double rectangularDbc)
    {
        SquareWave wave = Gentle with { DutyFactor = duty };
        double s = wave.RiseSigma * wave.Frequency;
        double edges = 20 * Math.Log10(Math.E) * -2 * Math.PI * Math.PI * (harmonic * harmonic - 1) * s * s;
        Assert.Equal(rectangularDbc + edges, wave.Truth()[$"harmonic-{harmonic}"], RoundingDb);
    }

    [Fact]
    public void Gaussian_edges_lower_the_third_harmonic_as_tabulated()
    {
        // E10: edge sigma 0.02 of the period; E01 for the rectangular wave. Tolerance: E10's own, half of its last digit.
        SquareWave wave = Gentle with { RiseTime = 0.02 * SquareWave.RiseTimeOverSigma / Gentle.Frequency };
        Assert.Equal(-9.54242509439325 - 0.548648285435028, wave.Truth()["harmonic-3"], 1e-9);
    }

    [Fact]
    public void Fastest_square_wave_has_the_distortion_of_the_ideal_one()
    {
        // E15: harmonics 3, 5, 7, 9 only. An edge of 1/1000 of the period takes exp(-2 pi^2 80 (0.001/2.5631)^2) = 0.02 % off the ninth.
        SquareWave wave = Gentle with { RiseTime = 1e-3 / Gentle.Frequency };
        Assert.Equal(42.879476837849, wave.Truth()["thd"], 42.88 * 2.5e-4);
    }

    [Theory]
    [InlineData(0.1, 72.9247614287671)] // D02, closed form exp(-pi zeta / sqrt(1 - zeta^2))
    [InlineData(0.2, 52.6620599330303)] // D03
    [InlineData(0.5, 16.303353482158)] // D04
    public void Fast_edge_through_a_resonance_overshoots_as_the_step_response_does(double zeta, double overshoot)
    {
        // A Gaussian edge of standard deviation s takes exp(-(w s)^2/2) off the first peak: the pole's factor |exp(p^2 s^2/2)|
        // and the decay in the Gaussian's delay of the peak. Tolerance: what is left of the edge before, exp(-zeta w T/2) = 1e-6.
        var resonance = new Resonance(20e6, zeta);
        double sigma = 0.2 / resonance.AngularFrequency;
        SquareWave wave = Gentle with { RiseTime = sigma * SquareWave.RiseTimeOverSigma, Resonance = resonance };
        double expected = overshoot * Math.Exp(-0.2 * 0.2 / 2);
        Assert.Equal(expected, wave.Truth()["rise-overshoot"], expected * 3e-6);
        Assert.Equal(expected, wave.Truth()["fall-overshoot"], expected * 3e-6);
    }

    [Fact]
    public void Fast_edge_through_a_resonance_rises_and_settles_as_the_step_response_does()
    {
        // D13 and D12 at zeta 0.5: t(10-90) and the last entry into 2 %, in 1/w. An edge with w s = 0.04 moves each instant by
        // s^2/2 x''/x', under 0.0008 * 2.
        var resonance = new Resonance(10e6, 0.5);
        double w = resonance.AngularFrequency;
        SquareWave wave = Gentle with { RiseTime = 0.04 / w * SquareWave.RiseTimeOverSigma, Resonance = resonance };
        Assert.Equal(1.63757294732835, wave.Truth()["rise-time"] * w, 3.2e-3);
        Assert.Equal(8.076348973928 - StepResponseRoot(0.5, 0.5), wave.Truth()["rise-settling"] * w, 3.2e-3);
    }

    [Theory]
    [InlineData(0.5)]
    [InlineData(0.2)]
    public void Gaussian_edges_take_the_stated_time(double duty)
    {
        // Closed form: 2 Phi^-1(0.9) sigma. The next edge is 20 sigma away: nothing of it is left in a double.
        IReadOnlyDictionary<string, double> truth = (Gentle with { DutyFactor = duty, FallTime = 70e-9 }).Truth();
        Assert.Equal(50e-9, truth["rise-time"], 1e-18);
        Assert.Equal(70e-9, truth["fall-time"], 1e-18);
        Assert.Equal(0.8 / 50e-9, truth["rise-slew"], 1);
        Assert.Equal(-0.8 / 70e-9, truth["fall-slew"], 1);
        Assert.Equal(100 * duty, truth["duty-factor"], 1e-9);
        Assert.Equal(duty / 455e3, truth["high-width"], 1e-17);
    }

    [Fact]
    public void Ringing_envelope_holds_the_wave_after_its_edge()
    {
        // The wave minus its level, over the stated decay, peaks at the envelope: at peaks of a slowly damped cosine the
        // envelope is met to within 1/cos(atan(zeta)), 0.5 % at zeta 0.1. Other edges: one is left, in the stated sum.
        SquareWave wave = Gentle with { Resonance = new Resonance(7e6, 0.1, 0.3) };
        IReadOnlyDictionary<string, double> truth = wave.Truth();
        double middle = Crossing(wave), best = 0;
        for (double t = 200e-9; t < 900e-9; t += 1e-10)
            best = Math.Max(best, Math.Abs(wave.Signal.At(middle + t) - 1) * Math.Exp(t / truth["ringing-decay-time"]));
        Assert.Equal(truth["ringing-amplitude"] / 100, best, truth["ringing-amplitude"] / 100 * 1e-4);
    }

    [Fact]
    public void Table_holds_the_series_between_its_points()
    {
        SquareWave wave = Gentle with { RiseTime = 10e-9, Resonance = new Resonance(7e6, 0.1) };
        var random = new NormalNoise(7);
        for (int i = 0; i < 1000; i++)
        {
            double phase = i % 2 == 0 ? random.Uniform() : random.Uniform(-0.01, 0.01);
            Assert.Equal(wave.Signal.Series.At(phase), wave.Signal.At((phase + 3) / wave.Frequency), 1e-9);
        }
    }

    [Fact]
    public void Mean_and_rms_follow_the_levels_of_a_fast_wave()
    {
        // Closed form of a rectangular wave: mean is low + d (high - low); mean square d high^2 + (1 - d) low^2, and each
        // Gaussian edge takes sigma/sqrt(pi) of the squared swing off it.
        SquareWave wave = Gentle with { Low = -1, High = 3, DutyFactor = 0.25 };
        double edges = 2 * wave.RiseSigma * wave.Frequency / Math.Sqrt(Math.PI) * 16;
        Assert.Equal(0, wave.Truth()["mean"], 1e-12);
        Assert.Equal(Math.Sqrt(0.25 * 9 + 0.75 * 1 - edges), wave.Truth()["rms"], 1e-9);
    }

    [Fact]
    public void Timebase_that_reads_high_shows_more_cycles_in_the_same_stated_time()
    {
        // 40,000 ppm over 0.25 s of stated time at 100 Hz: the record really lasts 0.26 s and ends on cycle 26, phase 0.
        var sine = new HarmonicSine { Frequency = 100 };
        var recording = new Recording { Interval = 1e-3, Count = 251, TimebaseReadsPpm = 40_000 };
        Waveform capture = recording.Take(sine.Build());
        Assert.Equal(1, capture.Samples[250], 1e-9);
        Assert.Equal(Math.Cos(2 * Math.PI * 100 * 0.104), capture.Samples[100], 1e-9);
    }

    [Fact]
    public void Converter_rounds_to_codes_and_clips()
    {
        var converter = new Converter(8, -1.28, 1.28);
        Assert.Equal(0.01, converter.Step, 1e-15);
        Assert.Equal(0.12, converter.Convert(0.1249), 1e-12);
        Assert.Equal(1.27, converter.Convert(5), 1e-12);
        Assert.Equal(-1.28, converter.Convert(-5), 1e-12);
    }

    [Fact]
    public void Noise_has_the_stated_spread_and_repeats_with_its_seed()
    {
        var recording = new Recording { Noise = 0.01, Count = 20_000, Seed = 3 };
        double[] first = recording.Samples(new HarmonicSine { Amplitude = 1e-30 }.Build());
        Assert.Equal(first, recording.Samples(new HarmonicSine { Amplitude = 1e-30 }.Build()));
        // The spread of 20,000 is known to 1/sqrt(40,000) = 0.5 %; allow four of those.
        Assert.Equal(0.01, Math.Sqrt(first.Average(v => v * v)), 0.01 * 0.02);
    }

    [Fact]
    public void Rounded_times_leave_the_range_that_their_last_digits_allow()
    {
        // 1001 times of 1 ms in steps of 1 us, written in whole ms from 100 on (three digits): the last is known to half of
        // 10 us from 1000 us on, 1.00E-3; the interval to about that over 1000, and 1 us itself is possible.
        var recording = new Recording { Interval = 1e-6, Count = 1001, TimeDigits = 3 };
        TimeAxis axis = recording.Take(new HarmonicSine { Frequency = 1e3 }.Build()).Axis;
        Assert.InRange(1e-6, axis.IntervalLow, axis.IntervalHigh);
        Assert.InRange(axis.RelativeRounding, 1e-4, 6e-3);
    }

    [Fact]
    public void Spectrum_line_is_half_as_strong_half_a_bandwidth_away()
    {
        var lines = new SpectrumLines { Lines = [new(1e6, -10)], Start = 0.9e6, Stop = 1.1e6, Count = 201, ResolutionBandwidth = 10e3 };
        SpectrumTrace trace = lines.Take();
        Assert.Equal(-10, trace.Levels[100], 1e-9);
        Assert.Equal(-10 - 10 * Math.Log10(2), trace.Levels[105], 1e-9);
    }

    // Where 1 - e^(-zeta x)(cos w x + zeta/w sin w x), w = sqrt(1 - zeta^2), first passes a level; x in 1/omega_n.
    private static double StepResponseRoot(double zeta, double level)
    {
        double w = Math.Sqrt(1 - zeta * zeta), low = 0, high = Math.PI / w;
        for (int i = 0; i < 60; i++)
        {
            double x = (low + high) / 2;
            if (1 - Math.Exp(-zeta * x) * (Math.Cos(w * x) + zeta / w * Math.Sin(w * x)) < level)
                low = x;
            else
                high = x;
        }
        return low;
    }

    private static double Crossing(SquareWave wave)
    {
        double low = -200e-9, high = 100e-9;
        for (int i = 0; i < 60; i++)
        {
            double t = (low + high) / 2;
            if (wave.Signal.At(t) < 0.5)
                low = t;
            else
                high = t;
        }
        return low;
    }
}
