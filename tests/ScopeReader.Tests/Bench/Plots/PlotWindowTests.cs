using CsCheck;
using ScopeReader.Bench.Plots;

namespace ScopeReader.Tests.Bench.Plots;

public class PlotWindowTests
{
    private static readonly PlotSource Source = PlotSource.Of(Made.Ringing());

    [Fact]
    public void Zooming_leaves_the_place_under_the_pointer_where_it_is() =>
        Gen.Select(Gen.Double[0.2, 0.8], Gen.Double[0.3, 0.99]).Sample((anchor, factor) =>
        {
            PlotWindow whole = PlotWindow.Whole(Source), near = whole.Wider(factor, anchor, Source);
            double before = whole.Left + anchor * (whole.Right - whole.Left), after = near.Left + anchor * (near.Right - near.Left);
            // A few roundings of a double.
            return Math.Abs(after - before) < 1e-12 * (whole.Right - whole.Left);
        });

    [Fact]
    public void However_it_is_moved_and_zoomed_some_of_the_record_stays_in_it() =>
        Gen.Int[0, 6].Array[0, 60].Sample(moves =>
        {
            PlotWindow window = PlotWindow.Whole(Source);
            foreach (int move in moves)
                window = move switch
                {
                    0 => window.Along(0.9, Source),
                    1 => window.Along(-0.9, Source),
                    2 => window.Wider(0.3, 0.1, Source),
                    3 => window.Wider(3, 0.9, Source),
                    4 => window.Up(0.9, Source),
                    5 => window.Taller(0.3, Source),
                    _ => window.FitHeight(Source),
                };
            return window.Left < Source.End && window.Right > Source.Start && window.Bottom < Source.Highest && window.Top > Source.Lowest
                && window.Right > window.Left && window.Top > window.Bottom;
        });

    [Fact]
    public void A_record_of_one_sample_still_has_a_window()
    {
        PlotSource one = PlotSource.Of(new Captures.Waveform("one", "V", Captures.TimeAxis.PerSample, [2.5]));
        PlotWindow window = PlotWindow.Whole(one).Wider(0.1, 0.5, one).Along(3, one).FitHeight(one);
        Assert.True(window.Left < 0 && window.Right > 0 && window.Bottom < 2.5 && window.Top > 2.5);
    }
}
