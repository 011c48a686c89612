namespace ScopeReader.Comparing;

/// <summary>Two curves at the same places.</summary>
/// <param name="Title">What they are.</param>
/// <param name="File">The compared side's first file.</param>
/// <param name="XUnit">Unit of the places: s, sample or Hz.</param>
/// <param name="YUnit">Unit of the values.</param>
/// <param name="Start">The first place.</param>
/// <param name="Step">From one place to the next, above 0.</param>
/// <param name="Reference">Shape [n]: the reference's values.</param>
/// <param name="Compared">Shape [n]: the compared side's.</param>
public sealed record Overlay(string Title, string File, string XUnit, string YUnit, double Start, double Step, IReadOnlyList<double> Reference, IReadOnlyList<double> Compared);
