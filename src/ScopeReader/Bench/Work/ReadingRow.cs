using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Bench.Work;

/// <summary>A line of the table: a reading, a limit's answer, or both.</summary>
/// <param name="Quantity">What it is about.</param>
/// <param name="Reading">The reading; null where there is none.</param>
/// <param name="Verdict">The answer; null where no limit was set.</param>
internal sealed record ReadingRow(Quantity Quantity, Reading? Reading, Verdict? Verdict)
{
    /// <summary>The lines of a channel: what was judged first, in the plan's order, then the other readings.</summary>
    public static IReadOnlyList<ReadingRow> Of(ChannelMeasurement? measured)
    {
        if (measured is null)
            return [];
        ReadingRow[] judged = [.. measured.Verdicts.Select(v => new ReadingRow(v.Limit.Quantity, v.Reading, v))];
        return [.. judged, .. measured.Readings.Where(r => !judged.Any(j => ReferenceEquals(j.Reading, r))).Select(r => new ReadingRow(r.Quantity, r, null))];
    }

    /// <summary>What stands behind it, in a sentence or two.</summary>
    public string Reason()
    {
        var parts = new List<string>();
        if (Verdict is { } verdict)
        {
            string probable = verdict.Probability is { } p ? FormattableString.Invariant($", inside with {Math.Clamp(100 * p, 0, 100):F0} % probability") : "";
            parts.Add($"{Words.Of(verdict.Outcome).Word}{probable}: {verdict.Reason}");
        }
        if (Reading is { } reading)
        {
            if (Verdict is null && reading.Budget.Missing.Count > 0)
                parts.Add($"as indicated: {string.Join(", ", reading.Budget.Missing.Select(m => $"{m} not stated ({PlanKeys.For(m)} in the plan's {PlanKeys.TableOf(m)})"))}");
            parts.Add(reading.Count is { } n ? FormattableString.Invariant($"by {reading.Method}, n = {n}") : $"by {reading.Method}");
            if (reading.Note is { Length: > 0 } note)
                parts.Add(note);
        }
        return string.Join(" · ", parts);
    }
}
