using ScopeReader.Captures;
using ScopeReader.Files.Output;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Output;

/// <summary>Measurements put together by hand, so that what is written can be told from what was measured.</summary>
internal static class Made
{
    public static readonly string Hash = new('a', 64);

    // ± 25 ppm of the value, rectangular, and 0.06 Hz of the capture's own.
    public static Reading Frequency(double value = 455012.31) =>
        new(Quantities.Frequency, value, "Hz", new Budget([BudgetTerm.Rectangular("timebase", 25e-6, value, ofChain: true), BudgetTerm.Normal("noise", 0.06)]), "crossings") { Count = 910 };

    public static Reading Level(string unit = "V") =>
        new(Quantities.Amplitude, 3.3, unit, new Budget([BudgetTerm.Normal("noise", 0.001, 1, 9)], ["gain"]), "histogram");

    public static Waveform Waveform(string name = "CH1", TimeAxis? axis = null) => new(name, "V", axis ?? new TimeAxis(-1e-5, 1e-8, AxisSource.Column), [0, 1, 0, 1]);

    public static MeasuredFile File(string file, params ChannelMeasurement[] channels) =>
        new(file, new Measurement(new Capture(file, Hash, [.. channels.Select(c => c.Channel)], ["the unit is assumed"]), channels, ["mind the mains"], Worst(channels)), null);

    public static ChannelMeasurement Channel(Channel channel, IReadOnlyList<Reading> readings, params Verdict[] verdicts) =>
        new(channel, readings, [new NotMeasured(Quantities.RiseTime, "too-few-samples", "the whole edge lies between two samples")],
            [new Finding("ringing-kind", "it decays", "edge-excited")], verdicts);

    private static Outcome Worst(ChannelMeasurement[] channels) =>
        channels.SelectMany(c => c.Verdicts).Any(v => v.Outcome == VerdictOutcome.Fail) ? Outcome.Fail : channels.Any(c => c.Verdicts.Count > 0) ? Outcome.Pass : Outcome.Unjudged;
}
