using ScopeReader.Captures;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Ringing;

public class KindMatrixTests
{
    // 50 captures a kind, over the three levels of noise. At 98 % right the chance of five or more wrong in 50 is 0.3 %.
    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void Made_oscillations_are_called_what_they_are(int kind)
    {
        int right = 0;
        for (ulong seed = 1001; seed <= 1050; seed++)
        {
            Waveform wave = MadeOscillation.Make(kind, 10 + 10 * (int)(seed % 3), seed).Wave;
            ChannelMeasurement measured = Analysis.Measure(new Capture("made", "", [wave], []), Plan.Empty).Channels[0];
            right += measured.Findings.Single(f => f.Code == "ringing-kind").Value == MadeOscillation.Kinds[kind] ? 1 : 0;
        }
        Assert.InRange(right, 46, 50);
    }
}
