namespace ScopeReader.Edges;

/// <summary>Why something about an edge cannot be measured.</summary>
/// <param name="Code">For programs.</param>
/// <param name="Reason">For people.</param>
internal sealed record EdgeProblem(string Code, string Reason);
