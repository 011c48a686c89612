using ScopeReader.Captures;
using ScopeReader.Limits;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Limits;

public class LineJudgeTests
{
    private static readonly SpectrumLines Source = Traces.Lines with { NoiseDbm = -100, Sweeps = 20 };

    private static readonly MeasuringChain Chain = new() { GainTolerancePercent = 5, FlatnessDb = 0.5, Impedance = 50 };

    [Fact]
    public void Worst_margin_is_where_the_line_is_nearest_and_between_the_points()
    {
        // At 910.6 kHz the line has -30 - 15·(910.6 - 600)/1400 = -33.328 dBm, 11.672 dB above the second harmonic; the third, -60 dBm at
        // 1365.9 kHz, is 21.8 dB under it. Noise 55 dB below the line makes 0.01 dB; a top between points is exact for a Gaussian filter.
        Verdict verdict = Judge(new LimitLine("mask", "dBm", [(600e3, -30), (2e6, -45)]));
        Assert.Equal(VerdictOutcome.Pass, verdict.Outcome);
        Assert.Equal(11.672, verdict.Reading!.Value, 0.03);
        Assert.Equal(2 * 455.3e3, verdict.Line!.Frequency, 20.0);
        Assert.Equal(-33.328, verdict.Line.LineLevel, 0.002);
        Assert.Equal(-45, verdict.Line.Level, 0.03);
    }

    [Theory]
    [InlineData(-43.0, VerdictOutcome.Pass)]
    [InlineData(-44.8, VerdictOutcome.Undecided)] // 0.2 dB inside: gain ±0.43 dB and flatness ±0.5 dB do not allow either.
    [InlineData(-45.2, VerdictOutcome.Undecided)]
    [InlineData(-47.0, VerdictOutcome.Fail)]
    public void Guarded_verdict_needs_the_uncertainty_as_a_margin(double level, VerdictOutcome outcome) =>
        Assert.Equal(outcome, Judge(new LimitLine("mask", "dBm", [(800e3, level), (1e6, level)])).Outcome);

    [Fact]
    public void Simple_verdict_is_on_the_value() =>
        Assert.Equal(VerdictOutcome.Pass, Judge(new LimitLine("mask", "dBm", [(800e3, -44.8), (1e6, -44.8)]) { Rule = DecisionRule.Simple }).Outcome);

    [Fact]
    public void Line_relative_to_the_carrier_does_not_need_the_gain()
    {
        // -45 dBm under a carrier of -10 dBm is -35 dBc.
        Verdict verdict = Judge(new LimitLine("mask", "dBc", [(800e3, -30), (1e6, -30)]), Chain with { GainTolerancePercent = null });
        Assert.Equal((VerdictOutcome.Pass, 5.0), (verdict.Outcome, Math.Round(verdict.Reading!.Value, 1)));
    }

    [Fact]
    public void Microvolts_need_an_impedance()
    {
        var line = new LimitLine("mask", "dBµV", [(800e3, 70), (1e6, 70)]);
        // E52: -45 dBm in 50 ohm is 61.99 dBµV.
        Assert.Equal(70 - (106.98970004336 - 45), Judge(line).Reading!.Value, 0.03);
        Verdict without = Judge(line, Chain with { Impedance = null });
        Assert.Equal((VerdictOutcome.NotMeasured, "the line is in dBµV and the trace in dBm: add impedance to [chain]"), (without.Outcome, without.Reason));
    }

    [Fact]
    public void Lower_line_asks_for_levels_above_it()
    {
        Verdict verdict = Judge(new LimitLine("carrier", "dBm", [(454e3, -20), (457e3, -20)]) { Side = LineSide.Lower });
        // The filter's skirt is the lowest at 457 kHz: 1.7 of 2.5 kHz half-width, 3.0103·0.68² = 1.39 dB under the top.
        Assert.Equal((VerdictOutcome.Pass, 8.61), (verdict.Outcome, Math.Round(verdict.Reading!.Value, 2)));
    }

    [Fact]
    public void Noise_above_the_line_decides_nothing()
    {
        Verdict verdict = Judge(new LimitLine("mask", "dBm", [(1.5e6, -110), (2e6, -110)]));
        Assert.Equal(VerdictOutcome.Undecided, verdict.Outcome);
        Assert.StartsWith("the trace's own noise reaches the line there", verdict.Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void Trace_that_covers_a_part_of_the_line_cannot_pass_it()
    {
        Verdict verdict = Judge(new LimitLine("mask", "dBm", [(600e3, -30), (30e6, -30)]));
        Assert.Equal((VerdictOutcome.Undecided, "inside the line where the trace has it, and the trace covers 600 kHz to 2.1 MHz of 600 kHz to 30 MHz"), (verdict.Outcome, verdict.Reason));
        Assert.Equal(VerdictOutcome.Fail, Judge(new LimitLine("mask", "dBm", [(600e3, -60), (30e6, -60)])).Outcome);
        Assert.Equal(VerdictOutcome.NotMeasured, Judge(new LimitLine("mask", "dBm", [(10e6, -60), (30e6, -60)])).Outcome);
    }

    [Fact]
    public void Waveform_has_no_limit_lines()
    {
        var plan = new Plan { LimitLines = [new LimitLine("mask", "dBm", [(1e6, -40), (2e6, -40)])] };
        Measurement measured = Analysis.Measure(new Capture("a.csv", "", [Waves.Square(100, 1000)], []), plan);
        Assert.Equal(VerdictOutcome.NotApplicable, measured.Channels[0].Verdicts.Single().Outcome);
        Assert.Equal(Outcome.Error, measured.Outcome);
    }

    [Fact]
    public void Nearest_of_several_lines_is_the_primary_margin()
    {
        ChannelMeasurement measured = Measure(new Plan
        {
            Chain = Chain,
            LimitLines = [new LimitLine("far", "dBm", [(800e3, -20), (1e6, -20)]), new LimitLine("near", "dBm", [(800e3, -40), (1e6, -40)])],
            Limits = [new Limit(Quantities.LimitLineMargin, 6, null)],
        });
        Assert.Equal(5, measured.Reading(Quantities.LimitLineMargin).Value, 0.03);
        Assert.Equal(VerdictOutcome.Fail, measured.Verdicts.Single(v => v.Line is null).Outcome);
        Assert.Equal(Outcome.Fail, Analysis.Measure(new Capture("a.csv", "", [Source.Take()], []), new Plan { Chain = Chain, LimitLines = [new LimitLine("m", "dBm", [(800e3, -50), (1e6, -50)])] }).Outcome);
    }

    private static Verdict Judge(LimitLine line, MeasuringChain? chain = null) => Measure(new Plan { Chain = chain ?? Chain, LimitLines = [line] }).Verdicts.Single();

    private static ChannelMeasurement Measure(Plan plan) => Analysis.Measure(new Capture("a.csv", "", [Source.Take()], []), plan).Channels[0];
}
