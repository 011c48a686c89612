namespace ScopeReader.Ringing;

/// <summary>What oscillates on a two-state wave.</summary>
public enum RingingKind
{
    /// <summary>Nothing that shows.</summary>
    None,

    /// <summary>Ringing that each edge starts and that dies away.</summary>
    EdgeExcited,

    /// <summary>An oscillation of its own, which no edge starts.</summary>
    FreeRunning,

    /// <summary>Both of these.</summary>
    Both,

    /// <summary>Noise of a narrow band: neither tied to the edges nor steady.</summary>
    Noise,
}
