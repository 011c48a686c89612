using System.Runtime.InteropServices;
using System.Text;
using Terminal.Gui.App;

namespace ScopeReader.Bench.Shell;

/// <summary>Leaves the terminal as it was found on every end that a program can see.</summary>
/// <remarks>
/// The library puts the terminal's line settings back when the process ends, but its screen, mouse modes and title only
/// when its loop ends in order. A signal therefore asks the loop to end; where it does not within two seconds, or where a
/// thread has died, the sequences are written from here.
/// </remarks>
internal sealed class TerminalGuard : IDisposable
{
    // Title, paste, mouse and keyboard modes, attributes, main screen, cursor.
    private const string Restoring = TerminalModes.CursorAndKeypadKeys + "\e[23;2t\e[?2004l\e[?1003l\e[?1002l\e[?1000l\e[?1015l\e[?1006l\e[<u\e[0m\e[?1049l\e[?25h";
    private const string PushTitle = "\e[22;2t", PopTitle = "\e[23;2t" + TerminalModes.CursorAndKeypadKeys;
    private static readonly TimeSpan Patience = TimeSpan.FromSeconds(2);

    private readonly List<PosixSignalRegistration> _signals = [];
    private readonly Action<string> _complain;
    private IApplication? _app;
    private int _restored;

    /// <param name="complain">Told what a dying thread died of, when the terminal is back.</param>
    public TerminalGuard(Action<string> complain)
    {
        _complain = complain;
        foreach ((PosixSignal signal, int number) in new[] { (PosixSignal.SIGHUP, 1), (PosixSignal.SIGINT, 2), (PosixSignal.SIGQUIT, 3), (PosixSignal.SIGTERM, 15) })
            _signals.Add(PosixSignalRegistration.Create(signal, context =>
            {
                context.Cancel = true;
                Stop(128 + number);
            }));
        AppDomain.CurrentDomain.UnhandledException += OnUnhandled;
        AppDomain.CurrentDomain.ProcessExit += OnProcessExit;
    }

    /// <summary>The exit status that a signal asks for; null where none came.</summary>
    public int? Status { get; private set; }

    /// <summary>The library has taken the terminal over. Keeps the title, which it overwrites.</summary>
    public void Attach(IApplication app)
    {
        _app = app;
        app.Driver!.WriteRaw(PushTitle);
    }

    /// <summary>Its loop has ended in order: it gives the terminal back itself.</summary>
    public void Detach()
    {
        if (Interlocked.Exchange(ref _restored, 1) == 0)
            _app?.Driver?.WriteRaw(PopTitle);
    }

    /// <summary>Ends the loop, as a signal does.</summary>
    /// <param name="status">The exit status.</param>
    public void Stop(int status)
    {
        Status = status;
        _app?.Invoke(() => _app.RequestStop());
        // The loop may be stuck, or the terminal gone: then this ends the process.
        new Thread(() =>
        {
            Thread.Sleep(Patience);
            Restore();
            Environment.Exit(status);
        })
        { IsBackground = true }.Start();
    }

    /// <summary>Writes the sequences that give the terminal back; once.</summary>
    public void Restore()
    {
        if (_app is null || Interlocked.Exchange(ref _restored, 1) != 0)
            return;
        try
        {
            using Stream output = Console.OpenStandardOutput();
            output.Write(Encoding.ASCII.GetBytes(Restoring));
            output.Flush();
        }
        catch (IOException)
        {
            // The terminal is gone, and with it what there was to restore.
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        AppDomain.CurrentDomain.UnhandledException -= OnUnhandled;
        AppDomain.CurrentDomain.ProcessExit -= OnProcessExit;
        foreach (PosixSignalRegistration signal in _signals)
            signal.Dispose();
    }

    private void OnProcessExit(object? sender, EventArgs e) => Restore();

    private void OnUnhandled(object sender, UnhandledExceptionEventArgs e)
    {
        if (_app is null || _restored != 0)
            return;
        // The screen's thread would draw over what is restored: it is parked first, unless it is this one.
        using var parked = new ManualResetEventSlim();
        _app.Invoke(() =>
        {
            parked.Set();
            Thread.Sleep(-1);
        });
        parked.Wait(TimeSpan.FromMilliseconds(500));
        Restore();
        _complain($"a fault of this program: {e.ExceptionObject}".ReplaceLineEndings("\r\n"));
        Environment.Exit(ExitStatus.Fault);
    }
}
