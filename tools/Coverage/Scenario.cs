namespace ScopeReader.Coverage;

/// <summary>A kind of capture, drawn anew for each seed.</summary>
/// <param name="Name">As the command line has it.</param>
/// <param name="Meaning">What it is, in a line.</param>
/// <param name="Draw">The case of a seed; the same seed gives the same case.</param>
internal sealed record Scenario(string Name, string Meaning, Func<ulong, MadeCase> Draw);
