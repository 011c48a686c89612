using System.Globalization;
using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Work;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Bench.Pages;

/// <summary>Everything behind one line: definition, value, budget, verdict.</summary>
internal static class DetailPage
{
    private const string About = "Everything behind one reading. Standard uncertainties add as squares (JCGM 100); the expanded uncertainty is the half-width of the 95 % interval. " +
        "Terms of the chain are shared by captures that share the chain; the rest, the repeatability, is what counts between them.";

    /// <summary>The page of a reading or a verdict.</summary>
    public static Page Of(ReadingRow row, IBenchHost host)
    {
        var lines = new List<TextLine> { new($"{row.Quantity.Meaning} ({row.Quantity.Source})", Ink.Plain, "definition") };
        if (row.Verdict is { } verdict)
            Verdict(verdict, lines);
        if (row.Reading is { } reading)
            Reading(reading, lines);
        return Make(row.Quantity.Id, lines, host);
    }

    /// <summary>The page of a note.</summary>
    public static Page Of(Note note, IBenchHost host) => Make(note.Heading, [new TextLine(note.Text)], host);

    private static TextPage Make(string title, List<TextLine> lines, IBenchHost host)
    {
        TextPage page = null!;
        page = new TextPage(title, About, lines, host.Back, new PageAction("F1", "help", "explain this screen; ? does too", (NamedKey.F1, () => host.Help(page)), ('?', () => host.Help(page))),
            new PageAction("q", "quit", "quit; Ctrl-Q does too", ('q', host.Quit), (KeyPress.WithCtrl('q'), host.Quit)));
        return page;
    }

    private static void Verdict(Verdict verdict, List<TextLine> lines)
    {
        (string word, Ink ink) = Words.Of(verdict.Outcome);
        lines.Add(new(""));
        lines.Add(new(word, ink, "verdict"));
        lines.Add(new(verdict.Reason, Ink.Plain, "because"));
        string rule = verdict.Limit.Rule == DecisionRule.Simple ? "simple rule: on the value alone"
            : string.Create(CultureInfo.InvariantCulture, $"guarded rule: guard band {verdict.Limit.Guard} × U");
        lines.Add(new($"{Words.Of(verdict.Limit)}, {rule}", Ink.Plain, "limit"));
        if (verdict.Probability is { } p)
            lines.Add(new(string.Create(CultureInfo.InvariantCulture, $"{100 * p:F1} % that the true value lies inside the limit"), Ink.Plain, "probability"));
    }

    private static void Reading(Reading reading, List<TextLine> lines)
    {
        Budget budget = reading.Budget;
        string Of(double value) => Engineering.Format(value, reading.Unit, 3);
        lines.Add(new(""));
        lines.Add(new(Words.Of(reading), Ink.Strong, "value"));
        string factor = budget.CoverageFactor is { } k ? string.Create(CultureInfo.InvariantCulture, $", 95 %, k = {k:F2}") : "";
        lines.Add(new(Of(budget.ExpandedUncertainty) + factor, Ink.Plain, "expanded uncertainty"));
        string freedom = budget.DegreesOfFreedom is { } n and < 1000 ? string.Create(CultureInfo.InvariantCulture, $", {n:F0} degrees of freedom") : "";
        lines.Add(new(Of(budget.StandardUncertainty) + freedom, Ink.Plain, "standard uncertainty"));
        lines.Add(new(Of(budget.Repeatability), Ink.Plain, "repeatability"));
        lines.Add(new(reading.Method + (reading.IsPrimary ? "" : "; not the primary reading of this quantity"), Ink.Plain, "method"));
        if (reading.Count is { } count)
            lines.Add(new(count.ToString(CultureInfo.InvariantCulture), Ink.Plain, "n"));
        if (reading.Note is { Length: > 0 } note)
            lines.Add(new(note, Ink.Plain, "note"));
        foreach (string missing in budget.Missing)
            lines.Add(new($"{missing}: not stated, so not in the interval; {PlanKeys.For(missing)} in the plan's {PlanKeys.TableOf(missing)} states it", Ink.Undecided, "missing"));
        lines.Add(new(""));
        lines.Add(new("Budget, largest first", Ink.Strong));
        foreach (BudgetTerm term in budget.Terms.OrderByDescending(t => t.Contribution))
            lines.Add(new($"{Of(term.Contribution),-12} {(term.Distribution == Distribution.Rectangular ? "rectangular" : "normal")}{(term.OfChain ? ", of the chain" : "")}", Ink.Plain, term.Name));
        if (budget.Terms.Count == 0)
            lines.Add(new("no terms", Ink.Quiet));
    }
}
