using ScopeReader.Captures;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Limits;

public class JudgeTests
{
    // JCGM 106:2012 examples are for a normal error: u is exact there, so the terms below have no degrees of freedom.
    private static Reading Ppm(double value, double u, params string[] missing) =>
        new(Quantities.FrequencyError, value, "ppm", new Budget([BudgetTerm.Normal("noise", u)], missing), "crossings");

    private static Limit Within(double bound, DecisionRule rule = DecisionRule.Guarded, double guard = 1) =>
        new(Quantities.FrequencyError, -bound, bound) { Rule = rule, Guard = guard };

    [Fact]
    public void One_sided_conformance_probability()
    {
        var limit = new Limit(Quantities.FrequencyError, null, 20);

        // C16: JCGM 106 7.2, limit 20 ppm, y = 17.0, u = 1.2. Tolerance: the row's.
        Assert.Equal(0.993790334674224, Judge.Reading(limit, Ppm(17, 1.2)).Probability!.Value, 1e-9);
    }

    [Fact]
    public void Two_sided_conformance_probability() =>
        // C21: JCGM 106 7.4, limits ±20 ppm, y = 18.5, u = 2.
        Assert.Equal(0.773372647623132, Judge.Reading(Within(20), Ppm(18.5, 2)).Probability!.Value, 1e-9);

    [Fact]
    public void Conformance_probability_of_a_lower_limit()
    {
        // C20: JCGM 106 7.3 Zener example (from memory): T_U = -5.40 V, y = -5.47 V, u = 0.05 V → 0.92, printed to two digits.
        var limit = new Limit(Quantities.LowLevel, null, -5.40);
        var reading = new Reading(Quantities.LowLevel, -5.47, "V", new Budget([BudgetTerm.Normal("noise", 0.05)]), "shorth");

        Assert.Equal(0.92, Judge.Reading(limit, reading).Probability!.Value, 0.005);
    }

    // ISO 14253-1 with guard 1: pass to 20 − U, fail from 20 + U. U = 1.959964 u (normal, 95 %), u = 1 ppm.
    [Theory]
    [InlineData(18.03, VerdictOutcome.Pass)]
    [InlineData(18.05, VerdictOutcome.Undecided)]
    [InlineData(21.95, VerdictOutcome.Undecided)]
    [InlineData(21.97, VerdictOutcome.Fail)]
    [InlineData(-18.03, VerdictOutcome.Pass)]
    [InlineData(-21.97, VerdictOutcome.Fail)]
    public void The_guarded_rule_needs_proof_either_way(double value, VerdictOutcome expected) =>
        Assert.Equal(expected, Judge.Reading(Within(20), Ppm(value, 1)).Outcome);

    [Theory]
    [InlineData(20, VerdictOutcome.Pass)]
    [InlineData(20.001, VerdictOutcome.Fail)]
    public void The_simple_rule_looks_at_the_value(double value, VerdictOutcome expected) =>
        Assert.Equal(expected, Judge.Reading(Within(20, DecisionRule.Simple), Ppm(value, 1)).Outcome);

    [Fact]
    public void An_unstated_chain_term_leaves_the_guarded_rule_undecided_and_names_the_key()
    {
        Verdict verdict = Judge.Reading(Within(20), Ppm(0, 0.1, "timebase"));

        Assert.Equal(VerdictOutcome.Undecided, verdict.Outcome);
        Assert.Equal("not stated in the plan: timebase (add timebase-tolerance to [chain])", verdict.Reason);
        Assert.Null(verdict.Probability);
    }

    [Fact]
    public void An_unstated_chain_term_is_said_under_the_simple_rule()
    {
        Verdict verdict = Judge.Reading(Within(20, DecisionRule.Simple), Ppm(0, 0.1, "timebase"));

        Assert.Equal(VerdictOutcome.Pass, verdict.Outcome);
        Assert.Equal("on the value as indicated: not stated in the plan: timebase (add timebase-tolerance to [chain])", verdict.Reason);
    }

    private static Reading Loose(double value) => new(Quantities.FrequencyError, value, "ppm",
        new Budget([BudgetTerm.Normal("noise", 0.1), BudgetTerm.Rectangular("timebase", 25, ofChain: true)]), "crossings")
    { Count = 200 };

    // Closed form: 10 ppm from the bound, no noise left in a long record, and a calibration's normal error: 1.96 u is to be 10 ppm, u = 5.1 ppm.
    [Fact]
    public void A_timebase_that_is_too_loose_is_named_with_what_it_would_have_to_be() =>
        Assert.Equal("within the guard band, and timebase alone is too uncertain: no longer record will decide it; a timebase calibrated to a standard uncertainty of 5.1 ppm (scopereader calibrate, with a reference at least as good) would",
            Judge.Reading(Within(50), Loose(40)).Reason);

    // Closed form: u = 1 ppm, 1 ppm from the bound: 1.96 u is to be 1 ppm, so u is to fall by 1.96, which takes 1.96^(2/3) = 1.57 times
    // the record in a frequency: its 100 cycles become 157.
    [Fact]
    public void A_record_that_is_too_short_is_named_with_its_cycles()
    {
        Reading reading = new(Quantities.FrequencyError, 19, "ppm", new Budget([BudgetTerm.Normal("noise", 1)]), "sine-fit") { Count = 100 };

        Assert.Equal("within the guard band; a record 1.6 times as long (about 157 cycles), otherwise as it is, would decide it", Judge.Reading(Within(20), reading).Reason);
    }

    [Fact]
    public void An_unsteady_source_is_named_before_the_record()
    {
        Reading reading = new(Quantities.FrequencyError, 19, "ppm", new Budget([BudgetTerm.Normal("noise", 0.1), BudgetTerm.Rectangular("unsteadiness", 5)]), "sine-fit");

        Assert.Equal("within the guard band, and unsteadiness does not fall with a longer record: steady the source first", Judge.Reading(Within(20), reading).Reason);
    }

