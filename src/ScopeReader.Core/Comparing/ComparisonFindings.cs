using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Comparing;

/// <summary>What differences say, in the words of the bench.</summary>
internal static class ComparisonFindings
{
    private const string Rise = "rise-", Fall = "fall-", KindCode = "ringing-kind";

    // Standard uncertainties by which two edges must part before it is worth a sentence.
    private const double Clearly = 4;

    // What the others follow from, or what has a sentence of its own, is left to the table.
    private static readonly Quantity[] Told =
    [
        Quantities.Frequency, Quantities.DutyFactor, Quantities.HighLevel, Quantities.LowLevel, Quantities.Amplitude,
        Quantities.RiseTime, Quantities.FallTime, Quantities.RiseOvershoot, Quantities.FallOvershoot,
        Quantities.RiseSettling, Quantities.FallSettling, Quantities.Thd, Quantities.WorstHarmonic,
        Quantities.PeakFrequency, Quantities.PeakPower, Quantities.PeakLevel,
    ];

    /// <summary>The findings on one channel of one side.</summary>
    /// <param name="pair">The channels.</param>
    /// <param name="differences">Their differences.</param>
    /// <param name="edges">Their edges, laid over each other.</param>
    /// <param name="isOneOfSeveral">True where other sides are compared too, so that each finding names its own.</param>
    public static IEnumerable<Finding> Of(ChannelPair pair, IReadOnlyList<Difference> differences, IReadOnlyList<EdgeOverlay> edges, bool isOneOfSeveral)
    {
        string where = isOneOfSeveral ? $"{pair.File}: " : "";
        var findings = new List<Finding?> { Kind(pair), Ringing(pair, differences), Changed(differences), Verdicts(pair), Apart(edges), Unchanged(differences) };
        return findings.OfType<Finding>().Select(f => f with { Text = where + f.Text });
    }

    /// <summary>What the comparison can and cannot tell.</summary>
    public static Finding Scope(ComparedSide reference, IReadOnlyList<ComparedSide> sides, bool isSameChain)
    {
        int most = Math.Max(reference.Captures.Count, sides.Max(s => s.Captures.Count));
        string text = most == 1
            ? "a marked quantity differs by more than the noise of these two captures; probe placement is not included. Take the probe off, put it back and capture again; give such repeats with --with."
            : string.Create(CultureInfo.InvariantCulture, $"reproducibility of {reference.Captures.Count} and {sides[0].Captures.Count} captures is in the differences: probe placement is included as far as the probe was put back between them.");
        return new Finding("scope", text + (isSameChain ? " The chain's own errors are shared and cancel." : " The two chains' errors are in the differences."));
    }

    private static Finding? Kind(ChannelPair pair)
    {
        Finding? before = pair.Reference[0].Findings.FirstOrDefault(f => f.Code == KindCode), after = pair.Compared[0].Findings.FirstOrDefault(f => f.Code == KindCode);
        return before is null || after is null || before.Value == after.Value ? null
            : new Finding("kind-changed", $"the oscillation is of another kind than the reference's: {after.Value} where it was {before.Value}", after.Value);
    }

    private static Finding? Ringing(ChannelPair pair, IReadOnlyList<Difference> differences)
    {
        Reading? before = pair.Reference[0].Primary(Quantities.RingingFrequency), after = pair.Compared[0].Primary(Quantities.RingingFrequency);
        if (before is null && after is null)
            return null;
        if (after is null || before is null)
        {
            ChannelMeasurement quiet = after is null ? pair.Compared[0] : pair.Reference[0];
            string reason = quiet.NotMeasured.FirstOrDefault(n => n.Quantity == Quantities.RingingFrequency)?.Reason ?? "it has no ringing";
            return after is null
                ? new Finding("ringing-gone", $"the ringing of the reference at {Short(before!.Value, before.Unit)} is gone: {reason}")
                : new Finding("ringing-new", $"it rings at {Short(after.Value, after.Unit)}, where the reference does not: {reason}");
        }
        if (Find(differences, Quantities.RingingFrequency) is not { } frequency)
            return null;
        if (frequency.IsSignificant != true)
            return new Finding("ringing-stays", $"it rings where the reference rings, at {Short(after.Value, after.Unit)}{Damping(differences)}: inductance times capacitance of what rings is the same within {Percent(2 * frequency.Budget.ExpandedUncertainty / frequency.Value)}");
        Difference? damping = Find(differences, Quantities.RingingDampingRatio);
        double product = Math.Pow(Undamped(frequency.Reference, damping?.Reference) / Undamped(frequency.Value, damping?.Value), 2);
        return new Finding("ringing-moved", $"it rings at {Short(frequency.Value, frequency.Unit)}, where the reference rings at {Short(frequency.Reference, frequency.Unit)}{Damping(differences)}. "
            + string.Create(CultureInfo.InvariantCulture, $"Inductance times capacitance of what rings is {product:G2} of what it was: with the same capacitance, a loop of {product:G2} the inductance."));
    }

