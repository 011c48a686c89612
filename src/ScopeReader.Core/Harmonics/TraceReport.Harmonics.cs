using ScopeReader.Readings;
using static ScopeReader.Harmonics.HarmonicAnalyser;

namespace ScopeReader.Harmonics;

internal sealed partial class TraceReport
{
    private void WriteHarmonics(TraceLevels levels, TraceLine first, double fundamental, int from)
    {
        var found = new List<Reading>();
        int inside = 1;
        for (int k = 2; k <= _wanted; k++)
        {
            double expected = k * fundamental;
            if (expected + Math.Max(Window, 2 * levels.Spacing) > levels.Stop || levels.Nearest(expected) < from)
            {
                sheet.Refuse("outside-span", Text($"harmonic {k} at {Engineering.Format(expected, "Hz")} lies outside the span; widen it"), Quantities.Harmonic(k));
                continue;
            }
            inside = k;
            if (FindNear(levels, expected) is not { } top)
            {
                double bound = levels.Noise(levels.Nearest(expected)).Threshold(5) - first.LevelDb;
                sheet.Refuse("below-noise", Text($"< {bound:F1} dBc: no line stands out of the noise there; narrow the resolution bandwidth"), Quantities.Harmonic(k));
            }
            else if (levels.Line(top) is not { } line)
                sheet.Refuse("unresolved", "fewer than 3 points lie on the line; narrow the span, or take more points", Quantities.Harmonic(k));
            else
                found.Add(new Reading(Quantities.Harmonic(k), line.LevelDb - first.LevelDb, "dBc", _chain.ForRelativeDecibels([.. line.LevelTerms, .. Of(first)]), Method));
        }
        foreach (Reading reading in found)
            sheet.Add(reading);
        if (found.MaxBy(r => r.Value) is { } worst)
            sheet.Add(new Reading(Quantities.WorstHarmonic, worst.Value, "dBc", worst.Budget, Method) { Note = $"{worst.Quantity.Id}, of harmonics 2 to {inside}" });
        else
            sheet.Refuse(inside > 1 ? "below-noise" : "outside-span", inside > 1 ? Text($"none of harmonics 2 to {inside} is resolved") : "no harmonic lies inside the span; widen it", Quantities.WorstHarmonic);
        WriteOwn(found);
    }

    private static IEnumerable<BudgetTerm> Of(TraceLine fundamental) =>
        fundamental.LevelTerms.Select(t => BudgetTerm.Normal(t.Name + " of fundamental", t.Value, t.Sensitivity));

    private void WriteOwn(List<Reading> harmonics)
    {
        if (plan.Chain.DistortionFloorDbc is not { } floor)
            return;
        string[] own = [.. harmonics.Where(r => r.Value <= floor).Select(r => r.Quantity.Id)];
        if (own.Length > 0)
            sheet.Add(new Finding("own-distortion",
                Text($"{string.Join(", ", own)}: at the instrument's own floor of {floor:F1} dBc, so it may be made there; with 10 dB more attenuation a line of the source stays where it is in dBc"),
                "instrument"));
    }

    private void WriteSubharmonic(TraceLevels levels, TraceLine peak, int order)
    {
        if (order == 1 && FindNear(levels, peak.Frequency / 2) is { } half)
            sheet.Add(new Finding("subharmonic",
                Text($"a line at half of the strongest line's frequency, {levels.Level(half) - peak.LevelDb:F1} dBc: a doubler or divider leaks, or the strongest line is a second harmonic"), "half"));
    }
}
