using ScopeReader.Captures;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Edges;

/// <summary>Stated uncertainties of edges and ringing against the spread of repeated noisy captures.</summary>
public class EdgeSpreadTests
{
    private const int Seeds = 40;

    private static readonly Quantity[] Tried =
    [
        Quantities.RiseTime, Quantities.FallTime, Quantities.RiseOvershoot, Quantities.FallUndershoot,
        Quantities.RingingFrequency, Quantities.RingingDecayTime, Quantities.RingingAmplitude,
    ];

    [Fact]
    public void Errors_are_what_the_budgets_say()
    {
        // Ringing that dies away well before the next edge, so that the state levels are known to their noise.
        var wave = new SquareWave { Frequency = 203.1e3, High = 3.3, RiseTime = 40e-9, Resonance = new Resonance(9e6, 0.12, 0.5) };
        IReadOnlyDictionary<string, double> truth = wave.Truth();
        double[] squares = new double[Tried.Length], stated = new double[Tried.Length];
        for (int seed = 1; seed <= Seeds; seed++)
        {
            // A start and a converter of its own for each: an error that hangs on the phase or the codes is spread too.
            double shift = seed * 0.618 % 1;
            var recording = new Recording { Interval = 4e-9, Count = 25_000, Noise = 0.02, Seed = (ulong)seed, Delay = seed * 1.37e-9, Converter = new Converter(8, -1.5 + 0.03 * shift, 5 + 0.03 * shift) };
            var capture = new Capture("made", "", [recording.Take(wave.Signal)], []);
            ChannelMeasurement measured = Analysis.Measure(capture, Plan.Empty).Channels[0];
            for (int i = 0; i < Tried.Length; i++)
            {
                Reading? reading = measured.Readings.FirstOrDefault(r => r.IsPrimary && r.Quantity == Tried[i]);
                Assert.True(reading is not null, $"seed {seed} has no {Tried[i]}: {measured.NotMeasured.FirstOrDefault(n => n.Quantity == Tried[i])?.Reason}");
                squares[i] += Math.Pow(reading.Value - truth[reading.Quantity.Id], 2) / Seeds;
                stated[i] += reading.Budget.StandardUncertainty / Seeds;
            }
        }
        // The rms of 40 errors is known to 1/√80 = 11 %: the 0.8 to 1.3 that every budget is held to, widened by two of those.
        for (int i = 0; i < Tried.Length; i++)
            Assert.True(stated[i] / Math.Sqrt(squares[i]) is > 0.62 and < 1.6, $"{Tried[i]}: {stated[i] / Math.Sqrt(squares[i]):F2}");
    }
}
