using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader.Coverage;

/// <summary>A made channel, the plan it is measured with, and what is true of it.</summary>
/// <param name="Channel">What an instrument would have saved.</param>
/// <param name="Plan">What the person would have stated.</param>
/// <param name="Truth">Values by quantity identifier, in base units.</param>
internal sealed record MadeCase(Channel Channel, Plan Plan, IReadOnlyDictionary<string, double> Truth)
{
    /// <summary>What a reading should have been; null where nobody knows.</summary>
    public double? TruthOf(Reading reading) =>
        Truth.TryGetValue($"{reading.Quantity.Id}/{reading.Method}", out double own) || Truth.TryGetValue(reading.Quantity.Id, out own) ? own : null;
}
