using ScopeReader.Captures;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Coverage;

/// <summary>Harmonics above half of the sample rate, at sample rates drawn anew: are they called by their order.</summary>
internal static class FoldingTrial
{
    private const int Count = 50_000, Order = 7, Highest = 23;

    public static void Write(int runs, ulong first, TextWriter output)
    {
        int named = 0, other = 0, read = 0, refused = 0;
        var gate = new Lock();
        Parallel.For(0, runs, i =>
        {
            var draw = new NormalNoise(first + (ulong)i);
            // 7 to 13 samples a cycle: harmonics 7 and 23 lie above half of the sample rate.
            double frequency = 455e3, rate = frequency * draw.Uniform(7, 13);
            var sine = new HarmonicSine
            {
                Frequency = frequency,
                Harmonics = [new(2, -40, draw.Uniform(0, 360)), new(Order, -45, draw.Uniform(0, 360)), new(Highest, -50, draw.Uniform(0, 360))],
            };
            Waveform taken = new Recording { Interval = 1 / rate, Count = Count, Noise = 0.002, Seed = first + (ulong)i, Delay = draw.Uniform() / frequency }.Take(sine.Build());
            ChannelMeasurement channel = Analysis.Measure(new Capture("made", "", [taken], []), new Plan { Chain = DbcSource.Exact }).Channels[0];
            string text = channel.Findings.FirstOrDefault(f => f.Code == "folded-harmonics")?.Text ?? "";
            bool seventh = text.Contains($"harmonic {Order} at", StringComparison.Ordinal), last = text.Contains($"harmonic {Highest} at", StringComparison.Ordinal);
            bool spurs = channel.Findings.Any(f => f.Code == "spurs");
            Reading? second = channel.Readings.FirstOrDefault(r => r.Quantity.Id == "harmonic-2");
            lock (gate)
            {
                named += seventh && last ? 1 : 0;
                other += spurs ? 1 : 0;
                read += second is not null && Math.Abs(second.Value + 40) <= second.Budget.ExpandedUncertainty ? 1 : 0;
                refused += channel.NotMeasured.Any(n => n.Quantity.Id == $"harmonic-{Order}" && n.Code == "above-nyquist") ? 1 : 0;
            }
        });
        DbcTable.Line(output, $"folding: harmonics {Order} and {Highest} both named in {named} of {runs} records at 7 to 13 samples a cycle; something called a spur in {other}; harmonic-{Order} refused in {refused}; harmonic-2 covers in {read}");
    }
}
