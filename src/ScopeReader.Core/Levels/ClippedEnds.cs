namespace ScopeReader.Levels;

/// <summary>Ends of the converter's range that a wave ran into.</summary>
[Flags]
public enum ClippedEnds
{
    /// <summary>Neither.</summary>
    None = 0,

    /// <summary>The top looks cut off.</summary>
    Top = 1,

    /// <summary>The bottom looks cut off.</summary>
    Bottom = 2,

    /// <summary>Both.</summary>
    Both = Top | Bottom,
}
