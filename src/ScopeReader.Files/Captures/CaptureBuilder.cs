using ScopeReader.Captures;
using ScopeReader.Files.Axes;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Rows;

namespace ScopeReader.Files;

/// <summary>Makes channels of the blocks of numbers of a file.</summary>
internal sealed class CaptureBuilder(string file, ImportSettings settings, double scale)
{
    private readonly double _scale = scale * (settings.Factor ?? 1);
    private readonly List<Channel> _channels = [];
    private readonly List<ChannelReport> _reports = [];
    private readonly Dictionary<string, int> _segments = [];

    /// <summary>The channels so far.</summary>
    public IReadOnlyList<Channel> Channels => _channels;

    /// <summary>What there is to say of them.</summary>
    public IReadOnlyList<ChannelReport> Reports => _reports;

    /// <summary>What was assumed or noticed.</summary>
    public List<string> Doubts { get; } = [];

    /// <summary>The axis of the first channel.</summary>
    public AxisReport? Axis { get; private set; }

    /// <summary>The file, for messages.</summary>
    public string File => file;

    /// <summary>What the person says of it.</summary>
    public ImportSettings Settings => settings;

    /// <summary>Adds the channels of a block.</summary>
    /// <exception cref="ImportException">Its axis is none, or it holds no samples.</exception>
    public void Add(Table table)
    {
        List<SampleSource> sources = SampleSource.Of(table, settings);
        if (sources.Count == 0)
            throw new ImportException(file, "expected a column of samples beside the axis, found none. Name the columns with --columns time,CH1,…", table.FirstLine);
        var times = new Dictionary<int, List<TimedPiece>>();
        foreach (SampleSource source in sources)
        {
            if (source.Axis >= 0 && table.Roles[source.Axis] == ColumnRole.Frequency)
                SpectrumBuilder.FromColumn(this, table, source);
            else if (source.Axis < 0 && settings.Interval is null && SpectrumBuilder.IsStated(table, source))
                SpectrumBuilder.FromPreamble(this, table, source);
            else
            {
                if (!times.TryGetValue(source.Axis, out List<TimedPiece>? pieces))
                    times[source.Axis] = pieces = new TimeAxisReader(this, table).Read(source.Axis);
                WaveformBuilder.Add(this, table, source, pieces);
            }
        }
    }

    /// <summary>Notes something once, however often it is met.</summary>
    public void Doubt(string sentence)
    {
        if (!Doubts.Contains(sentence))
            Doubts.Add(sentence);
    }

    /// <summary>Keeps the file's first axis for the report.</summary>
    public void Note(AxisReport axis) => Axis ??= axis;

    /// <summary>Number of the next segment of a channel.</summary>
    public int NextSegment(string name) => _segments[name] = _segments.GetValueOrDefault(name) + 1;

    /// <summary>Adds a waveform.</summary>
    /// <param name="waveform">The waveform.</param>
    /// <param name="samples">Its samples.</param>
    /// <param name="missing">How many samples round it are missing.</param>
    public void Add(Waveform waveform, ReadOnlyMemory<double> samples, int missing)
    {
        if (settings.Segment is { } wanted && wanted != waveform.Segment)
            return;
        SampleRange range = SampleRange.Of(samples);
        (double minimum, double maximum, _, _) = range;
        (int clipped, int first) = Clipping.Find(samples, range);
        if (clipped > 0)
            Doubts.Add(FormattableString.Invariant($"{waveform.Name}: {clipped} of {waveform.Count} samples are held at {minimum:G4} or {maximum:G4}, the first is sample {first + 1}: clipped, so levels and harmonics read wrong"));
        _channels.Add(waveform);
        _reports.Add(new ChannelReport(waveform.Name, "waveform", waveform.Unit, waveform.Segment, waveform.Count, minimum, maximum, clipped, missing));
    }

    /// <summary>Adds a spectrum trace.</summary>
    /// <param name="trace">The trace.</param>
    /// <param name="missing">How many points were left out.</param>
    public void Add(SpectrumTrace trace, int missing)
    {
        if (settings.Segment is { } wanted && wanted != trace.Segment)
            return;
        (double minimum, double maximum, _, _) = SampleRange.Of(trace.Levels.ToArray());
        _channels.Add(trace);
        _reports.Add(new ChannelReport(trace.Name, "spectrum", trace.Unit, trace.Segment, trace.Count, minimum, maximum, 0, missing));
    }

    /// <summary>Values in the base unit, multiplied by the import's factor and the chain's scale; levels in dB shift instead.</summary>
    public void Scale(Span<double> values, string unit, double factor)
    {
        if (unit.StartsWith("dB", StringComparison.Ordinal))
        {
            double shift = _scale == 1 ? 0 : 20 * Math.Log10(Math.Abs(_scale));
            for (int i = 0; shift != 0 && i < values.Length; i++)
                values[i] += shift;
            return;
        }
        for (int i = 0; (factor != 1 || _scale != 1) && i < values.Length; i++)
            values[i] = UnitWords.Scale(values[i], factor) * _scale;
    }
}
