using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Readings;
using ScopeReader.Signals;

namespace ScopeReader.Coverage;

/// <summary>Rise times of edges near one sample interval, from many edges folded on their period.</summary>
internal static class EquivalentTimeTable
{
    private static readonly double[] Durations = [1, 1.2, 1.5, 2, 3];

    /// <summary>Runs and writes the table.</summary>
    /// <param name="runs">Captures a duration.</param>
    /// <param name="first">The first seed.</param>
    /// <param name="output">Where the table goes.</param>
    public static void Write(int runs, ulong first, TextWriter output)
    {
        output.WriteLine("500 to 800 edges, 40 to 60 samples a cycle, noise 40 dB below the swing, 8 bits");
        output.WriteLine("| 10 to 90 %, samples | measured | within 5 % | covers | mean error | spread |");
        output.WriteLine("|---|---|---|---|---|---|");
        foreach (double duration in Durations)
        {
            var done = new Reading?[runs];
            Parallel.For(0, runs, i => done[i] = Measure(duration, first + (ulong)i));
            double[] errors = [.. done.OfType<Reading>().Select(r => r.Value / (duration * Interval) - 1)];
            if (errors.Length == 0)
            {
                output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"| {duration:0.0} | 0 | | | | |"));
                continue;
            }
            double mean = errors.Average(), spread = Math.Sqrt(errors.Sum(e => (e - mean) * (e - mean)) / Math.Max(1, errors.Length - 1));
            int covered = done.OfType<Reading>().Count(r => Math.Abs(r.Value - duration * Interval) <= r.Budget.ExpandedUncertainty);
            output.WriteLine(string.Create(CultureInfo.InvariantCulture,
                $"| {duration:0.0} | {errors.Length} | {100.0 * errors.Count(e => Math.Abs(e) < 0.05) / runs:0.0} % | {100.0 * covered / errors.Length:0.0} % | {100 * mean:0.00} % | {100 * spread:0.00} % |"));
        }
    }

    private const double Interval = 1e-9;

    private static Reading? Measure(double duration, ulong seed)
    {
        var draw = new NormalNoise(seed);
        double period = Period(draw), swing = draw.Uniform(2, 3);
        var wave = new SquareWave { Frequency = 1 / (period * Interval), High = swing, DutyFactor = draw.Uniform(0.45, 0.55), RiseTime = duration * Interval };
        Waveform taken = new Recording
        {
            Interval = Interval,
            Count = (int)(draw.Uniform(251, 400) * period),
            Delay = draw.Uniform() * period * Interval,
            Noise = 0.01 * swing,
            Converter = new Converter(8, -0.3 * swing, 1.3 * swing),
            Seed = (ulong)(1e15 * draw.Uniform()),
        }.Take(wave.Signal);
        return Analysis.Measure(new Capture("made", "", [taken], []), Plan.Empty).Channels[0].Primary(Quantities.RiseTime);
    }

    // A crossing phase that wraps five times or more over 251 cycles: the period is 0.02 or more off a whole number of samples.
    private static double Period(NormalNoise draw) => Math.Floor(draw.Uniform(40, 60)) + draw.Uniform(0.03, 0.97);
}
