namespace ScopeReader.Bench.Pages;

/// <summary>A key that is not a character.</summary>
internal enum NamedKey
{
    /// <summary>None: the press is a character.</summary>
    None,

    /// <summary>Arrow up.</summary>
    Up,

    /// <summary>Arrow down.</summary>
    Down,

    /// <summary>Arrow left.</summary>
    Left,

    /// <summary>Arrow right.</summary>
    Right,

    /// <summary>Page up.</summary>
    PageUp,

    /// <summary>Page down.</summary>
    PageDown,

    /// <summary>Home.</summary>
    Home,

    /// <summary>End.</summary>
    End,

    /// <summary>Enter.</summary>
    Enter,

    /// <summary>Escape.</summary>
    Escape,

    /// <summary>Tab.</summary>
    Tab,

    /// <summary>Backspace.</summary>
    Backspace,

    /// <summary>Delete.</summary>
    Delete,

    /// <summary>F1.</summary>
    F1,
}

/// <summary>A key pressed, in no terminal library's terms.</summary>
/// <param name="Named">The key, where it is not a character.</param>
/// <param name="Character">The character, where it is one.</param>
/// <param name="Shift">With Shift; of characters the character says it.</param>
/// <param name="Ctrl">With Ctrl; the character is then lower case.</param>
internal readonly record struct KeyPress(NamedKey Named, char Character = '\0', bool Shift = false, bool Ctrl = false)
{
    /// <summary>A character.</summary>
    public static implicit operator KeyPress(char character) => new(NamedKey.None, character);

    /// <summary>A named key.</summary>
    public static implicit operator KeyPress(NamedKey named) => new(named);

    /// <summary>A character with Ctrl.</summary>
    public static KeyPress WithCtrl(char character) => new(NamedKey.None, character, Ctrl: true);

    /// <summary>A named key with Shift.</summary>
    public static KeyPress WithShift(NamedKey named) => new(named, Shift: true);
}
