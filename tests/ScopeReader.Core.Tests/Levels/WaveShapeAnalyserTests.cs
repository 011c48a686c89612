using ScopeReader.Levels;
using ScopeReader.Signals;
using static ScopeReader.Tests.Waves;

namespace ScopeReader.Tests.Levels;

public class WaveShapeAnalyserTests
{
    private static readonly SquareWave Slow = new() { RiseTime = 400e-9 }, Fast = new() { RiseTime = 4e-9 }, Ringing = new() { Resonance = new Resonance(8e6, 0.1) };

    public static TheoryData<string, WaveKind> Kinds => new()
    {
        { "clean square", WaveKind.TwoState }, { "ringing square", WaveKind.TwoState }, { "duty 2 %", WaveKind.TwoState }, { "duty 98 %", WaveKind.TwoState },
        { "fast edges", WaveKind.TwoState }, { "slow edges", WaveKind.TwoState }, { "noise 20 dB below", WaveKind.TwoState }, { "single edge", WaveKind.TwoState },
        { "8-bit square", WaveKind.TwoState }, { "sine", WaveKind.Sinusoidal }, { "sine 10 dB above noise", WaveKind.Sinusoidal }, { "sine clipped at one side", WaveKind.Sinusoidal },
        { "triangle", WaveKind.Other }, { "white noise", WaveKind.Other }, { "uniform noise", WaveKind.Other }, { "constant", WaveKind.Flat }, { "one sample", WaveKind.Flat },
    };

    // Source: what each wave is by construction.
    [Theory]
    [MemberData(nameof(Kinds))]
    public void Every_wave_is_told_for_what_it_is(string wave, WaveKind kind) => Assert.Equal(kind, WaveShapeAnalyser.Look(Made(wave)).Kind);

    [Theory]
    [InlineData(1e-6, 0)]
    [InlineData(40, -300)]
    public void Gain_and_offset_do_not_change_the_kind(double gain, double offset)
    {
        foreach (var (name, kind) in Kinds.Select(row => ((string)row[0], (WaveKind)row[1])))
            Assert.Equal(kind, WaveShapeAnalyser.Look([.. Made(name).Select(v => gain * v + offset)]).Kind);
    }

    // A29: mean of the shorth of the values from 0.61 V up, k = n/2 + 1; data set S1 of IEEE 181's kind, made for this project.
    [Fact]
    public void The_upper_level_of_a_short_pulse_is_the_shorth_mean()
    {
        double[] s1 = [0.02, 0, 0.01, 0, 0.03, 0, 0.01, 0.35, 1.22, 1.05, 0.96, 1, 1.01, 1, 0.99, 1, 1.02, 1, 0.40, 0];

        // Tolerance: A29 holds to the digits of the data.
        Assert.Equal(1.00, WaveShapeAnalyser.Look(s1).Upper, 1e-12);
    }

    // Closed form: a wave made on a grid lies on it. Tolerance: one part in a thousand of a step, far below what reads a level.
    [Theory]
    [InlineData(8, 1.0)]
    [InlineData(12, 0.037)]
    public void The_converters_step_is_found(int bits, double gain)
    {
        var converter = new Converter(bits, -0.5, 1.5);
        double[] samples = Square(97.3, 20000, 0.01, converter: converter).Samples.ToArray();

        Assert.Equal(gain * converter.Step, WaveShapeAnalyser.Look([.. samples.Select(v => gain * v)]).Step, 1e-3 * gain * converter.Step);
    }

    [Fact]
    public void A_step_that_was_printed_to_five_digits_is_still_found()
    {
        var converter = new Converter(8, -0.5, 1.5);
        double[] samples = [.. Square(97.3, 20000, 0.01, converter: converter).Samples.ToArray().Select(v => Math.Round(v, 4))];

        // Tolerance: half of the last digit at either end of the 130 steps that the wave spans.
        Assert.Equal(converter.Step, WaveShapeAnalyser.Look(samples).Step, 1e-4 / 130);
    }

    [Fact]
    public void Values_on_no_grid_have_no_step() => Assert.Equal(0, WaveShapeAnalyser.Look(Made("white noise")).Step);

    private static double[] Made(string wave)
    {
        var noise = new NormalNoise(7);
        return wave switch
        {
            "clean square" => Square(97.3, 20000).Samples.ToArray(),
            "ringing square" => Square(275.1, 20000, 0.003, Ringing).Samples.ToArray(),
            "duty 2 %" => Square(275.1, 20000, 0.01, Fast with { DutyFactor = 0.02 }).Samples.ToArray(),
            "duty 98 %" => Square(275.1, 20000, 0.01, Fast with { DutyFactor = 0.98 }).Samples.ToArray(),
            "fast edges" => Square(97.3, 20000, 0.001, Fast).Samples.ToArray(),
            "slow edges" => Square(97.3, 20000, 0.01, Slow).Samples.ToArray(),
            "noise 20 dB below" => Square(97.3, 20000, 0.1).Samples.ToArray(),
            "single edge" => Square(275.1, 150, 0.01).Samples.ToArray(),
            "8-bit square" => Square(97.3, 20000, converter: new Converter(8, -0.3, 1.3)).Samples.ToArray(),
            "sine" => Of(20000, i => Math.Sin(0.0231 * i)).Samples.ToArray(),
            "sine 10 dB above noise" => Of(20000, i => Math.Sin(0.0231 * i) + 0.22 * noise.Normal()).Samples.ToArray(),
            "sine clipped at one side" => Of(20000, i => Math.Min(0.8, Math.Sin(0.0231 * i))).Samples.ToArray(),
            "triangle" => Of(20000, i => Math.Abs(0.00364 * i % 1 - 0.5)).Samples.ToArray(),
            "white noise" => Of(20000, _ => noise.Normal()).Samples.ToArray(),
            "uniform noise" => Of(20000, _ => noise.Uniform()).Samples.ToArray(),
            "constant" => Of(1000, _ => 0.5).Samples.ToArray(),
            _ => [0.5],
        };
    }
}
