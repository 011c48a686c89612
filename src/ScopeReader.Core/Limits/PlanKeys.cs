namespace ScopeReader.Limits;

/// <summary>Which plan key states a chain term.</summary>
public static class PlanKeys
{
    /// <summary>The condition that states what a ringing node holds, F; with <see cref="Tolerance"/> after it, how well that is known.</summary>
    public const string NodeCapacitance = "node-capacitance";

    /// <summary>The capacitor that a comparison is told of.</summary>
    public const string AddedCapacitance = "added-capacitance";

    /// <summary>What follows a condition's name in that of its tolerance, in %.</summary>
    public const string Tolerance = "-tolerance";

    /// <summary>The key that states a missing term.</summary>
    /// <param name="term">The term's name in <see cref="Readings.Budget.Missing"/>.</param>
    public static string For(string term) => term switch
    {
        "timebase" => "timebase-tolerance",
        "gain" => "gain-tolerance",
        "offset" => "offset-tolerance",
        NodeCapacitance => NodeCapacitance + Tolerance,
        _ => term,
    };

    /// <summary>True where a plan can state the term; an added capacitor's tolerance stands on the command line.</summary>
    /// <param name="term">The term's name in <see cref="Readings.Budget.Missing"/>.</param>
    public static bool IsInPlan(string term) => term != AddedCapacitance;

    /// <summary>The table of that key.</summary>
    /// <param name="term">The term's name in <see cref="Readings.Budget.Missing"/>.</param>
    public static string TableOf(string term) => term == NodeCapacitance ? "[conditions]" : "[chain]";
}
