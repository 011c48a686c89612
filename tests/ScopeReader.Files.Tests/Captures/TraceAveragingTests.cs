using ScopeReader.Captures;

namespace ScopeReader.Tests.Captures;

public class TraceAveragingTests
{
    [Theory]
    [InlineData("Detector,RMS", TraceAveraging.Power)]
    [InlineData("Detector,Positive Peak", TraceAveraging.Peak)]
    [InlineData("Average Type,Log (Video)", TraceAveraging.Level)]
    [InlineData("Avg Type,Power", TraceAveraging.Power)]
    [InlineData("Average Type,Voltage", TraceAveraging.Voltage)]
    [InlineData("Detektor,Spitze", TraceAveraging.Peak)]
    [InlineData("Detector,Sample", TraceAveraging.Unknown)]
    [InlineData("Operator,N. N.", TraceAveraging.Unknown)]
    public void What_a_trace_averages_is_read_from_its_preamble(string line, TraceAveraging expected)
    {
        string rows = string.Join('\n', Enumerable.Range(0, 12).Select(i => FormattableString.Invariant($"{1000 + 10 * i},{-80.5 + i % 3}")));
        Assert.Equal(expected, Import.Text($"RBW,10 Hz\n{line}\nFrequency (Hz),Level (dBm)\n{rows}\n").Trace().Averaging);
    }
}
