using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Signals;

namespace ScopeReader.Coverage;

/// <summary>Made oscillations of each kind, and what they are called: the confusion matrix.</summary>
/// <remarks>
/// The captures are those of <see cref="MadeOscillation"/>.
/// </remarks>
internal static class KindTable
{
    private static readonly IReadOnlyList<string> Kinds = MadeOscillation.Kinds;
    private static readonly double[] Decibels = [10, 20, 30];

    /// <summary>Runs and writes the table.</summary>
    /// <param name="runs">Captures a kind and noise level.</param>
    /// <param name="first">The first seed.</param>
    /// <param name="output">Where the table goes.</param>
    public static void Write(int runs, ulong first, TextWriter output)
    {
        output.WriteLine($"| made as | dB | {string.Join(" | ", Kinds)} | no kind | right | lock right |");
        output.WriteLine($"|---|---|{string.Concat(Kinds.Select(_ => "---|"))}---|---|---|");
        for (int kind = 0; kind < Kinds.Count; kind++)
            foreach (double decibels in Decibels)
            {
                var found = new (int Kind, bool? Lock)[runs];
                int k = kind;
                Parallel.For(0, runs, i => found[i] = Look(k, decibels, first + (ulong)i));
                int[] counts = [.. Kinds.Select((_, j) => found.Count(f => f.Kind == j))];
                string locks = found.Any(f => f.Lock is not null) ? string.Create(CultureInfo.InvariantCulture, $"{100.0 * found.Count(f => f.Lock == true) / found.Count(f => f.Lock is not null):0.0} %") : "";
                output.WriteLine(string.Create(CultureInfo.InvariantCulture,
                    $"| {Kinds[kind]} | {decibels} | {string.Join(" | ", counts)} | {found.Count(f => f.Kind < 0)} | {100.0 * counts[kind] / runs:0.0} % | {locks} |"));
            }
    }

    // The number of the kind that one capture is called, -1 for none named; and whether its being locked is told right.
    private static (int Kind, bool? Lock) Look(int kind, double decibels, ulong seed)
    {
        (Waveform wave, bool isMultiple) = MadeOscillation.Make(kind, decibels, seed);
        var measured = Analysis.Measure(new Capture("made", "", [wave], []), Plan.Empty).Channels[0];
        if (measured.Findings.FirstOrDefault(f => f.Code == "ringing-kind") is not { } finding)
            return (-1, null);
        return (Kinds.ToList().IndexOf(finding.Value!), finding.Locked is { } locked && kind is 2 or 3 ? locked == isMultiple : null);
    }
}
