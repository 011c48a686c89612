using ScopeReader.Readings;

namespace ScopeReader.Comparing;

/// <summary>A quantity that one side of a comparison has and the other has not.</summary>
/// <param name="Reading">What the one side has.</param>
/// <param name="File">The file of the side that has it not.</param>
/// <param name="Why">Why not; null where that file is of another kind or unit.</param>
public sealed record OneSided(Reading Reading, string File, NotMeasured? Why);
