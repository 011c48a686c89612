namespace ScopeReader.Limits;

/// <summary>Where a spectrum trace comes nearest to a limit line, or exceeds it most.</summary>
/// <param name="Line">The line.</param>
/// <param name="Frequency">Hz.</param>
/// <param name="Level">The trace's level there, in the line's unit.</param>
/// <param name="LineLevel">The line's level there.</param>
public sealed record LinePlace(LimitLine Line, double Frequency, double Level, double LineLevel);
