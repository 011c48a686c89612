namespace ScopeReader.Archive.Contents;

/// <summary>Where a limit line was judged.</summary>
/// <param name="Name">What the person calls the line.</param>
/// <param name="Side">upper or lower.</param>
/// <param name="Unit">Unit of the levels.</param>
/// <param name="Frequency">The worst place, Hz.</param>
/// <param name="Level">The trace there.</param>
/// <param name="LineLevel">The line there.</param>
public sealed record LimitLineContent(string Name, string Side, string Unit, double? Frequency, double? Level, double? LineLevel);
