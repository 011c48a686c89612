namespace ScopeReader.Limits;

/// <summary>Which plan key states a chain term.</summary>
public static class PlanKeys
{
    /// <summary>The key in [chain] that states a missing term.</summary>
    /// <param name="term">The term's name in <see cref="Readings.Budget.Missing"/>.</param>
    public static string For(string term) => term switch
    {
        "timebase" => "timebase-tolerance",
        "gain" => "gain-tolerance",
        "offset" => "offset-tolerance",
        _ => term,
    };
}
