using ScopeReader.Bench.Plots;
using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader.Bench.Work;

/// <summary>A file on the bench: how far it has come, what was found in it, and what of it is looked at.</summary>
/// <remarks>Belongs to the thread of the screen: the background work posts its news there.</remarks>
internal sealed class OpenCapture(string path)
{
    private ChannelView[] _views = [];

    /// <summary>The file as the person gave it.</summary>
    public string Path { get; } = path;

    /// <summary>Its name alone.</summary>
    public string Name { get; } = System.IO.Path.GetFileName(path) is { Length: > 0 } name ? name : path;

    /// <summary>How far it has come.</summary>
    public CaptureStage Stage { get; private set; }

    /// <summary>Share of the measuring that is done, 0 to 1.</summary>
    public double Progress { get; private set; }

    /// <summary>The one line that says why it could not be read.</summary>
    public string? Problem { get; private set; }

    /// <summary>The capture, as soon as it is read.</summary>
    public Capture? Capture { get; private set; }

    /// <summary>What was measured, as soon as it is.</summary>
    public Measurement? Measurement { get; private set; }

    /// <summary>Index of the channel that is looked at.</summary>
    public int ChannelIndex { get; private set; }

    /// <summary>How many channels there are; 0 until it is read.</summary>
    public int ChannelCount => _views.Length;

    /// <summary>The channel that is looked at; null until it is read.</summary>
    public ChannelView? View => _views.Length == 0 ? null : _views[ChannelIndex];

    /// <summary>What was measured on that channel.</summary>
    public ChannelMeasurement? ChannelMeasured => Measurement?.Channels[ChannelIndex];

    /// <summary>Reading has begun.</summary>
    public void Started() => (Stage, Problem, Progress) = (CaptureStage.Reading, null, 0);

    /// <summary>It was read.</summary>
    public void WasRead(Capture capture, IReadOnlyList<PlotSource> sources)
    {
        (Capture, Measurement, Stage) = (capture, null, CaptureStage.Measuring);
        _views = [.. capture.Channels.Zip(sources, (channel, source) => new ChannelView(channel, source))];
        ChannelIndex = Math.Min(ChannelIndex, Math.Max(0, _views.Length - 1));
    }

    /// <summary>A share of the measuring is done.</summary>
    public void Progressed(double share) => Progress = share;

    /// <summary>It was measured.</summary>
    public void WasMeasured(Measurement measurement)
    {
        (Measurement, Stage) = (measurement, CaptureStage.Measured);
        for (int i = 0; i < _views.Length; i++)
        {
            _views[i].Marks = PlotMarks.Of(measurement.Channels[i]);
            if (measurement.Channels[i].Readings.FirstOrDefault(r => r.IsPrimary && r.Quantity == Quantities.Period) is { } period)
                _views[i].ShowPeriods(period.Value);
        }
    }

    /// <summary>It could not be read or measured.</summary>
    public void Failed(string problem)
    {
        (Problem, Stage) = (problem, CaptureStage.Unreadable);
        (Capture, Measurement, _views, ChannelIndex) = (null, null, [], 0);
    }

    /// <summary>Looks at the next channel, or the one before.</summary>
    public void StepChannel(int step)
    {
        if (_views.Length > 0)
            ChannelIndex = (ChannelIndex + step + _views.Length) % _views.Length;
    }
}
