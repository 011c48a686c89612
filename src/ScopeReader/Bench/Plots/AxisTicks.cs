using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Bench.Plots;

/// <summary>Round places along an axis and how they are written: one prefix for all of them.</summary>
/// <remarks>
/// Far from zero and close together, labels would run to ten digits: they are then differences from a round place that is
/// written once.
/// </remarks>
internal sealed class AxisTicks
{
    private const int MostDigits = 6;
    private readonly double _first, _step, _scale;
    private readonly int _decimals;

    /// <param name="low">Where the axis starts.</param>
    /// <param name="high">Where it ends, above.</param>
    /// <param name="most">The most ticks there is room for; 2 or more.</param>
    /// <param name="unit">The unit, without prefix.</param>
    public AxisTicks(double low, double high, int most, string unit)
    {
        _step = RoundUp((high - low) / Math.Max(2, most));
        _first = Math.Ceiling(low / _step - 1e-9) * _step;
        Count = Math.Max(0, (int)Math.Floor((high - _first) / _step + 1e-9) + 1);

        double farthest = Math.Max(Math.Abs(low), Math.Abs(high));
        if (Math.Log10(farthest / _step) > MostDigits - 1)
        {
            Origin = _first;
            farthest = _step * Math.Max(1, Count - 1);
        }
        (_scale, Unit) = Prefixed(farthest, unit);
        _decimals = Math.Clamp((int)Math.Ceiling(-Math.Log10(_step / _scale) - 1e-9), 0, 12);
        From = Origin is { } origin ? Engineering.Format(origin, unit, DigitsOf(origin, _step)) : null;
    }

    /// <summary>How many ticks there are.</summary>
    public int Count { get; }

    /// <summary>The prefixed unit of the labels.</summary>
    public string Unit { get; }

    /// <summary>The place that labels are counted from; null where that is zero.</summary>
    public double? Origin { get; }

    /// <summary><see cref="Origin"/> as written.</summary>
    public string? From { get; }

    /// <summary>Where a tick lies.</summary>
    public double At(int index) => _first + index * _step;

    /// <summary>How it is written, without the unit.</summary>
    public string Label(int index)
    {
        double value = Origin is null ? At(index) : index * _step;
        string text = (Math.Abs(value) < _step / 2 ? 0 : value / _scale).ToString("F" + _decimals, CultureInfo.InvariantCulture).Replace('-', '−');
        return Origin is null ? text : "+" + text;
    }

    // 1, 2 or 5 times a power of ten.
    private static double RoundUp(double step)
    {
        double decade = Math.Pow(10, Math.Floor(Math.Log10(step)));
        return decade * ((step / decade) switch { <= 1 + 1e-9 => 1, <= 2 + 1e-9 => 2, <= 5 + 1e-9 => 5, _ => 10 });
    }

    private static int DigitsOf(double value, double step) =>
        Math.Clamp((int)Math.Floor(Math.Log10(Math.Abs(value) / step) + 1e-9) + 1, 1, 15);

    // The prefix that the rest of the program would write this size with.
    private static (double Scale, string Unit) Prefixed(double size, string unit)
    {
        string written = Engineering.Format(size, unit, 3);
        int space = written.IndexOf(' ');
        if (space < 0)
            return (1, unit);
        string prefixed = written[(space + 1)..];
        return (Units.TryUnit(prefixed, out double factor, out _) && prefixed.Length > unit.Length ? factor : 1, prefixed);
    }
}
