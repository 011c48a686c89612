using System.Globalization;
using ScopeReader.Coverage;

// Holds stated uncertainties against made captures of known truth.
int runs = 200;
ulong first = 1;
bool truth = false;
string? save = null, table = null;
var names = new List<string>();
for (int i = 0; i < args.Length; i++)
{
    string? value = i + 1 < args.Length ? args[i + 1] : null;
    switch (args[i])
    {
        case "--runs" when int.TryParse(value, NumberStyles.None, CultureInfo.InvariantCulture, out runs) && runs > 0:
        case "--seed" when ulong.TryParse(value, NumberStyles.None, CultureInfo.InvariantCulture, out first):
            i++;
            break;
        case "--save" when value is not null:
            save = value;
            i++;
            break;
        case "--table" when NamedTables.All.Any(t => t.Name == value):
            table = value;
            i++;
            break;
        case "--truth":
            truth = true;
            break;
        case "--scenario" when value is not null:
            names.AddRange(value.Split(','));
            i++;
            break;
        default:
            Console.Error.WriteLine($"expected --runs N, --seed N (the first seed), --scenario NAME[,NAME], --table NAME, --truth or --save FILE.csv, found \"{args[i]}\"");
            Console.Error.WriteLine($"tables: {string.Join(", ", NamedTables.All.Select(t => $"{t.Name} ({t.Meaning})"))}");
            return 64;
    }
}
if (table is not null)
{
    NamedTables.All.First(t => t.Name == table).Write(runs, first, Console.Out);
    return 0;
}
if (names.Find(n => Scenarios.All.All(s => s.Name != n)) is { } unknown)
{
    Console.Error.WriteLine($"no scenario \"{unknown}\"; there are:");
    foreach (Scenario s in Scenarios.All)
        Console.Error.WriteLine($"  {s.Name,-12} {s.Meaning}");
    return 64;
}

foreach (Scenario scenario in Scenarios.All.Where(s => names.Count == 0 || names.Contains(s.Name)))
{
    // Each seed is on its own, so the table does not depend on how many cores there are.
    var done = new Run[runs];
    Parallel.For(0, runs, i => done[i] = Run.Of(scenario, first + (ulong)i));
    if (save is not null)
        SavedCase.Write(scenario.Draw(first), save);
    if (truth)
        Table.WriteTruth(done, first, Console.Out);
    Table.Write(scenario, done, Console.Out);
}
return 0;
