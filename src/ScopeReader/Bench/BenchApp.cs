using System.Runtime.CompilerServices;
using ScopeReader.Bench.Shell;

namespace ScopeReader.Bench;

/// <summary>The terminal bench, from the command line's point of view.</summary>
/// <remarks>No type of the terminal library is named outside <see cref="RunInTerminal"/>: loading it costs every start 25 ms.</remarks>
internal static class BenchApp
{
    /// <summary>Opens the bench and comes back when the person leaves it.</summary>
    /// <param name="files">The captures to open.</param>
    /// <param name="plan">What they are measured against.</param>
    /// <param name="planPath">The plan's file; null without one.</param>
    /// <param name="noColour">True to draw without any colour.</param>
    /// <returns>The exit status.</returns>
    public static int Run(IReadOnlyList<string> files, Plan plan, string? planPath, bool noColour)
    {
        string? terminal = Environment.GetEnvironmentVariable("TERM");
        if (Console.IsInputRedirected || Console.IsOutputRedirected || (!OperatingSystem.IsWindows() && terminal is null or "" or "dumb"))
        {
            string why = terminal is "dumb" ? "TERM is dumb" : "standard input and output are not one";
            Console.Error.WriteLine($"scopereader: the bench needs a terminal, and here {why}; measure on the command line instead: scopereader measure {(files.Count > 0 ? "FILE…" : "--help")}");
            return ExitStatus.Usage;
        }
        bool mono = noColour || Environment.GetEnvironmentVariable("NO_COLOR") is { Length: > 0 };
        return RunInTerminal(files, plan, planPath, mono);
    }

    [MethodImpl(MethodImplOptions.NoInlining)]
    private static int RunInTerminal(IReadOnlyList<string> files, Plan plan, string? planPath, bool mono) => TerminalSession.Run(files, plan, planPath, mono);
}
