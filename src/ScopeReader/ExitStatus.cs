namespace ScopeReader;

/// <summary>How the program ends: scripts rely on these.</summary>
internal static class ExitStatus
{
    /// <summary>Every limit passed, or none was set; the person left the bench.</summary>
    public const int Passed = 0;

    /// <summary>A limit failed; the archive is damaged.</summary>
    public const int Failed = 1;

    /// <summary>None failed, one is undecided.</summary>
    public const int Undecided = 2;

    /// <summary>A file could not be read, a limited quantity could not be measured, or the archive is unusable.</summary>
    public const int Unreadable = 3;

    /// <summary>The command line or the plan is wrong, or the bench was asked for where there is no terminal.</summary>
    public const int Usage = 64;

    /// <summary>A fault of this program.</summary>
    public const int Fault = 70;

    /// <summary>Stopped by Ctrl-C.</summary>
    public const int Interrupted = 130;

    /// <summary>The status of an outcome.</summary>
    public static int Of(Outcome outcome) => outcome switch
    {
        Outcome.Unjudged or Outcome.Pass => Passed,
        Outcome.Undecided => Undecided,
        Outcome.Fail => Failed,
        _ => Unreadable,
    };
}
