namespace ScopeReader.Levels;

/// <summary>A stretch of samples on one state, clear of the transitions and of the first ringing after them.</summary>
/// <param name="IsHigh">Which state.</param>
/// <param name="First">Index of its first sample.</param>
/// <param name="End">Index after its last sample.</param>
/// <param name="Edge">Index of the sample that the edge before it is nearest to; for a start without an edge, that of the record.</param>
/// <param name="Settling">Index from which on nothing but ringing parts the samples from the state.</param>
/// <param name="Unsettled">Bound of what slow edges leave, of the swing.</param>
internal readonly record struct Plateau(bool IsHigh, int First, int End, int Edge, int Settling, double Unsettled)
{
    /// <summary>How many samples it holds.</summary>
    public int Count => End - First;
}
