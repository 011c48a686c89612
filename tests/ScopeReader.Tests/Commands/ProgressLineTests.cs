using ScopeReader.Commands;
using ScopeReader.Files;

namespace ScopeReader.Tests.Commands;

public sealed class ProgressLineTests : IDisposable
{
    private readonly StringWriter _terminal = new();
    private readonly Clock _clock = new();

    public void Dispose() => _terminal.Dispose();

    private ProgressLine Line(CancellationToken cancellation = default) => new(_terminal, _clock, cancellation);

    [Fact]
    public void Nothing_is_shown_for_half_a_second()
    {
        using ProgressLine line = Line();
        IProgress<ImportProgress> reading = line.Reading("captures/long.csv")!;
        _clock.Seconds = 0.49;
        reading.Report(new ImportProgress(10, 100));
        Assert.Equal("", _terminal.ToString());

        _clock.Seconds = 0.5;
        reading.Report(new ImportProgress(25, 100));
        Assert.Equal("reading long.csv [#####               ]  25 %", _terminal.ToString());
    }

    [Fact]
    public void A_pipe_shows_how_much_came()
    {
        using ProgressLine line = Line();
        IProgress<ImportProgress> reading = line.Reading("-")!;
        _clock.Seconds = 1;
        reading.Report(new ImportProgress(12_345_678, null));
        Assert.Equal("reading -, 12 MB", _terminal.ToString());
    }

    [Fact]
    public void The_line_is_gone_before_anything_else_is_written_and_at_the_end()
    {
        using (ProgressLine line = Line())
        {
            IProgress<double> measuring = line.Measuring("a.csv")!;
            _clock.Seconds = 1;
            measuring.Report(1);
            line.Aside(() => _terminal.Write("RESULT\n"));
            _clock.Seconds = 2;
            measuring.Report(1);
        }
        Assert.Equal("\nRESULT\n", Shown(_terminal.ToString()));
    }

    [Fact]
    public void When_the_work_is_stopped_the_line_is_gone_and_stays_gone()
    {
        using var stop = new CancellationTokenSource();
        using ProgressLine line = Line(stop.Token);
        IProgress<double> measuring = line.Measuring("a\u001b[31m.csv")!;
        _clock.Seconds = 1;
        measuring.Report(0.5);
        Assert.DoesNotContain('\u001b', _terminal.ToString());
        stop.Cancel();
        _clock.Seconds = 2;
        measuring.Report(0.6);
        Assert.Equal("\n", Shown(_terminal.ToString()));
    }

    [Fact]
    public void Where_nobody_watches_nobody_is_told()
    {
        using var line = new ProgressLine(null, _clock, default);
        Assert.Null(line.Reading("a.csv"));
        Assert.Null(line.Measuring("a.csv"));
    }

    // What a terminal shows of carriage returns and what overwrites what, a line a line; trailing spaces are not seen.
    private static string Shown(string written)
    {
        var lines = new List<string>();
        foreach (string part in written.Split('\n'))
        {
            char[] seen = new string(' ', 200).ToCharArray();
            int at = 0;
            foreach (char c in part)
                if (c == '\r')
                    at = 0;
                else
                    seen[at++] = c;
            lines.Add(new string(seen).TrimEnd());
        }
        return "\n" + string.Join('\n', lines);
    }

    private sealed class Clock : TimeProvider
    {
        public double Seconds { get; set; }

        public override long TimestampFrequency => 1_000_000;

        public override long GetTimestamp() => (long)(Seconds * TimestampFrequency);
    }
}
