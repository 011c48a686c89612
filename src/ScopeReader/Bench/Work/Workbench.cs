using ScopeReader.Captures;

namespace ScopeReader.Bench.Work;

/// <summary>What lies on the bench: the open captures, the plan, and which capture is looked at.</summary>
internal sealed class Workbench : IDisposable
{
    private readonly CaptureQueue _queue;
    private readonly List<OpenCapture> _captures = [];

    /// <param name="plan">What captures are measured against.</param>
    /// <param name="planPath">The plan's file; null without one.</param>
    /// <param name="read">Reads a file.</param>
    /// <param name="explain">The one line for an exception that a file is to blame for; null for any other.</param>
    /// <param name="post">Runs an action on the screen's thread and draws again.</param>
    public Workbench(Plan plan, string? planPath, Func<string, CancellationToken, Capture> read, Func<Exception, string?> explain, Action<Action> post)
    {
        (Plan, PlanPath) = (plan, planPath);
        _queue = new CaptureQueue(read, explain, plan, post);
    }

    /// <summary>The plan.</summary>
    public Plan Plan { get; }

    /// <summary>The plan's file; null without one.</summary>
    public string? PlanPath { get; }

    /// <summary>The open captures, in the order they were opened.</summary>
    public IReadOnlyList<OpenCapture> Captures => _captures;

    /// <summary>Index of the capture that is looked at.</summary>
    public int SelectedIndex { get; private set; }

    /// <summary>The capture that is looked at; null where none is open.</summary>
    public OpenCapture? Selected => _captures.Count == 0 ? null : _captures[SelectedIndex];

    /// <summary>Opens a file, or reads it again where it is open, and looks at it.</summary>
    public void Open(string path)
    {
        int already = _captures.FindIndex(c => c.Path == path);
        if (already >= 0)
            SelectedIndex = already;
        else
        {
            _captures.Add(new OpenCapture(path));
            SelectedIndex = _captures.Count - 1;
        }
        _queue.Add(_captures[SelectedIndex]);
    }

    /// <summary>Looks at another capture; out of range goes round.</summary>
    public void Select(int index)
    {
        if (_captures.Count > 0)
            SelectedIndex = (index % _captures.Count + _captures.Count) % _captures.Count;
    }

    /// <inheritdoc/>
    public void Dispose() => _queue.Dispose();
}
