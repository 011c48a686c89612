namespace ScopeReader.Files.Plans;

/// <summary>A key that a plan may have.</summary>
/// <param name="Table">The table it stands in: empty for the keys above the first table.</param>
/// <param name="Name">The key.</param>
/// <param name="Example">A value as a person would write it, in TOML.</param>
/// <param name="Meaning">What it says, and what holds without it.</param>
public sealed record PlanKey(string Table, string Name, string Example, string Meaning)
{
    internal Func<Plan, PlanValue, Plan>? Apply { get; init; }
}
