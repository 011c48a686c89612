using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader.Comparing;

/// <summary>The same node before and after: what differs from a reference, by how much, and what that means.</summary>
/// <remarks>
/// Captures of one chain share its errors, so a difference has the captures' own uncertainty alone; with another chain on the
/// compared side, both chains' terms count. A difference is significant where it is beyond its 95 % interval.
/// </remarks>
/// <param name="Reference">What the others are compared with.</param>
/// <param name="Sides">The others.</param>
/// <param name="Differences">Every quantity that both have, in the order of the reference's readings.</param>
/// <param name="OneSided">What only one of two sides has.</param>
/// <param name="Findings">What the differences say.</param>
/// <param name="Readings">What only the comparison can measure: inductance and capacitance with an added capacitor.</param>
/// <param name="NotMeasured">Of these, what could not be measured.</param>
/// <param name="Overlays">Edges and spectra laid over the reference's.</param>
public sealed record Comparison(ComparedSide Reference, IReadOnlyList<ComparedSide> Sides, IReadOnlyList<Difference> Differences,
    IReadOnlyList<OneSided> OneSided, IReadOnlyList<Finding> Findings, IReadOnlyList<Reading> Readings, IReadOnlyList<NotMeasured> NotMeasured,
    IReadOnlyList<Overlay> Overlays)
{
    /// <summary>Compares.</summary>
    /// <param name="reference">The reference.</param>
    /// <param name="sides">What is compared with it, one or more.</param>
    /// <param name="isSameChain">False where the compared sides were taken through another chain than the reference.</param>
    public static Comparison Of(ComparedSide reference, IReadOnlyList<ComparedSide> sides, bool isSameChain = true)
    {
        ArgumentNullException.ThrowIfNull(reference);
        ArgumentNullException.ThrowIfNull(sides);
        var differences = new List<Difference>();
        var oneSided = new List<OneSided>();
        var findings = new List<Finding>();
        var overlays = new List<Overlay>();
        foreach (ComparedSide side in sides)
        {
            IReadOnlyList<ChannelPair> pairs = ChannelPair.Of(reference, side, out IReadOnlyList<Channel> alone);
            foreach (ChannelPair pair in pairs)
            {
                IReadOnlyList<Difference> here = Compare(pair, isSameChain);
                differences.AddRange(here);
                oneSided.AddRange(Missing(reference, pair));
                IReadOnlyList<EdgeOverlay> edges = EdgeOverlay.Of(pair);
                findings.AddRange(ComparisonFindings.Of(pair, here, edges, sides.Count > 1));
                overlays.AddRange(edges.Select(e => e.Overlay));
                findings.AddRange(LineComparison.Findings(pair.Reference[0], pair.Compared[0], here));
                if (SpectrumOverlay.Of(pair) is { } spectrum)
                    overlays.Add(spectrum);
            }
            alone = [.. alone.Where(channel => !AddLines(channel, reference, side, differences, findings))];
            foreach (Channel channel in alone)
                findings.Add(new Finding("channel-alone", $"{channel.Name} of {reference.Name} has no counterpart of its name and kind in {side.Name}"));
        }
        findings.Add(ComparisonFindings.Scope(reference, sides, isSameChain));
        return new Comparison(reference, sides, differences, oneSided, findings, [], [], overlays);
    }

    // A waveform and a spectrum trace have no quantity by one name but their lines: these are compared where each side has one channel.
    private static bool AddLines(Channel channel, ComparedSide reference, ComparedSide side, List<Difference> differences, List<Finding> findings)
    {
        if (side.Captures[0].Channels is not [var compared] || reference.Captures[0].Channels is not [var here] || here.Channel != channel)
            return false;
        IReadOnlyList<Difference> lines = LineComparison.Across(here, compared, side.Name);
        differences.AddRange(lines);
        findings.AddRange(LineComparison.Findings(here, compared, lines));
        return lines.Count > 0;
    }

    private static List<Difference> Compare(ChannelPair pair, bool isSameChain)
    {
        var differences = new List<Difference>();
        foreach (Reading first in pair.Reference[0].Readings.Where(r => r.IsPrimary))
        {
            Reading[] before = ReadingsOf(pair.Reference, first), after = ReadingsOf(pair.Compared, first);
            if (before.Length == 0 || after.Length == 0)
                continue;
            var (reference, compared) = SideValue.Pair(before, after);
            IEnumerable<BudgetTerm> terms = [.. reference.Own, .. compared.Own];
            var budget = isSameChain ? new Budget(terms) : new Budget([.. terms, .. reference.Chain, .. compared.Chain], [.. reference.Missing, .. compared.Missing]);
            differences.Add(new Difference(first.Quantity, first.Unit, pair.File, pair.Channel, reference.Value, compared.Value, budget, before.Length, after.Length));
        }
        return differences;
    }

    // The same method where there is one: the falling edge's ringing is no repeat of the rising edge's.
    private static Reading[] ReadingsOf(IReadOnlyList<ChannelMeasurement> side, Reading like) =>
        [.. side.Select(c => c.Readings.FirstOrDefault(r => r.Quantity == like.Quantity && r.Method == like.Method) ?? c.Primary(like.Quantity))
            .OfType<Reading>().Where(r => r.Unit == like.Unit)];

    private static IEnumerable<OneSided> Missing(ComparedSide reference, ChannelPair pair)
    {
        foreach (var (have, lack, file) in new[] { (pair.Reference[0], pair.Compared[0], pair.File), (pair.Compared[0], pair.Reference[0], reference.Name) })
            foreach (Reading reading in have.Readings.Where(r => r.IsPrimary && (lack.Primary(r.Quantity) is not { } other || other.Unit != r.Unit)))
                yield return new OneSided(reading, file, lack.NotMeasured.FirstOrDefault(n => n.Quantity == reading.Quantity));
    }
}
