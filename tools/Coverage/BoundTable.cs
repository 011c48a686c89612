using System.Globalization;
using ScopeReader.Signals;

namespace ScopeReader.Coverage;

/// <summary><c>--table bound</c>: root mean square error of the primary frequency over the Cramér-Rao bound.</summary>
internal static class BoundTable
{
    private const double MostSine = 1.10, MostSquare = 1.25, MostBias = 0.1;
    private static readonly double[] Decibels = [20, 40, 60], SamplesPerCycle = [5.3, 20.7, 50.001, 97.3], Edges = [2, 4];

    /// <summary>Writes it; records of some ten cycles, of 10,000 and of 100,000 samples.</summary>
    public static void Write(int runs, ulong first, TextWriter output)
    {
        output.WriteLine("| wave | samples per cycle | samples | primary | 20 dB | 40 dB | 60 dB |");
        output.WriteLine("|---|---|---|---|---|---|---|");
        foreach (double p in SamplesPerCycle)
            foreach (int count in (int[])[(int)Math.Ceiling(10 * p), 10_000, 100_000])
                Row("sine", p, count, MostSine, runs, first, output, db => FrequencyTrial.Sine(p, count, db));
        foreach (double edge in Edges)
            foreach (double p in SamplesPerCycle.Where(p => p > 5 * edge || edge == 2))
                foreach (int count in (int[])[(int)Math.Ceiling(10 * p), 10_000, 100_000])
                    Row(string.Create(CultureInfo.InvariantCulture, $"square, edges of {edge}"), p, count, MostSquare, runs, first, output, db => FrequencyTrial.Square(p, edge, count, db));
    }

    /// <summary><c>--table template</c>: the same for records too long for the joint fit, by the template on parts.</summary>
    public static void WriteLong(int runs, ulong first, TextWriter output)
    {
        output.WriteLine("| wave | samples per cycle | samples | primary | 20 dB | 40 dB | 60 dB |");
        output.WriteLine("|---|---|---|---|---|---|---|");
        foreach (double p in (double[])[20.7, 97.3])
            Row("square, edges of 4", p, 400_000, MostSquare, runs, first, output, db => FrequencyTrial.Square(p, 4, 400_000, db));
    }

    private static void Row(string wave, double samplesPerCycle, int count, double most, int runs, ulong first, TextWriter output, Func<double, FrequencyTrial> trial)
    {
        FrequencyTally[] tallies = [.. Decibels.Select(db => trial(db).Run(runs, first))];
        output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"| {wave} | {samplesPerCycle} | {count} | {tallies[1].Method} | {string.Join(" | ", tallies.Select(t => Cell(t, most)))} |"));
    }

    // Ratio, coverage; what is asked for is missed where three standard errors do not explain it.
    private static string Cell(FrequencyTally t, double most)
    {
        string missed = (t.Ratio > most + 3 * t.RatioError ? " RATIO" : "") + (t.BiasShare > MostBias + 3 * t.RootMeanSquare / t.Stated / Math.Sqrt(t.Runs) ? " BIAS" : "") + (t.Refused > 0 ? $" {t.Refused} refused" : "");
        return string.Create(CultureInfo.InvariantCulture, $"{t.Ratio:0.00}, {t.Cover:P1}{missed}");
    }
}
