namespace ScopeReader.Levels;

/// <summary>A stretch of samples on one state, clear of the transitions and of the first ringing after them.</summary>
/// <param name="IsHigh">Which state.</param>
/// <param name="First">Index of its first sample.</param>
/// <param name="End">Index after its last sample.</param>
internal readonly record struct Plateau(bool IsHigh, int First, int End)
{
    /// <summary>How many samples it holds.</summary>
    public int Count => End - First;
}
