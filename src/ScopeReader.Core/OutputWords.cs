using ScopeReader.Captures;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader;

/// <summary>The words that files for programs use for what the code has as types.</summary>
public static class OutputWords
{
    /// <summary>pass, fail, undecided, error or unjudged.</summary>
    public static string Of(Outcome outcome) => outcome switch
    {
        Outcome.Unjudged => "unjudged",
        Outcome.Pass => "pass",
        Outcome.Undecided => "undecided",
        Outcome.Fail => "fail",
        Outcome.Error => "error",
        _ => throw new ArgumentOutOfRangeException(nameof(outcome)),
    };

    /// <summary>pass, fail, undecided, not-measured or not-applicable.</summary>
    public static string Of(VerdictOutcome outcome) => outcome switch
    {
        VerdictOutcome.Pass => "pass",
        VerdictOutcome.Fail => "fail",
        VerdictOutcome.Undecided => "undecided",
        VerdictOutcome.NotMeasured => "not-measured",
        VerdictOutcome.NotApplicable => "not-applicable",
        _ => throw new ArgumentOutOfRangeException(nameof(outcome)),
    };

    /// <summary>guarded or simple.</summary>
    public static string Of(DecisionRule rule) => rule == DecisionRule.Simple ? "simple" : "guarded";

    /// <summary>upper or lower.</summary>
    public static string Of(LineSide side) => side == LineSide.Lower ? "lower" : "upper";

    /// <summary>normal or rectangular.</summary>
    public static string Of(Distribution distribution) => distribution == Distribution.Rectangular ? "rectangular" : "normal";

    /// <summary>column, preamble, option or none.</summary>
    public static string Of(AxisSource source) => source switch
    {
        AxisSource.None => "none",
        AxisSource.Column => "column",
        AxisSource.Preamble => "preamble",
        AxisSource.Option => "option",
        _ => throw new ArgumentOutOfRangeException(nameof(source)),
    };

    /// <summary>waveform or spectrum.</summary>
    public static string Kind(Channel channel) => channel is SpectrumTrace ? "spectrum" : "waveform";

    /// <summary>Unit of a verdict's bounds and value: the reading's where there is one.</summary>
    public static string Unit(Verdict verdict)
    {
        ArgumentNullException.ThrowIfNull(verdict);
        return verdict.Reading is { } reading && verdict.Limit.Quantity.Unit == "V" ? reading.Unit : verdict.Limit.Quantity.Unit;
    }
}
