namespace ScopeReader;

/// <summary>Safety notices that what is measured gives reason for. Each defers to local codes and licensed practice.</summary>
public static class Cautions
{
    /// <summary>The notices for a plan.</summary>
    public static IReadOnlyList<string> For(Plan plan)
    {
        ArgumentNullException.ThrowIfNull(plan);
        return [];
    }
}
