using ScopeReader.Frequency;
using ScopeReader.Levels;

namespace ScopeReader;

/// <summary>What the first stages found out about the record as a whole: later ones refuse or widen by it.</summary>
/// <param name="Steadiness">Whether the record is one steady wave; null where nobody has looked.</param>
/// <param name="Clipped">Which ends of the converter's range cut the wave off.</param>
public sealed record WaveFitness(Steadiness? Steadiness, ClippedEnds Clipped)
{
    /// <summary>Nobody has looked yet.</summary>
    public static WaveFitness Unknown { get; } = new(null, ClippedEnds.None);

    /// <summary>True where the wave is cut off.</summary>
    public bool IsClipped => Clipped != ClippedEnds.None;

    /// <summary>False where the record was found to be something else than one steady wave.</summary>
    public bool IsSteady => Steadiness is null or { Kind: SteadinessKind.Steady or SteadinessKind.Untested };
}
