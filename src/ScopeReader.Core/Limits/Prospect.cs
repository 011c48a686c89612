using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Limits;

/// <summary>What would decide an undecided verdict: a longer record, a better reference, or nothing.</summary>
/// <remarks>
/// With r times the record the noise in a frequency falls to r^(-3/2) (methods: u ∝ 1/(C√N)), in a drift to r^(-5/2), in an average
/// to r^(-1/2); errors that are bounded by a part of a cycle or a sample at either end fall to 1/r in a frequency. Errors of the
/// chain stay, and so do steps of the converter and unsteadiness of the source.
/// </remarks>
internal static class Prospect
{
    private const double LongestRecord = 1e4;

    private static readonly string[] OfTheEnds = ["interpolation", "interval", "leakage", "folding", "harmonics"];

    /// <summary>The reason of an undecided verdict.</summary>
    /// <param name="reading">The reading, within the guard band of a bound.</param>
    /// <param name="low">Lower bound.</param>
    /// <param name="high">Upper bound.</param>
    /// <param name="guard">Guard band over expanded uncertainty, above 0.</param>
    public static string OfDecision(Reading reading, double low, double high, double guard)
    {
        double distance = Math.Min(Math.Abs(reading.Value - low), Math.Abs(high - reading.Value));
        bool Decides(IEnumerable<BudgetTerm> terms) => guard * new Budget(terms).ExpandedUncertainty < distance;

        BudgetTerm[] chain = [.. reading.Budget.Terms.Where(t => t.OfChain)];
        if (!Decides(Longer(reading, LongestRecord)))
        {
            BudgetTerm stays = Longer(reading, LongestRecord).MaxBy(t => t.Contribution)!;
            if (!stays.OfChain)
                return $"within the guard band, and {stays.Name} does not fall with a longer record: {Against(stays.Name)}";
            // With the other terms as they are, how good would the chain have to be? A calibration's error is normal.
            double standard = Math.Sqrt(chain.Sum(t => t.Contribution * t.Contribution));
            double share = Bisect(s => Decides([.. Longer(reading, LongestRecord).Where(t => !t.OfChain), BudgetTerm.Normal(stays.Name, s * standard)]), 0, 1);
            return share > 0
                ? $"within the guard band, and {stays.Name} alone is too uncertain: no longer record will decide it; {Reference(reading, chain, share * standard)} would"
                : $"so near the bound that no reference and no record will decide it: judge it by the simple rule, or move the bound";
        }
        double longer = 1 / Bisect(s => Decides(Longer(reading, 1 / s)), 1 / LongestRecord, 1);
        return string.Create(CultureInfo.InvariantCulture, $"within the guard band; a record {Times(longer)} as long{Cycles(reading, longer)}, otherwise as it is, would decide it");
    }

    /// <summary>A warning where the limit is narrower than the chain could ever decide; null where it is not.</summary>
    public static string? TooTight(Verdict verdict)
    {
        if (verdict is not { Reading: { } reading, Limit: { Rule: DecisionRule.Guarded, Low: { } low, High: { } high } limit } || reading.Budget.Missing.Count > 0)
            return null;
        double chain = new Budget(reading.Budget.Terms.Where(t => t.OfChain)).ExpandedUncertainty;
        if (2 * limit.Guard * chain <= high - low)
            return null;
        return string.Create(CultureInfo.InvariantCulture,
            $"the limit on {limit.Quantity.Id} is {Engineering.Format(high - low, reading.Unit, 3)} wide, and the chain alone leaves ±{Engineering.Format(chain, reading.Unit, 2)}: no capture with this chain can pass it; widen the limit, or have the chain calibrated");
    }

    // The reading's terms, had the record been r times as long.
    private static IEnumerable<BudgetTerm> Longer(Reading reading, double r)
    {
        bool isFrequency = reading.Quantity == Quantities.Frequency || reading.Quantity == Quantities.Period || reading.Quantity == Quantities.FrequencyError;
        double power = isFrequency ? 1.5 : reading.Quantity == Quantities.FrequencyDrift ? 2.5 : 0.5;
        foreach (BudgetTerm term in reading.Budget.Terms)
            if (term.OfChain)
                yield return term;
            else if (term.Distribution == Distribution.Normal)
                yield return term.Times(Math.Pow(r, -power));
            else
                yield return isFrequency && OfTheEnds.Contains(term.Name) ? term.Times(1 / r) : term;
    }

    // The largest share that decides, to a hundredth of itself; the lower end where none does.
    private static double Bisect(Func<double, bool> decides, double low, double high)
    {
        for (int i = 0; i < 60 && high - low > 1e-3 * high; i++)
        {
            double middle = (low + high) / 2;
            (low, high) = decides(middle) ? (middle, high) : (low, middle);
        }
        return low;
    }

    private static string Reference(Reading reading, BudgetTerm[] chain, double standard)
    {
        if (!chain.All(t => t.Name.StartsWith("timebase", StringComparison.Ordinal)))
            return $"a chain calibrated to a standard uncertainty of {Engineering.Format(standard, reading.Unit, 2)}";
        double ppm = reading.Unit == "ppm" ? standard : standard / Math.Abs(reading.Value) * 1e6;
        return string.Create(CultureInfo.InvariantCulture, $"a timebase calibrated to a standard uncertainty of {Engineering.Format(ppm, "ppm", 2)} (scopereader calibrate, with a reference at least as good)");
    }

    private static string Against(string term) => term switch
    {
        "unsteadiness" => "steady the source first",
        "quantisation" => "use more of the converter's range, or more bits",
        _ => "capture it another way",
    };

    private static string Times(double r) => r < 9.95 ? r.ToString("0.0", CultureInfo.InvariantCulture) + " times" : Math.Ceiling(r).ToString("0", CultureInfo.InvariantCulture) + " times";

    private static string Cycles(Reading reading, double r) => reading is { Count: { } count, Method: "sine-fit" or "harmonic-fit" or "interpolated-fft" or "crossings" }
        ? $" (about {Math.Ceiling(r * count / (reading.Method == "crossings" ? 2 : 1)).ToString("0", CultureInfo.InvariantCulture)} cycles)" : "";
}
