namespace ScopeReader.Bench.Shell;

/// <summary>How the bench ends.</summary>
internal static class ExitStatus
{
    /// <summary>The person left it.</summary>
    public const int Done = 0;

    /// <summary>It was asked for where there is no terminal for it: the command line is wrong for this place.</summary>
    public const int WrongPlace = 64;

    /// <summary>A fault of this program.</summary>
    public const int Fault = 70;

    /// <summary>Interrupted by Ctrl-C.</summary>
    public const int Interrupted = 130;
}
