namespace ScopeReader.Levels;

/// <summary>What kind of wave it is, as far as the choice of methods goes.</summary>
public enum WaveKind
{
    /// <summary>One value throughout.</summary>
    Flat,

    /// <summary>Most of the time near one of two levels.</summary>
    TwoState,

    /// <summary>One sine and little else: harmonics 2 to 5 together at least 20 dB below it.</summary>
    Sinusoidal,

    /// <summary>None of these: triangles, noise, several levels.</summary>
    Other,
}
