namespace ScopeReader;

/// <summary>Sequences that put a terminal's modes back.</summary>
internal static class TerminalModes
{
    /// <summary>Cursor and keypad keys as they usually are: the runtime sets these modes as it takes the keyboard over or asks for the width, and leaves them set.</summary>
    public const string CursorAndKeypadKeys = "\e[?1l\e>";
}
