namespace ScopeReader.Coverage;

/// <summary>A simulation with a table of its own, chosen by <c>--table NAME</c>.</summary>
/// <param name="Name">As the command line has it.</param>
/// <param name="Meaning">What it shows.</param>
/// <param name="Write">Runs it: number of runs, first seed, where the table goes.</param>
internal sealed record NamedTable(string Name, string Meaning, Action<int, ulong, TextWriter> Write);

/// <summary>Every such table.</summary>
internal static class NamedTables
{
    public static IReadOnlyList<NamedTable> All { get; } =
    [
        new("ringing-bound", "fits of damped sinusoids over the Cramer-Rao bound", RingingBoundTable.Write),
        new("equivalent-time", "edges near one sample interval", EquivalentTimeTable.Write),
        new("kinds", "what made oscillations are called: the confusion matrix", KindTable.Write),
        new("dbc", "harmonics, distortion, noise and spurs of made sources", DbcTable.Write),
        new("trace", "spectrum traces: levels, powers, noise density, occupied bandwidth", TraceTable.Write),
        new("bound", "primary frequency against the Cramér-Rao bound", BoundTable.Write),
        new("template", "the same on records too long for the joint fit", BoundTable.WriteLong),
    ];
}
