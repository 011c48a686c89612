namespace ScopeReader.Archive.Contents;

/// <summary>A primary reading that two measurements of the same bytes do not share.</summary>
/// <param name="Channel">The channel.</param>
/// <param name="Quantity">The quantity's identifier.</param>
/// <param name="Before">The earlier reading; null where it was not measured.</param>
/// <param name="After">The later reading; null where it is not measured.</param>
public sealed record MeasurementChange(string Channel, string Quantity, ReadingContent? Before, ReadingContent? After)
{
    // Programs for other processors round the last digits of long sums in another way.
    private const double SameDigits = 1e-9;

    /// <summary>What changed from one measurement to another: values, uncertainties, and what could be measured at all.</summary>
    public static IReadOnlyList<MeasurementChange> Between(MeasurementContent before, MeasurementContent after)
    {
        ArgumentNullException.ThrowIfNull(before);
        ArgumentNullException.ThrowIfNull(after);
        Dictionary<(string, int, string), ReadingContent> old = Primaries(before), now = Primaries(after);
        return
        [
            .. old.Keys.Union(now.Keys).Select(key => new MeasurementChange(key.Item1, key.Item3, old.GetValueOrDefault(key), now.GetValueOrDefault(key)))
                .Where(c => !(c.Before is { } b && c.After is { } a && Same(b.Value, a.Value, b.StandardUncertainty) && Same(b.ExpandedUncertainty, a.ExpandedUncertainty, b.ExpandedUncertainty) && a.Unit == b.Unit)),
        ];
    }

    private static bool Same(double a, double b, double uncertainty) => a.Equals(b) || Math.Abs(a - b) <= SameDigits * Math.Abs(a) + 1e-6 * uncertainty;

    private static Dictionary<(string, int, string), ReadingContent> Primaries(MeasurementContent measurement) => measurement.Channels
        .SelectMany(c => c.Readings.Where(r => r.Primary).Select(r => (Key: (c.Name, c.Segment, r.Quantity), Reading: r)))
        .DistinctBy(r => r.Key).ToDictionary(r => r.Key, r => r.Reading);
}
