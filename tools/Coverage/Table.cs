using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Coverage;

/// <summary>A scenario's runs as a table of text.</summary>
internal static class Table
{
    // What the project asks of every stated uncertainty that no single bound dominates.
    private const double CoverLow = 0.91, CoverHigh = 0.99, RatioLow = 0.8, RatioHigh = 1.3;

    public static void Write(Scenario scenario, IReadOnlyList<Run> runs, TextWriter output)
    {
        output.WriteLine($"{scenario.Name}: {scenario.Meaning}; {runs.Count} seeds");
        Line(output, $"{"quantity",-32} {"n",4} {"cover",7} {"u/spread",8} {"bias/spread",11} {"mean u",10} {"spread",10} {"mean truth",11}  remark");
        foreach (Tally t in Tallies(runs))
            Line(output, $"{t.Name,-32} {t.Count,4} {t.Cover,7:P1} {t.MeanStated / t.Spread,8:F2} {t.Bias / t.Spread,11:F2} {t.MeanStated,10:G3} {t.Spread,10:G3} {t.MeanTruth,11:G5}  {Remark(t)}");

        Count(output, "not measured", runs.SelectMany(r => r.Channel?.NotMeasured ?? []).Select(n => $"{n.Quantity} ({n.Code})"));
        Count(output, "measured without a truth", runs.Where(r => r.Case is not null)
            .SelectMany(r => r.Channel!.Readings.Where(x => x.IsPrimary && r.Case!.TruthOf(x) is null)).Select(x => x.Quantity.Id));
        Count(output, "true but neither measured nor refused", runs.Where(r => r.Case is not null).SelectMany(r => r.Case!.Truth.Keys.Where(k => !k.Contains('/'))
            .Except(r.Channel!.Readings.Select(x => x.Quantity.Id)).Except(r.Channel!.NotMeasured.Select(n => n.Quantity.Id))));
        Count(output, "findings", runs.SelectMany(r => r.Channel?.Findings ?? []).Select(f => f.Value is { Length: > 0 } value ? $"{f.Code}={value}" : f.Code));
        foreach (Run run in runs.Where(r => r.Failure is not null).Take(3))
            output.WriteLine("  threw: " + run.Failure);
        Count(output, "threw", runs.Where(r => r.Failure is not null).Select(_ => "seeds"));
        output.WriteLine();
    }

    /// <summary>What is true of each run, for one who looks into a single seed.</summary>
    public static void WriteTruth(IReadOnlyList<Run> runs, ulong first, TextWriter output)
    {
        for (int i = 0; i < runs.Count; i++)
        {
            output.WriteLine($"seed {first + (ulong)i}");
            foreach (var (name, value) in runs[i].Case?.Truth ?? new Dictionary<string, double>())
                Line(output, $"  {name,-24} {value:G12}");
        }
    }

    // Primary readings by quantity; every other one with its method, and frequency always with it.
    private static List<Tally> Tallies(IReadOnlyList<Run> runs)
    {
        var tallies = new Dictionary<string, Tally>();
        foreach (Run run in runs)
            foreach (Reading reading in run.Channel?.Readings ?? [])
            {
                if (run.Case!.TruthOf(reading) is not { } truth)
                    continue;
                if (reading.IsPrimary)
                    Of(reading.Quantity.Id).Add(reading, truth);
                if (!reading.IsPrimary || reading.Quantity == Quantities.Frequency)
                    Of(reading.Quantity.Id + "/" + reading.Method).Add(reading, truth);
            }
        return [.. tallies.Values];

        Tally Of(string name) => tallies.TryGetValue(name, out Tally? t) ? t : tallies[name] = new Tally(name);
    }

    private static string Remark(Tally t)
    {
        if (t.Count < 20)
            return "too few to say";
        if (t.IsBounded)
            return t.Cover >= CoverLow ? "bounded" : "bounded, COVER";
        var remarks = new List<string>();
        if (t.Cover is < CoverLow or > CoverHigh)
            remarks.Add("COVER");
        if (t.MeanStated / t.Spread is < RatioLow or > RatioHigh)
            remarks.Add("RATIO");
        return string.Join(", ", remarks);
    }

    private static void Count(TextWriter output, string title, IEnumerable<string> items)
    {
        string[] counts = [.. items.CountBy(i => i).OrderByDescending(p => p.Value).ThenBy(p => p.Key, StringComparer.Ordinal).Select(p => $"{p.Key} {p.Value}")];
        if (counts.Length > 0)
            output.WriteLine($"  {title}: {string.Join(", ", counts)}");
    }

    private static void Line(TextWriter output, FormattableString text) => output.WriteLine(text.ToString(CultureInfo.InvariantCulture).TrimEnd());
}
