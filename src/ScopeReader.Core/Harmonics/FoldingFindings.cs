using ScopeReader.Readings;
using static ScopeReader.Harmonics.HarmonicAnalyser;

namespace ScopeReader.Harmonics;

/// <summary>Says which lines are harmonics from above half of the sample rate, and which of those cannot be told from others.</summary>
internal sealed class FoldingFindings(HarmonicLines lines)
{
    private const int MostNamed = 6, HighestOrder = 400;

    private readonly HarmonicLevels _levels = lines.Levels;

    public void Write()
    {
        WriteFolded();
        WriteColliding();
    }

    private void WriteFolded()
    {
        var folded = new List<(int Order, double Place, double Dbc)>();
        foreach (HarmonicLevel h in lines.Harmonics.Skip(lines.Counts.Seen).Where(h => h.IsResolved))
            folded.Add((h.Order, Folding.Apparent(h.Order * _levels.Frequency, 1), lines.Dbc(h.Amplitude)));
        foreach (OtherLine other in lines.Others)
            if (other.FoldedOrder is { } order)
                folded.Add((order, other.Line.Frequency, lines.Dbc(other.Line.Amplitude)));
        if (folded.Count == 0)
            return;
        string named = string.Join(", ", folded.OrderBy(l => l.Order).Take(MostNamed).Select(l => Text($"harmonic {l.Order} at {lines.Place(l.Place)} ({l.Dbc:F1} dBc)")));
        string more = folded.Count > MostNamed ? Text($" and {folded.Count - MostNamed} more") : "";
        lines.Job.Sheet.Add(new Finding("folded-harmonics",
            Text($"folded by sampling from above half of the sample rate: {named}{more}; a folded line moves when the sample rate changes, a true one stays"), "folded"));
    }

    // Only where it matters: what comes down is more than the noise of the harmonic that it comes down on.
    private void WriteColliding()
    {
        var pairs = new List<string>();
        foreach (HarmonicLevel h in lines.Harmonics.Take(lines.Counts.Seen))
            if (_levels.Folded(h.Order) > h.Noise && Partner(h.Order) is { } partner)
                pairs.Add(Text($"{partner} on {(h.Order == 1 ? "the fundamental" : h.Order)}"));
        if (pairs.Count == 0)
            return;
        string more = pairs.Count > MostNamed ? Text($" and {pairs.Count - MostNamed} more") : "";
        lines.Job.Sheet.Add(new Finding("colliding-harmonics",
            Text($"the sample rate is nearly a multiple of the frequency, so that folded harmonics cannot be told from lower ones: {string.Join(", ", pairs.Take(MostNamed))}{more}; their part is in the uncertainty; change the sample rate"), "colliding"));
    }

    private int? Partner(int order)
    {
        double place = Folding.Apparent(order * _levels.Frequency, 1);
        for (int k = _levels.Modelled + 1; k <= HighestOrder; k++)
            if (Math.Abs(Folding.Apparent(k * _levels.Frequency, 1) - place) < 2.0 / _levels.Count)
                return k;
        return null;
    }
}
