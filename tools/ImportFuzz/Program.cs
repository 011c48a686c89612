using System.Globalization;
using ScopeReader.ImportFuzz;

// Usage: ImportFuzz [count] [seed]. Exit status 1 where a file broke the reader; the file is then kept beside the program's folder.
int count = args.Length > 0 ? int.Parse(args[0], CultureInfo.InvariantCulture) : 2000;
int seed = args.Length > 1 ? int.Parse(args[1], CultureInfo.InvariantCulture) : 1;
int read = 0, refused = 0, broken = 0;
double slowest = 0;
long largest = 0;
for (int i = 0; i < count; i++)
{
    var random = new Random(unchecked(seed * 1_000_003 + i));
    byte[] file = Mutation.Of(Exports.All[random.Next(Exports.All.Count)], random);
    Trial trial = Trial.Of(file);
    (slowest, largest) = (Math.Max(slowest, trial.Seconds), Math.Max(largest, trial.Allocated));
    if (trial.Complaint is { } complaint)
    {
        broken++;
        string kept = string.Create(CultureInfo.InvariantCulture, $"fuzz-{seed}-{i}.csv");
        File.WriteAllBytes(kept, file);
        Console.WriteLine($"{kept}: {complaint}");
        if (trial.Fault is { } fault)
            Console.WriteLine(fault.StackTrace);
    }
    else if (trial.Refusal is null)
        read++;
    else
        refused++;
}
Console.WriteLine(string.Create(CultureInfo.InvariantCulture, $"{count} mutated exports, seed {seed}: {read} read, {refused} refused, {broken} broke; slowest {slowest:F2} s, most allocated {largest / 1e6:F1} MB"));
return broken == 0 ? 0 : 1;
