using System.Globalization;
using System.Text;

namespace ScopeReader.Commands;

/// <summary>Where a command runs: what it writes to, how wide and colourful that is, and which day it is.</summary>
/// <param name="Output">Results go here.</param>
/// <param name="Error">Everything else goes here.</param>
/// <param name="Width">Tells the columns of a line of output.</param>
/// <param name="Colour">Whether the output shows colours.</param>
/// <param name="Today">The day that ageing is counted to.</param>
internal sealed record Surroundings(TextWriter Output, TextWriter Error, Func<int> Width, bool Colour, DateOnly Today)
{
    private const int UsualWidth = 80, NarrowestWidth = 20, WidestWidth = 1000;

    /// <summary>True where somebody watches standard error: long work then shows how far it is.</summary>
    public bool IsWatched { get; init; }

    /// <summary>The line that shows how far the work is.</summary>
    public ProgressLine Progress(CancellationToken cancellation) => new(IsWatched ? Error : null, TimeProvider.System, cancellation);

    /// <summary>The process's own.</summary>
    /// <remarks>
    /// Its own writers, and the width only when asked: the console's send the terminal a mode change as they are made,
    /// and follow a system's code page where files for programs are UTF-8.
    /// </remarks>
    public static Surroundings OfProcess()
    {
        bool redirected = Console.IsOutputRedirected;
        bool modes = !redirected && Environment.GetEnvironmentVariable("TERM") is not "dumb";
        StreamWriter output = Writer(Console.OpenStandardOutput());
        return new Surroundings(output, Writer(Console.OpenStandardError()), Width,
            modes && Environment.GetEnvironmentVariable("NO_COLOR") is null or "", DateOnly.FromDateTime(DateTime.Now))
        {
            IsWatched = !Console.IsErrorRedirected && Environment.GetEnvironmentVariable("TERM") is not "dumb",
        };

        int Width()
        {
            if (StatedWidth() is { } stated)
                return stated;
            if (redirected)
                return UsualWidth;
            int width = WindowWidth();
            // The runtime has set these modes to learn the width.
            if (modes)
                output.Write(TerminalModes.CursorAndKeypadKeys);
            return width;
        }
    }

    // POSIX: where COLUMNS is set, it is what the person wants.
    private static int? StatedWidth() => int.TryParse(Environment.GetEnvironmentVariable("COLUMNS"), NumberStyles.None, CultureInfo.InvariantCulture, out int width)
        && width is >= NarrowestWidth and <= WidestWidth ? width : null;

    private static StreamWriter Writer(Stream stream) => new(stream, new UTF8Encoding(encoderShouldEmitUTF8Identifier: false)) { AutoFlush = true, NewLine = "\n" };

    private static int WindowWidth()
    {
        try
        {
            return Console.WindowWidth is > 0 and int width ? width : UsualWidth;
        }
        catch (IOException)
        {
            // A terminal that does not tell its size.
            return UsualWidth;
        }
    }
}
