using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Commands.Tables;

/// <summary>Where each reading's uncertainty comes from, the largest term first.</summary>
internal static class BudgetSection
{
    private const int Narrow = 60;

    public static void Write(Sheet sheet, IReadOnlyList<Reading> readings)
    {
        if (readings.Count == 0)
            return;
        sheet.Heading("Budgets");
        foreach (Reading reading in readings)
        {
            Budget budget = reading.Budget;
            // A level is in dBc or dBm; how far it may be off is in dB.
            string unit = reading.Unit.StartsWith("dB", StringComparison.Ordinal) ? "dB" : reading.Unit;
            string k = budget.CoverageFactor is { } factor ? string.Create(CultureInfo.InvariantCulture, $", k = {factor:F2}") : "";
            sheet.Line($"{reading.Quantity} ({reading.Method}): u = {Amount(budget.StandardUncertainty, unit, 2)}, "
                + $"U = {Amount(budget.ExpandedUncertainty, unit, 2)} (95 %{k}), repeatability {Amount(budget.Repeatability, unit, 2)}");
            BudgetTerm[] terms = [.. budget.Terms.OrderByDescending(t => t.Contribution)];
            if (sheet.Width < Narrow)
                foreach (BudgetTerm term in terms)
                    sheet.Indented($"{SafeText.Of(term.Name)} {Amount(term.Contribution, unit, 2)}, {Kind(term)}");
            else
                sheet.Columns([.. terms.Select(t => new[] { "  " + SafeText.Of(t.Name), Amount(t.Contribution, unit, 2), Share(t, budget), Kind(t) })]);
        }
    }

    private static string Amount(double value, string unit, int digits) => Sheet.Joined(Engineering.Format(value, SafeText.Of(unit), digits));

    private static string Share(BudgetTerm term, Budget budget) => budget.StandardUncertainty > 0
        ? string.Create(CultureInfo.InvariantCulture, $"{100 * Math.Pow(term.Contribution / budget.StandardUncertainty, 2):F0} % of u²")
        : "";

    private static string Kind(BudgetTerm term)
    {
        string freedom = term.DegreesOfFreedom is { } n && double.IsFinite(n) ? string.Create(CultureInfo.InvariantCulture, $", {n:G3} degrees of freedom") : "";
        return $"{OutputWords.Of(term.Distribution)}{(term.OfChain ? ", of the chain" : "")}{freedom}";
    }
}
