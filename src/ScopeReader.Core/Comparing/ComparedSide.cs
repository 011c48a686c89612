namespace ScopeReader.Comparing;

/// <summary>Captures of one state of a circuit: one, or repeats that show its reproducibility.</summary>
/// <param name="Captures">What was measured, one or more.</param>
public sealed record ComparedSide(IReadOnlyList<Measurement> Captures)
{
    /// <summary>The first capture's file, which stands for the side.</summary>
    public string Name => Captures[0].Capture.File;
}
