using ScopeReader.Captures;
using ScopeReader.Signals;

namespace ScopeReader.Coverage;

/// <summary>Spectrum traces against the truth: lines in noise, and a band of noise.</summary>
internal static class TraceTable
{
    private static readonly string[] Shown =
        ["peak-frequency", "peak-power", "frequency-error", "harmonic-2", "harmonic-3", "worst-harmonic", "channel-power", "noise-density", "occupied-bandwidth"];

    public static void Write(int runs, ulong first, TextWriter output)
    {
        DbcTable.Line(output, $"| trace | quantity | read | covers | mean u | mean u / spread | bias / spread | bounded |");
        DbcTable.Line(output, $"|---|---|---|---|---|---|---|---|");
        Rows("lines, power averaging", s => Lines(s, TraceAveraging.Power), runs, first, output);
        Rows("lines, averaging not stated", s => Lines(s, TraceAveraging.Unknown), runs, first, output);
        Rows("band of noise", Band, runs, first, output);
    }

    private static void Rows(string name, Func<ulong, MadeCase> draw, int runs, ulong first, TextWriter output)
    {
        var done = new (MadeCase Case, ChannelMeasurement Channel)[runs];
        Parallel.For(0, runs, i =>
        {
            MadeCase made = draw(first + (ulong)i);
            done[i] = (made, Analysis.Measure(new Capture("made", "", [made.Channel], []), made.Plan).Channels[0]);
        });
        foreach (string id in Shown)
        {
            var tally = new Tally(id);
            foreach ((MadeCase made, ChannelMeasurement channel) in done)
                if (channel.Readings.FirstOrDefault(r => r.Quantity.Id == id && r.IsPrimary) is { } reading && made.TruthOf(reading) is { } truth)
                    tally.Add(reading, truth);
            if (tally.Count > 1)
                DbcTable.Line(output, $"| {name} | {id} | {tally.Count}/{runs} | {tally.Cover:P1} | {tally.MeanStated:G3} | {tally.MeanStated / tally.Spread:F2} | {tally.Bias / tally.Spread:F2} | {(tally.IsBounded ? "yes" : "")} |");
        }
    }

    private static MadeCase Lines(ulong seed, TraceAveraging averaging)
    {
        var draw = new NormalNoise(seed);
        const double nominal = 455e3, noise = -85, filter = 5e3;
        double frequency = nominal * (1 + 0.001 * draw.Uniform(-1, 1)), power = draw.Uniform(-15, -5);
        var lines = new SpectrumLines
        {
            Lines = [new(frequency, power), new(2 * frequency, power + draw.Uniform(-42, -38)), new(3 * frequency, power + draw.Uniform(-52, -48))],
            Start = 100e3,
            Stop = 2.1e6,
            Count = 2001,
            ResolutionBandwidth = filter,
            NoiseDbm = noise,
            Sweeps = 10,
            LevelStepDb = 0.01,
            Seed = (ulong)(1e15 * draw.Uniform()),
        };
        SpectrumTrace taken = lines.Take();
        taken = new SpectrumTrace("made", "dBm", taken.Frequencies.ToArray(), taken.Levels.ToArray(), filter) { Averaging = averaging };
        double density = noise - 10 * Math.Log10(filter * Math.Sqrt(Math.PI / (4 * Math.Log(2))));
        double all = lines.Lines.Sum(l => Math.Pow(10, l.PowerDbm / 10)) + Math.Pow(10, density / 10) * (lines.Stop - lines.Start);
        var truth = new Dictionary<string, double>(lines.Truth())
        {
            ["frequency-error"] = (frequency / nominal - 1) * 1e6,
            ["noise-density"] = density,
            ["channel-power"] = 10 * Math.Log10(all),
            ["worst-harmonic"] = lines.Lines[1].PowerDbm - lines.Lines[0].PowerDbm,
        };
        return new MadeCase(taken, new Plan { Nominal = nominal, Chain = DbcSource.Exact }, truth);
    }

    private static MadeCase Band(ulong seed)
    {
        var draw = new NormalNoise(seed);
        var band = new GaussianBand
        {
            Centre = 10e6 + draw.Uniform(-1e4, 1e4),
            Sigma = draw.Uniform(8e4, 1.2e5),
            PowerDbm = draw.Uniform(-25, -15),
            Sweeps = 100,
            Seed = (ulong)(1e15 * draw.Uniform()),
        };
        return new MadeCase(band.Take(), new Plan { Chain = DbcSource.Exact }, new Dictionary<string, double>
        {
            ["occupied-bandwidth"] = 2 * 2.5758293035489004 * band.Sigma,
            ["channel-power"] = 10 * Math.Log10(Math.Pow(10, band.PowerDbm / 10) + Math.Pow(10, band.FloorDbmPerHertz / 10) * (band.Stop - band.Start)),
            ["noise-density"] = band.FloorDbmPerHertz,
        });
    }
}
