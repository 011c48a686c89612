using ScopeReader.Captures;

namespace ScopeReader.Coverage;

/// <summary>A made channel, the plan it is measured with, and what is true of it.</summary>
/// <param name="Channel">What an instrument would have saved.</param>
/// <param name="Plan">What the person would have stated.</param>
/// <param name="Truth">Values by quantity identifier, in base units.</param>
internal sealed record MadeCase(Channel Channel, Plan Plan, IReadOnlyDictionary<string, double> Truth);
