namespace ScopeReader.Bench.Plots;

/// <summary>The part of a record that a plot shows.</summary>
/// <param name="Left">Where it starts, in the record's x unit.</param>
/// <param name="Right">Where it ends, above <paramref name="Left"/>.</param>
/// <param name="Bottom">The lowest value shown.</param>
/// <param name="Top">The highest, above <paramref name="Bottom"/>.</param>
internal readonly record struct PlotWindow(double Left, double Right, double Bottom, double Top)
{
    private const double Margin = 0.08;

    // Fewer values than this across the window show nothing new, and digits run out.
    private const double FewestValues = 4;

    /// <summary>The whole record.</summary>
    public static PlotWindow Whole(PlotSource source)
    {
        (double bottom, double top) = Around(source.Lowest, source.Highest);
        double left = source.Start, right = source.End;
        return right > left ? new PlotWindow(left, right, bottom, top) : new PlotWindow(left - 0.5, left + 0.5, bottom, top);
    }

    /// <summary>Moved along by a share of its width, no further than its middle stays in the record.</summary>
    public PlotWindow Along(double share, PlotSource source)
    {
        double width = Right - Left;
        double middle = Math.Clamp((Left + Right) / 2 + share * width, source.Start, Math.Max(source.Start, source.End));
        return this with { Left = middle - width / 2, Right = middle + width / 2 };
    }

    /// <summary>Moved up by a share of its height, no further than some of the values stay in it.</summary>
    public PlotWindow Up(double share, PlotSource source)
    {
        double height = Top - Bottom;
        double middle = Math.Clamp((Bottom + Top) / 2 + share * height, source.Lowest, source.Highest);
        return this with { Bottom = middle - height / 2, Top = middle + height / 2 };
    }

    /// <summary>Made wider or narrower.</summary>
    /// <param name="factor">New width over old.</param>
    /// <param name="anchor">The share of the width that stays where it is, 0 to 1.</param>
    /// <param name="source">What is shown.</param>
    public PlotWindow Wider(double factor, double anchor, PlotSource source)
    {
        double whole = source.End - source.Start;
        if (!(whole > 0))
            return this;
        double fixedPoint = Left + anchor * (Right - Left);
        double width = Math.Clamp((Right - Left) * factor, Math.Min(whole, whole * FewestValues / source.Count), whole * 1.02);
        double left = fixedPoint - anchor * width;
        return (this with { Left = left, Right = left + width }).Along(0, source);
    }

    /// <summary>Made taller or lower about its middle.</summary>
    public PlotWindow Taller(double factor, PlotSource source)
    {
        (double bottom, double top) = Around(source.Lowest, source.Highest);
        double height = Math.Clamp((Top - Bottom) * factor, (top - bottom) * 1e-4, (top - bottom) * 4), middle = (Bottom + Top) / 2;
        return this with { Bottom = middle - height / 2, Top = middle + height / 2 };
    }

    /// <summary>With the height that the values shown need.</summary>
    public PlotWindow FitHeight(PlotSource source)
    {
        int first = (int)Math.Clamp(Math.Floor(source.IndexOf(Left)), 0, source.Count - 1);
        int end = (int)Math.Clamp(Math.Ceiling(source.IndexOf(Right)) + 1, first + 1, source.Count);
        (double low, double high) = source.Between(first, end);
        (double bottom, double top) = Around(low, high);
        return this with { Bottom = bottom, Top = top };
    }

    /// <summary>A stretch about a place, the height unchanged.</summary>
    public PlotWindow About(double middle, double width) => this with { Left = middle - width / 2, Right = middle + width / 2 };

    private static (double Bottom, double Top) Around(double low, double high)
    {
        double room = high > low ? Margin * (high - low) : Math.Max(Math.Abs(low) * 0.1, 1e-12);
        return (low - room, high + room);
    }
}
