using ScopeReader.Bench.Drawing;
using ScopeReader.Bench.Plots;
using ScopeReader.Captures;

namespace ScopeReader.Tests.Bench.Plots;

public class PlotPainterTests
{
    [Fact]
    public void Ringing_square_wave() => Approved.Check("plot-ringing", Painted(60, 14, Made.Ringing(), marks:
        [new PlotMark(3.3, "high", Ink.Accent), new PlotMark(1.65, "50 %", Ink.Accent), new PlotMark(0, "low", Ink.Accent)]));

    [Fact]
    public void Edge_seen_close() => Approved.Check("plot-edge", Painted(60, 14, Made.Ringing(), (window, _) => window.About(0, 0.3e-6)));

    [Fact]
    public void Spectrum_with_its_harmonics() => Approved.Check("plot-spectrum", Painted(60, 14, Made.Lines(), marks:
        [new PlotMark(-7, "1", Ink.Accent, 455e3), new PlotMark(-32, "2", Ink.Accent, 910e3), new PlotMark(-17.5, "3", Ink.Accent, 1365e3), new PlotMark(-27, "", Ink.Bound, 1365e3)]));

    [Fact]
    public void A_glitch_of_one_sample_in_ten_million_is_drawn_in_its_column()
    {
        var samples = new double[10_000_000];
        samples[7_500_000] = 1;
        string[] rows = Painted(48, 10, new Waveform("CH1", "V", new TimeAxis(0, 1e-9, AxisSource.Column), samples)).Split('\n');
        // 40 columns for the samples after 8 of labels: three quarters along is column 8 + 30.
        Assert.InRange(rows[0].Length - 1, 37, 38);
        Assert.InRange(rows[0].TrimEnd()[^1], '\u2801', '\u28FF');
    }

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(17)]
    public void Short_and_constant_records_are_drawn(int count)
    {
        string picture = Painted(40, 8, new Waveform("CH1", "V", TimeAxis.PerSample, [.. Enumerable.Repeat(2.0, count)]));
        Assert.Contains(picture, c => c is > '\u2800' and <= '\u28FF');
        Assert.Contains("sample", picture);
    }

    [Fact]
    public void Ten_million_samples_cost_little_more_to_draw_than_ten_thousand() =>
        // The groups that a column of dots is made of grow with the logarithm: from 10^4 to 10^7 by a factor of 7/4. A walk through the
        // samples would cost a thousand times as much. 8 leaves room for memory outside the cache and for a busy machine.
        Assert.InRange(FastestFrame(10_000_000) / FastestFrame(10_000), 0, 8);

    private static double FastestFrame(int count)
    {
        var random = new Random(7);
        PlotSource source = PlotSource.Of(new Waveform("CH1", "V", new TimeAxis(0, 1e-9, AxisSource.Column), [.. Enumerable.Range(0, count).Select(_ => random.NextDouble())]));
        var grid = new CellGrid();
        var painter = new PlotPainter();
        PlotWindow window = PlotWindow.Whole(source).Wider(0.5, 0.37, source);
        TimeSpan fastest = TimeSpan.MaxValue;
        for (int i = 0; i < 30; i++)
        {
            grid.Reset(200, 60);
            long start = System.Diagnostics.Stopwatch.GetTimestamp();
            painter.Paint(grid, new Box(0, 0, 200, 60), source, window = window.Along(0.001, source), []);
            TimeSpan taken = System.Diagnostics.Stopwatch.GetElapsedTime(start);
            fastest = taken < fastest ? taken : fastest;
        }
        return fastest.TotalMilliseconds;
    }

    private static string Painted(int width, int height, Channel channel, Func<PlotWindow, PlotSource, PlotWindow>? change = null, IReadOnlyList<PlotMark>? marks = null)
    {
        var grid = new CellGrid();
        grid.Reset(width, height);
        PlotSource source = PlotSource.Of(channel);
        PlotWindow whole = PlotWindow.Whole(source);
        new PlotPainter().Paint(grid, new Box(0, 0, width, height), source, change?.Invoke(whole, source) ?? whole, marks ?? []);
        return grid.ToString();
    }
}
