using System.Globalization;
using ScopeReader.Files.Output;
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
            string k = budget.CoverageFactor is { } factor ? string.Create(CultureInfo.InvariantCulture, $", k = {factor:F2}") : "";
            sheet.Line($"{reading.Quantity} ({reading.Method}): u = {Amount(budget.StandardUncertainty, reading.Unit, 2)}, "
                + $"U = {Amount(budget.ExpandedUncertainty, reading.Unit, 2)} (95 %{k}), repeatability {Amount(budget.Repeatability, reading.Unit, 2)}");
            BudgetTerm[] terms = [.. budget.Terms.OrderByDescending(t => t.Contribution)];
            if (sheet.Width < Narrow)
                foreach (BudgetTerm term in terms)
                    sheet.Indented($"{SafeText.Of(term.Name)} {Amount(term.Contribution, reading.Unit, 2)}, {Kind(term)}");
            else
                sheet.Columns([.. terms.Select(t => new[] { "  " + SafeText.Of(t.Name), Amount(t.Contribution, reading.Unit, 2), Share(t, budget), Kind(t) })]);
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
