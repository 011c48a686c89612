using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader.Coverage;

/// <summary>Harmonics against the truth: a source with three lines, folded harmonics, spurs, waves without noise.</summary>
internal static class DbcTable
{
    private static readonly string[] Shown = ["fundamental-level", "harmonic-2", "harmonic-3", "harmonic-4", "worst-harmonic", "thd", "thd-r", "sinad", "enob", "sfdr", "noise-floor"];

    public static void Write(int runs, ulong first, TextWriter output)
    {
        Line(output, $"| source | quantity | read | covers | mean u | mean u / spread | bias / spread |");
        Line(output, $"|---|---|---|---|---|---|---|");
        foreach (int bits in (ReadOnlySpan<int>)[8, 12])
            Rows($"{bits} bits", new DbcSource { Bits = bits }, runs, first, output);
        Rows("8 bits, a spur of -38 dBc", new DbcSource { SpurDbc = -38 }, runs / 5, first, output);
        Rows("12 bits, noise of a fifth of a step", new DbcSource { Bits = 12, Noise = 0.2 }, runs / 5, first, output);
        Rows("8 bits, a pure sine", new DbcSource { LinesDbc = [] }, runs / 5 * 2, first, output);
        output.WriteLine();
        foreach (int bits in (ReadOnlySpan<int>)[8, 12])
            Without($"{bits} bits without noise", new DbcSource { Bits = bits, Noise = 0 }, runs / 10, first, output);
        Without("8 bits, driven to 120 % of full scale", new DbcSource { Drive = 1.2 }, runs / 10, first, output);
        output.WriteLine();
        FoldingTrial.Write(runs, first, output);
        PulseTrial.Write(first, output);
    }

    private static void Rows(string name, DbcSource source, int runs, ulong first, TextWriter output)
    {
        (MadeCase Case, ChannelMeasurement Channel)[] done = Measure(source, runs, first);
        foreach (string id in Shown)
        {
            var tally = new Tally(id);
            foreach ((MadeCase made, ChannelMeasurement channel) in done)
                if (channel.Readings.FirstOrDefault(r => r.Quantity.Id == id && r.IsPrimary) is { } reading && made.TruthOf(reading) is { } truth)
                    tally.Add(reading, truth);
            if (tally.Count > 1)
                Line(output, $"| {name} | {id} | {tally.Count}/{runs} | {tally.Cover:P1} | {tally.MeanStated:G3} | {tally.MeanStated / tally.Spread:F2} | {tally.Bias / tally.Spread:F2} |");
            else
                Line(output, $"| {name} | {id} | {tally.Count}/{runs} | | | | |");
        }
    }

    private static void Without(string name, DbcSource source, int runs, ulong first, TextWriter output)
    {
        (MadeCase Case, ChannelMeasurement Channel)[] done = Measure(source, runs, first);
        foreach (string id in (ReadOnlySpan<string>)["harmonic-2", "harmonic-3", "harmonic-4", "thd"])
        {
            string[] reasons = [.. done.Select(d => d.Channel.NotMeasured.FirstOrDefault(n => n.Quantity.Id == id)?.Code ?? (Covers(d, id) ? "read, covers" : "read, does not cover"))];
            Line(output, $"{name}: {id}: {string.Join(", ", reasons.CountBy(r => r).Select(p => $"{p.Key} {p.Value}"))}");
        }
    }

    private static bool Covers((MadeCase Case, ChannelMeasurement Channel) one, string id)
    {
        Reading reading = one.Channel.Readings.First(r => r.Quantity.Id == id);
        return one.Case.TruthOf(reading) is { } truth && Math.Abs(reading.Value - truth) <= reading.Budget.ExpandedUncertainty;
    }

    internal static (MadeCase Case, ChannelMeasurement Channel)[] Measure(DbcSource source, int runs, ulong first)
    {
        var done = new (MadeCase, ChannelMeasurement)[runs];
        Parallel.For(0, runs, i =>
        {
            MadeCase made = source.Draw(first + (ulong)i);
            done[i] = (made, Analysis.Measure(new Capture("made", "", [made.Channel], []), made.Plan).Channels[0]);
        });
        return done;
    }

    internal static void Line(TextWriter output, FormattableString text) => output.WriteLine(text.ToString(CultureInfo.InvariantCulture));
}
