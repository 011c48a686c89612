using System.Globalization;
using ScopeReader.Commands.Tables;
using ScopeReader.Files;

namespace ScopeReader.Commands;

/// <summary>A line on the terminal that says how far a long piece of work is. It is gone before anything else is written.</summary>
/// <remarks>Drawn with carriage returns and spaces alone, so that nothing is left to be put right however the program ends.</remarks>
internal sealed class ProgressLine : IDisposable
{
    private const int Bars = 20, LongestName = 24;
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(0.5), Step = TimeSpan.FromSeconds(0.1);

    private readonly Lock _lock = new();
    private readonly TextWriter? _error;
    private readonly TimeProvider _time;
    private readonly CancellationTokenRegistration _stopped;
    private long _drawnAt;
    private int _length;
    private bool _isOver;

    /// <param name="error">Where it is drawn; null to draw nothing.</param>
    /// <param name="time">The clock.</param>
    /// <param name="cancellation">Takes the line away, even where the work does not notice.</param>
    public ProgressLine(TextWriter? error, TimeProvider time, CancellationToken cancellation)
    {
        (_error, _time) = (error, time);
        _stopped = cancellation.Register(End);
    }

    /// <summary>Who to tell of the reading of a file; null where nothing is drawn.</summary>
    public IProgress<ImportProgress>? Reading(string file) => _error is null ? null : new Told<ImportProgress>(this, file, "reading", ShareOf, AmountOf);

    /// <summary>Who to tell of the measuring of a file, as a share from 0 to 1; null where nothing is drawn.</summary>
    public IProgress<double>? Measuring(string file) => _error is null ? null : new Told<double>(this, file, "measuring", share => share, _ => "");

    /// <summary>Takes the line away until the next news.</summary>
    public void Hide() => Aside(() => { });

    /// <summary>Writes something with the line out of the way.</summary>
    public void Aside(Action write)
    {
        lock (_lock)
        {
            Clear();
            write();
        }
    }

    public void Dispose()
    {
        _stopped.Dispose();
        End();
    }

    private static double? ShareOf(ImportProgress p) => p.BytesInAll is { } all and > 0 ? Math.Min(1, (double)p.BytesRead / all) : null;

    private static string AmountOf(ImportProgress p) => string.Create(CultureInfo.InvariantCulture, $"{p.BytesRead / 1_000_000} MB");

    private void Draw(string doing, string file, double? share, string amount)
    {
        lock (_lock)
        {
            long now = _time.GetTimestamp();
            if (_isOver || (_length > 0 && _time.GetElapsedTime(_drawnAt, now) < Step))
                return;
            Clear();
            string name = SafeText.Of(Path.GetFileName(file) is { Length: > 0 } last ? last : file);
            name = name.Length > LongestName ? string.Concat(name.AsSpan(0, LongestName - 1), "…") : name;
            string text = share is { } s ? string.Create(CultureInfo.InvariantCulture, $"{doing} {name} [{new string('#', (int)(s * Bars)),-Bars}] {(int)(100 * s),3} %") : $"{doing} {name}, {amount}";
            _error!.Write(text);
            (_drawnAt, _length) = (now, text.Length);
        }
    }

    private void End()
    {
        lock (_lock)
        {
            _isOver = true;
            Clear();
        }
    }

    private void Clear()
    {
        if (_length > 0)
            _error!.Write($"\r{new string(' ', _length)}\r");
        _length = 0;
    }

    // Progress<T> would post to the thread pool, behind the end of the work.
    private sealed class Told<T>(ProgressLine line, string file, string doing, Func<T, double?> share, Func<T, string> amount) : IProgress<T>
    {
        private readonly long _start = line._time.GetTimestamp();

        public void Report(T value)
        {
            if (line._time.GetElapsedTime(_start) >= Patience)
                line.Draw(doing, file, share(value), amount(value));
        }
    }
}
