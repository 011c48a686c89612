using System.Collections.Concurrent;
using ScopeReader.Bench.Work;
using ScopeReader.Captures;

namespace ScopeReader.Tests.Bench.Work;

public class CaptureQueueTests
{
    private readonly BlockingCollection<Action> _posted = [];

    [Fact]
    public void A_file_goes_from_waiting_to_measured_and_a_bad_one_keeps_its_line_while_the_next_goes_on()
    {
        var good = new OpenCapture("good.csv");
        var bad = new OpenCapture("bad.csv");
        var faulty = new OpenCapture("faulty.csv");
        var last = new OpenCapture("last.csv");
        using var queue = new CaptureQueue(Read, e => e is IOException ? e.Message : null, Plan.Empty, _posted.Add);
        OpenCapture[] all = [good, bad, faulty, last];
        Assert.All(all, c => Assert.Equal(CaptureStage.Waiting, c.Stage));
        foreach (OpenCapture capture in all)
            queue.Add(capture);

        var stages = new List<CaptureStage>();
        while (last.Stage != CaptureStage.Measured)
        {
            // 30 s: only a machine that hangs takes as long.
            Assert.True(_posted.TryTake(out Action? news, TimeSpan.FromSeconds(30)));
            news();
            if (stages.LastOrDefault() != good.Stage)
                stages.Add(good.Stage);
        }
        Assert.Equal([CaptureStage.Reading, CaptureStage.Measuring, CaptureStage.Measured], stages);
        Assert.NotNull(good.Measurement);
        Assert.Equal(1, good.ChannelCount);
        Assert.Equal((CaptureStage.Unreadable, "bad.csv: no such file"), (bad.Stage, bad.Problem));
        Assert.Equal("faulty.csv: a fault of this program, not of the file: InvalidOperationException: broken", faulty.Problem);
    }

    [Fact]
    public void Closing_gives_up_the_file_under_way()
    {
        using var started = new ManualResetEventSlim();
        using var ended = new ManualResetEventSlim();
        var queue = new CaptureQueue((_, cancellation) =>
        {
            started.Set();
            cancellation.WaitHandle.WaitOne();
            ended.Set();
            throw new OperationCanceledException(cancellation);
        }, _ => null, Plan.Empty, _posted.Add);
        queue.Add(new OpenCapture("endless.csv"));
        Assert.True(started.Wait(TimeSpan.FromSeconds(30)));
        queue.Dispose();
        Assert.True(ended.Wait(TimeSpan.FromSeconds(30)));
    }

    private static Capture Read(string path, CancellationToken cancellation) => path switch
    {
        "bad.csv" => throw new IOException("bad.csv: no such file"),
        "faulty.csv" => throw new InvalidOperationException("broken"),
        _ => Made.Capture(path, Made.Ringing(200)),
    };
}