    // ±24 ppm of the timebase (0.95 · 25 ppm) against a limit 40 ppm wide: 2 · 23.75 = 47.5 ppm is more.
    [Fact]
    public void A_limit_that_the_chain_can_never_decide_is_warned_of()
    {
        var sheet = new ReadingSheet();
        sheet.Add(Loose(0));
        Judge.Channel(new Plan { Limits = [Within(20)] }, new Waveform("A", "V", TimeAxis.PerSample, [0, 1]), sheet);

        Assert.Equal("the limit on frequency-error is 40.0 ppm wide, and the chain alone leaves ±24 ppm: no capture with this chain can pass it; widen the limit, or have the chain calibrated",
            sheet.Findings.Single(f => f.Code == "limit-too-tight").Text);
    }

    // 455 kHz ± 50 ppm is 455 kHz ± 22.75 Hz.
    [Theory]
    [InlineData(455022, VerdictOutcome.Pass)]
    [InlineData(455023, VerdictOutcome.Fail)]
    public void A_limit_relative_to_nominal_is_one_in_hertz(double value, VerdictOutcome expected)
    {
        var limit = new Limit(Quantities.Frequency, -50, 50) { IsRelative = true, Rule = DecisionRule.Simple };
        var sheet = new ReadingSheet();
        sheet.Add(new Reading(Quantities.Frequency, value, "Hz", new Budget([BudgetTerm.Normal("noise", 0.1)]), "crossings"));
        Verdict verdict = Assert.Single(Judge.Channel(new Plan { Nominal = 455e3, Limits = [limit] }, new Waveform("A", "V", TimeAxis.PerSample, [0, 1]), sheet));

        Assert.Equal(expected, verdict.Outcome);
        Assert.Equal(455022.75, verdict.Limit.High!.Value, 1e-6);
    }

    [Fact]
    public void A_relative_limit_needs_a_nominal() =>
        Assert.Equal("the limit is relative to a nominal frequency that nobody stated; add nominal to the plan, or give --nominal",
            Assert.Single(Judge.Channel(new Plan { Limits = [new Limit(Quantities.Frequency, -50, 50) { IsRelative = true }] }, new Waveform("A", "V", TimeAxis.PerSample, [0, 1]), new ReadingSheet())).Reason);

    // C17: guard band U at k = 2, limit 20 ppm, U = 2.4 ppm: acceptance to 17.6; C18: at k = 2 the probability there is 0.97725.
    [Fact]
    public void The_acceptance_limit_and_its_probability_are_those_of_the_published_example()
    {
        var limit = new Limit(Quantities.FrequencyError, null, 20) { Guard = 2.4 / (1.959963984540054 * 1.2) };

        Assert.Equal(VerdictOutcome.Pass, Judge.Reading(limit, Ppm(17.6 - 1e-9, 1.2)).Outcome);
        Assert.Equal(VerdictOutcome.Undecided, Judge.Reading(limit, Ppm(17.6 + 1e-9, 1.2)).Outcome);
        Assert.Equal(0.977249868051821, Judge.Reading(limit, Ppm(17.6, 1.2)).Probability!.Value, 1e-9);
    }

    [Fact]
    public void A_wider_guard_band_takes_more_proof() =>
        // 17 + 2 × 1.96 = 20.92 > 20.
        Assert.Equal(VerdictOutcome.Undecided, Judge.Reading(Within(20, guard: 2), Ppm(17, 1)).Outcome);

    [Theory]
    [InlineData("A", VerdictOutcome.NotMeasured, "the limit is in V and the reading in A")]
    [InlineData("", VerdictOutcome.Pass, "inside the limit by the guard band or more")]
    public void A_limit_in_volts_does_not_judge_amperes(string unit, VerdictOutcome expected, string reason)
    {
        var reading = new Reading(Quantities.HighLevel, 1, unit, new Budget([BudgetTerm.Normal("noise", 0.01)]), "shorth");
        Verdict verdict = Judge.Reading(new Limit(Quantities.HighLevel, null, 2), reading);

        Assert.Equal(expected, verdict.Outcome);
        Assert.Equal(reason, verdict.Reason);
    }

    [Fact]
    public void A_frequency_per_sample_is_not_judged_in_hertz()
    {
        var reading = new Reading(Quantities.Frequency, 0.01, "1/sample", new Budget([BudgetTerm.Normal("noise", 1e-6)]), "crossings");

        Assert.Equal("the limit is in Hz and the reading in 1/sample: state the sample interval with --interval or --rate",
            Judge.Reading(new Limit(Quantities.Frequency, 1, null), reading).Reason);
    }

    [Theory]
    [InlineData(null, 5.0, VerdictOutcome.Pass)]
    [InlineData(null, 0.04, VerdictOutcome.NotMeasured)]
    [InlineData(0.0, 5.0, VerdictOutcome.NotMeasured)]
    public void Too_small_to_resolve_is_inside_an_upper_limit_above_what_shows(double? low, double high, VerdictOutcome expected)
    {
        var waveform = new Waveform("A", "V", TimeAxis.PerSample, [0, 1]);
        var sheet = new ReadingSheet();
        sheet.RefuseBelow("not-resolved", "no excursion above 0.05 % of amplitude, the least that this capture can show", 0.05, Quantities.RiseOvershoot);
        var plan = new Plan { Limits = [new Limit(Quantities.RiseOvershoot, low, high)] };

        Assert.Equal(expected, Assert.Single(Judge.Channel(plan, waveform, sheet)).Outcome);
    }
}
