using ScopeReader.Bench.Pages;
using ScopeReader.Bench.Work;
using ScopeReader.Captures;
using ScopeReader.Files;
using Terminal.Gui.App;

namespace ScopeReader.Bench.Shell;

/// <summary>The bench in a terminal, from start to end.</summary>
internal static class TerminalSession
{
    /// <summary>Runs it.</summary>
    /// <returns>The exit status.</returns>
    public static int Run(IReadOnlyList<string> files, Plan plan, string? planPath, bool mono)
    {
        using var guard = new TerminalGuard(Console.Error.WriteLine);
        try
        {
            LibrarySettings.Apply();
            using IApplication app = Application.Create().Init(LibrarySettings.Driver);
            // Starting it reads the settings files once more.
            LibrarySettings.Apply();
            app.Keyboard.KeyBindings.Clear();
            app.Mouse.IsMouseDisabled = false;
            guard.Attach(app);
            BenchWindow? window = null;
            using var bench = new Workbench(plan, planPath, (path, cancellation) => Read(path, plan, cancellation), Explain, action => app.Invoke(() =>
            {
                action();
                window?.SetNeedsDraw();
            }));
            var pages = new PageStack(bench);
            window = new BenchWindow(pages, mono ? BenchTheme.Mono : BenchTheme.Colour);
            pages.QuitAsked += () => app.RequestStop();
            pages.InterruptAsked += () => guard.Stop(ExitStatus.Interrupted);
            foreach (string file in files)
                bench.Open(file);
            bench.Select(0);
            app.Run(window);
            window.Dispose();
            guard.Detach();
        }
        catch (Exception exception)
        {
            // Whatever it was: first the terminal, so that the person can read it.
            guard.Restore();
            Console.Error.WriteLine($"scopereader: a fault of this program, please report it: {exception}");
            return ExitStatus.Fault;
        }
        return guard.Status ?? ExitStatus.Passed;
    }

    private static Capture Read(string path, Plan plan, CancellationToken cancellation) => path == "-"
        ? throw new ImportException("-", "expected a file, found standard input, which the bench has its keys from. Measure it with: scopereader measure -")
        : CaptureReader.Read(path, plan.Import, plan.Chain.Scale, cancellation).Capture;

    private static string? Explain(Exception exception) => (exception as ImportException)?.Message;
}
