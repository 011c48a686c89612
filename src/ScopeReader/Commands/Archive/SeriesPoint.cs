using System.Globalization;
using ScopeReader.Archive.Search;

namespace ScopeReader.Commands.Archive;

/// <summary>A reading at a setting of a varied condition, or on a day.</summary>
/// <param name="Label">Where it comes from: an entry's number, a file.</param>
/// <param name="Setting">The condition in <paramref name="SettingUnit"/>, or days since the year 1.</param>
/// <param name="SettingUnit">Unit of the condition; empty for a date.</param>
/// <param name="SettingText">The setting as people read it.</param>
/// <param name="Value">The reading.</param>
/// <param name="ExpandedUncertainty">Half its 95 % interval.</param>
/// <param name="Unit">Its unit.</param>
internal sealed record SeriesPoint(string Label, double Setting, string SettingUnit, string SettingText, double Value, double ExpandedUncertainty, string Unit)
{
    /// <summary>The points of entries that have the quantity and the condition, in the order of their settings.</summary>
    /// <exception cref="UsageException">They are in several units.</exception>
    public static IReadOnlyList<SeriesPoint> From(IEnumerable<FoundEntry> entries, string quantity, string? channel, string? condition)
    {
        var points = new List<SeriesPoint>();
        foreach (FoundEntry entry in entries)
        {
            if (entry.Readings.FirstOrDefault(r => r.Quantity == quantity && (channel is null || r.Channel == channel)) is not { } reading)
                continue;
            string label = "entry " + entry.Number.ToString(CultureInfo.InvariantCulture);
            if (condition is null)
                points.Add(new SeriesPoint(label, entry.CapturedAt.UtcTicks / (double)TimeSpan.TicksPerDay, "", ArchiveCommand.Minute(entry.CapturedAt), reading.Value, reading.ExpandedUncertainty, reading.Unit));
            else if (entry.Conditions.TryGetValue(condition, out Condition? setting))
                points.Add(new SeriesPoint(label, setting.Value, setting.Unit, ArchiveCommand.Text(setting), reading.Value, reading.ExpandedUncertainty, reading.Unit));
        }
        return InOrder(points, condition ?? "date");
    }

    /// <summary>Points in the order of their settings.</summary>
    /// <exception cref="UsageException">They are in several units.</exception>
    public static IReadOnlyList<SeriesPoint> InOrder(IReadOnlyList<SeriesPoint> points, string condition)
    {
        string[] units = [.. points.Select(p => p.SettingUnit).Distinct()], values = [.. points.Select(p => p.Unit).Distinct()];
        if (units.Length > 1)
            throw new UsageException($"{condition} is in several units: {string.Join(", ", units)}; choose captures that share one");
        if (values.Length > 1)
            throw new UsageException($"the readings are in several units: {string.Join(", ", values)}; choose captures that share one");
        return [.. points.OrderBy(p => p.Setting)];
    }
}
