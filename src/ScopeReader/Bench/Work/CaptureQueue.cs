using System.Collections.Concurrent;
using ScopeReader.Bench.Plots;
using ScopeReader.Captures;

namespace ScopeReader.Bench.Work;

/// <summary>Reads and measures files one after the other on a thread of its own, and posts each step to the screen.</summary>
internal sealed class CaptureQueue : IDisposable
{
    private readonly BlockingCollection<OpenCapture> _waiting = [];
    private readonly CancellationTokenSource _stop = new();
    private readonly Func<string, CancellationToken, Capture> _read;
    private readonly Func<Exception, string?> _explain;
    private readonly Plan _plan;
    private readonly Action<Action> _post;

    /// <param name="read">Reads a file.</param>
    /// <param name="explain">The one line for an exception that the file is to blame for; null for any other.</param>
    /// <param name="plan">What it is measured against.</param>
    /// <param name="post">Runs an action on the screen's thread, from any thread.</param>
    public CaptureQueue(Func<string, CancellationToken, Capture> read, Func<Exception, string?> explain, Plan plan, Action<Action> post)
    {
        (_read, _explain, _plan, _post) = (read, explain, plan, post);
        // A thread of its own and not the pool: it must not keep the program alive, nor wait for other work.
        new Thread(Work) { IsBackground = true, Name = "captures" }.Start();
    }

    /// <summary>Puts a file in the queue.</summary>
    public void Add(OpenCapture capture)
    {
        if (!_stop.IsCancellationRequested)
            _waiting.Add(capture);
    }

    /// <summary>Stops the work; what is under way is given up.</summary>
    public void Dispose()
    {
        _stop.Cancel();
        _waiting.CompleteAdding();
    }

    private void Work()
    {
        try
        {
            foreach (OpenCapture capture in _waiting.GetConsumingEnumerable(_stop.Token))
                Process(capture);
        }
        catch (OperationCanceledException)
        {
            // The bench has been closed: nobody waits for the rest.
        }
    }

    private void Process(OpenCapture open)
    {
        try
        {
            _post(open.Started);
            Capture capture = _read(open.Path, _stop.Token);
            PlotSource[] sources = [.. capture.Channels.Select(PlotSource.Of)];
            _post(() => open.WasRead(capture, sources));
            Measurement measurement = Analysis.Measure(capture, _plan, new Told(share => _post(() => open.Progressed(share))), _stop.Token);
            _post(() => open.WasMeasured(measurement));
        }
        catch (OperationCanceledException)
        {
            throw;
        }
        catch (Exception exception)
        {
            // One bad file must not take the others from the screen: its line stands in its place.
            string line = _explain(exception) ?? $"{open.Name}: a fault of this program, not of the file: {exception.GetType().Name}: {exception.Message}";
            _post(() => open.Failed(line));
        }
    }

    // Progress<T> would post to the thread pool, out of order.
    private sealed class Told(Action<double> tell) : IProgress<double>
    {
        public void Report(double value) => tell(value);
    }
}
