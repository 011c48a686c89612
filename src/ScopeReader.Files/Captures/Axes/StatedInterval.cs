using System.Globalization;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Rows;

namespace ScopeReader.Files.Axes;

/// <summary>The sample interval that a preamble states.</summary>
internal static class StatedInterval
{
    // A unitless interval is in the unit of the times where it is their interval to this share.
    private const double Same = 0.01;

    /// <summary>The interval, s; null where none is stated.</summary>
    /// <param name="table">The block and what is said round it.</param>
    /// <param name="factor">What one of the times' unit is in seconds.</param>
    public static double? Of(Table table, double factor)
    {
        if (table.Facts.Number(Fact.Interval, "s") is { Value: > 0 } interval)
            return interval.Unit is null ? InSeconds(table, interval.Value, factor) : interval.Value;
        return table.Facts.Number(Fact.Rate, "Hz", "Sa/s") is { Value: > 0 } rate && double.IsFinite(1 / rate.Value) ? 1 / rate.Value : null;
    }

    /// <summary>A printed value in seconds: 15 digits of it, where the scaling only cost the last bit.</summary>
    public static double Scaled(double value, double factor)
    {
        double scaled = UnitWords.Scale(value, factor), plain = double.Parse(scaled.ToString("G15", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        return Math.Abs(plain - scaled) <= 3e-16 * Math.Abs(scaled) ? plain : scaled;
    }

    // Without a unit it is in seconds or in the unit of the times, whichever fits.
    private static double InSeconds(Table table, double value, double factor)
    {
        if (factor == 1)
            return value;
        double fitted = table.Axes.Where(a => a is { Rows: > 1 }).Select(a => Math.Abs(a!.Fit()?.Interval ?? 0)).FirstOrDefault();
        return Math.Abs(value / fitted - 1) < Same ? Scaled(value, factor) : value;
    }
}
