using System.Text;
using ScopeReader.Bench.Pages;
using Terminal.Gui.Drivers;
using Terminal.Gui.Input;

namespace ScopeReader.Bench.Shell;

/// <summary>From the terminal library's keys and mouse to the bench's own.</summary>
internal static class KeyTranslation
{
    /// <summary>The key press; null for keys that the bench has no word for.</summary>
    public static KeyPress? Of(Key key)
    {
        if (key.IsAlt)
            return null;
        NamedKey named = (key.KeyCode & ~(KeyCode.ShiftMask | KeyCode.CtrlMask)) switch
        {
            KeyCode.CursorUp => NamedKey.Up,
            KeyCode.CursorDown => NamedKey.Down,
            KeyCode.CursorLeft => NamedKey.Left,
            KeyCode.CursorRight => NamedKey.Right,
            KeyCode.PageUp => NamedKey.PageUp,
            KeyCode.PageDown => NamedKey.PageDown,
            KeyCode.Home => NamedKey.Home,
            KeyCode.End => NamedKey.End,
            KeyCode.Enter => NamedKey.Enter,
            KeyCode.Esc => NamedKey.Escape,
            KeyCode.Tab => NamedKey.Tab,
            KeyCode.Backspace => NamedKey.Backspace,
            KeyCode.Delete => NamedKey.Delete,
            KeyCode.F1 => NamedKey.F1,
            _ => NamedKey.None,
        };
        if (named != NamedKey.None)
            return new KeyPress(named, Shift: key.IsShift, Ctrl: key.IsCtrl);
        Rune rune = key.AsRune;
        if (key.IsCtrl)
        {
            KeyCode letter = key.KeyCode & ~(KeyCode.CtrlMask | KeyCode.ShiftMask);
            return letter is >= KeyCode.A and <= KeyCode.Z ? KeyPress.WithCtrl((char)('a' + (letter - KeyCode.A))) : null;
        }
        return rune.Value != 0 && rune.IsBmp ? (KeyPress)(char)rune.Value : null;
    }

    /// <summary>The pointer's deed; null for movements that say nothing here.</summary>
    public static PointerMove? Of(Mouse mouse)
    {
        if (mouse.Position is not { } at)
            return null;
        MouseFlags flags = mouse.Flags;
        PointerDeed? deed = flags.HasFlag(MouseFlags.WheeledUp) ? PointerDeed.WheelUp
            : flags.HasFlag(MouseFlags.WheeledDown) ? PointerDeed.WheelDown
            : flags.HasFlag(MouseFlags.LeftButtonPressed) ? flags.HasFlag(MouseFlags.PositionReport) ? PointerDeed.Drag : PointerDeed.Press
            : flags.HasFlag(MouseFlags.LeftButtonReleased) ? PointerDeed.Release
            : null;
        return deed is { } d ? new PointerMove(d, at.X, at.Y) : null;
    }
}