    private static string Damping(IReadOnlyList<Difference> differences)
    {
        string text = "";
        if (Find(differences, Quantities.RingingAmplitude) is { } amplitude)
            text += amplitude.IsSignificant == true ? $", with {Short(amplitude.Value, "%")} of amplitude at the edge instead of {Short(amplitude.Reference, "%")}" : ", as far as before";
        if (Find(differences, Quantities.RingingQ) is { IsSignificant: true } q)
            text += string.Create(CultureInfo.InvariantCulture, $", and dies away {(q.Value < q.Reference ? "in fewer" : "in more")} cycles (Q {Short(q.Value, "1")} instead of {Short(q.Reference, "1")})");
        return text;
    }

    private static Finding? Changed(IReadOnlyList<Difference> differences)
    {
        string[] changes = [.. differences.Where(d => d.IsSignificant == true && Told.Contains(d.Quantity) && !IsToldWithRise(d, differences)).Select(d => Sentence(d, differences))];
        return changes.Length == 0 ? null : new Finding("changed", $"beyond the noise: {string.Join("; ", changes)}");
    }

    // What happens to both edges alike is said once.
    private static bool IsToldWithRise(Difference fall, IReadOnlyList<Difference> differences) =>
        fall.Quantity.Id.StartsWith(Fall, StringComparison.Ordinal) && differences.Any(d => d.Quantity.Id == Rise + fall.Quantity.Id[Fall.Length..]
            && d.IsSignificant == true && Math.Sign(d.Change) == Math.Sign(fall.Change));

    private static string Sentence(Difference d, IReadOnlyList<Difference> differences)
    {
        string fall = d.Quantity.Id.StartsWith(Rise, StringComparison.Ordinal)
            && differences.FirstOrDefault(f => f.Quantity.Id == Fall + d.Quantity.Id[Rise.Length..]) is { IsSignificant: true } f && IsToldWithRise(f, differences)
            ? $", {f.Quantity} alike" : "";
        return Text(d) + fall;
    }

    private static string Text(Difference d)
    {
        // Two values that agree in all their digits but the last ones say less than what lies between them.
        if (d.Ratio is not (< 0.98 or > 1.02))
            return $"{d.Quantity} {(d.Change > 0 ? "up" : "down")} by {Short(Math.Abs(d.Change), d.ChangeUnit)}";
        string ratio = d.Ratio is { } r ? string.Create(CultureInfo.InvariantCulture, $" ({r:G2} times)") : "";
        return $"{d.Quantity} {Short(d.Value, d.Unit)} instead of {Short(d.Reference, d.Unit)}{ratio}";
    }

    private static Finding? Verdicts(ChannelPair pair)
    {
        var changes = new List<string>();
        foreach (var after in pair.Compared[0].Verdicts)
            if (pair.Reference[0].Verdicts.FirstOrDefault(v => v.Limit == after.Limit) is { } before && before.Outcome != after.Outcome)
                changes.Add($"{after.Limit.Quantity} {Word(after.Outcome)}, where the reference {Word(before.Outcome)}");
        return changes.Count == 0 ? null : new Finding("verdicts", string.Join("; ", changes));
    }

    private static string Word(Limits.VerdictOutcome outcome) => outcome switch
    {
        Limits.VerdictOutcome.Pass => "passes its limit",
        Limits.VerdictOutcome.Fail => "fails its limit",
        Limits.VerdictOutcome.Undecided => "leaves its limit undecided",
        _ => "has no reading for its limit",
    };

    private static Finding? Apart(IReadOnlyList<EdgeOverlay> edges)
    {
        string[] sentences = [.. edges.Where(e => Math.Abs(e.Apart) > Clearly * e.ApartUncertainty).Select(e =>
            $"{(e.IsRising ? "rising" : "falling")} edges by up to {Short(Math.Abs(e.Apart), e.Overlay.YUnit)}, {Short(e.ApartAt, e.Overlay.XUnit)} after it (placed to {Short(e.Placing, e.Overlay.XUnit)})")];
        return sentences.Length == 0 ? null : new Finding("edges-apart", $"laid over each other at their 50 % instants, the two part after the transition: {string.Join("; ", sentences)}");
    }

    private static Finding? Unchanged(IReadOnlyList<Difference> differences)
    {
        string[] same = [.. differences.Where(d => d.IsSignificant == false && Told.Contains(d.Quantity)).Select(d => d.Quantity.Id)];
        return same.Length == 0 ? null : new Finding("unchanged", $"no more than the noise: {string.Join(", ", same)}");
    }

    private static Difference? Find(IReadOnlyList<Difference> differences, Quantity quantity) => differences.FirstOrDefault(d => d.Quantity == quantity);

    private static string Short(double value, string unit) => Engineering.Format(value, unit, unit is "%" or "1" ? 2 : 3);

    // Inductance and capacitance set the undamped frequency.
    private static double Undamped(double frequency, double? dampingRatio) => frequency / Math.Sqrt(1 - (dampingRatio * dampingRatio ?? 0));

    private static string Percent(double fraction) => Engineering.Format(100 * fraction, "%", 2);
}
