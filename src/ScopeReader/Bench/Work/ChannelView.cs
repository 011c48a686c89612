using ScopeReader.Bench.Plots;
using ScopeReader.Captures;

namespace ScopeReader.Bench.Work;

/// <summary>What of a channel is looked at.</summary>
internal sealed class ChannelView(Channel channel, PlotSource source)
{
    private const double MostPeriods = 12, FewPeriods = 2.5;

    /// <summary>The channel.</summary>
    public Channel Channel { get; } = channel;

    /// <summary>Its values for the plot.</summary>
    public PlotSource Source { get; } = source;

    /// <summary>The part shown.</summary>
    public PlotWindow Window { get; set; } = PlotWindow.Whole(source);

    /// <summary>Where the person has not chosen a part yet: a few periods, of a record that holds too many to see one.</summary>
    /// <param name="period">The period, in the record's x unit.</param>
    public void ShowPeriods(double period)
    {
        if (Window == PlotWindow.Whole(Source) && Source.End - Source.Start > MostPeriods * period)
            Window = (Window with { Left = Source.Start, Right = Source.Start + FewPeriods * period }).FitHeight(Source);
    }

    /// <summary>What is marked on the plot.</summary>
    public IReadOnlyList<PlotMark> Marks { get; set; } = [];

    /// <summary>Moves the window to the middle of the record's next pass through its half level, to the right of its middle.</summary>
    /// <param name="level">The half level.</param>
    /// <param name="width">The window's new width, in the record's x unit.</param>
    /// <param name="forward">True for the next one, false for the one before.</param>
    /// <returns>False where there is none.</returns>
    public bool ToEdge(double level, double width, bool forward)
    {
        ReadOnlySpan<double> values = Source.Values;
        int step = forward ? 1 : -1;
        double middle = Source.IndexOf((Window.Left + Window.Right) / 2);
        // An edge in the middle already is the one that the last press found.
        int i = forward ? (int)Math.Floor(middle) + 2 : (int)Math.Ceiling(middle) - 2;
        for (i = Math.Clamp(i, 1, Math.Max(1, values.Length - 1)); i >= 1 && i < values.Length; i += step)
        {
            if (values[i - 1] < level == values[i] < level)
                continue;
            double share = (level - values[i - 1]) / (values[i] - values[i - 1]);
            double place = Source.At(i - 1) + share * (Source.At(i) - Source.At(i - 1));
            Window = Window.About(place, width);
            return true;
        }
        return false;
    }
}
