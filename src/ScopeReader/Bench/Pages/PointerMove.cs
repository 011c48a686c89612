namespace ScopeReader.Bench.Pages;

/// <summary>What the pointer did.</summary>
internal enum PointerDeed
{
    /// <summary>The button went down.</summary>
    Press,

    /// <summary>Moved with the button down.</summary>
    Drag,

    /// <summary>The button went up.</summary>
    Release,

    /// <summary>The wheel turned away from the person.</summary>
    WheelUp,

    /// <summary>The wheel turned towards the person.</summary>
    WheelDown,
}

/// <summary>The pointer in cells of the screen.</summary>
/// <param name="Deed">What it did.</param>
/// <param name="X">Column.</param>
/// <param name="Y">Row.</param>
internal readonly record struct PointerMove(PointerDeed Deed, int X, int Y);
