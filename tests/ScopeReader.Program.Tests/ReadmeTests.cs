using ScopeReader.Readings;

namespace ScopeReader.Program.Tests;

public class ReadmeTests
{
    private const string Run = "dotnet run -c Release --project src/ScopeReader -- ";

    [Fact]
    public async Task The_measure_command_prints_what_the_readme_shows()
    {
        string[] lines = await File.ReadAllLinesAsync(Path.Combine(BuiltProgram.Root, "README.md"));
        int at = Array.FindIndex(lines, line => line.StartsWith(Run + "measure ", StringComparison.Ordinal));
        Assert.True(at >= 0, "README.md has no measure command");
        // The command stands in a block of its own; the next block is its output.
        int opened = Array.FindIndex(lines, Array.IndexOf(lines, "```", at) + 1, line => line.StartsWith("```", StringComparison.Ordinal));
        int closed = Array.IndexOf(lines, "```", opened + 1);

        (int status, string output, _) = await BuiltProgram.Run(lines[at][Run.Length..].Split(' '));

        Assert.Equal(0, status);
        Assert.Equal(string.Join('\n', lines[(opened + 1)..closed]), string.Join('\n', output.TrimEnd().Split('\n').Select(line => line.TrimEnd())));
    }

    [Fact]
    public async Task The_compare_command_says_what_the_readme_quotes()
    {
        string[] lines = await File.ReadAllLinesAsync(Path.Combine(BuiltProgram.Root, "README.md"));
        int at = Array.FindIndex(lines, line => line.StartsWith("scopereader compare captures-demo/", StringComparison.Ordinal));
        Assert.True(at >= 0, "README.md has no compare command");
        int opened = Array.FindIndex(lines, Array.IndexOf(lines, "```", at) + 1, line => line.StartsWith("```", StringComparison.Ordinal)), closed = Array.IndexOf(lines, "```", opened + 1);

        (int status, string output, _) = await BuiltProgram.Run(lines[at]["scopereader ".Length..].Split(' '));

        // The breadboard fails its limits.
        Assert.Equal(1, status);
        Assert.Contains(string.Join('\n', lines[(opened + 1)..closed]), string.Join('\n', output.Split('\n').Select(line => line.TrimEnd())), StringComparison.Ordinal);
    }

    [Fact]
    public async Task The_table_of_quantities_is_the_programs_own()
    {
        string readme = await File.ReadAllTextAsync(Path.Combine(BuiltProgram.Root, "README.md"));

        // Harmonics stand in one row for all.
        foreach (Quantity quantity in Quantities.All.Where(q => !q.Id.StartsWith("harmonic-", StringComparison.Ordinal)))
            Assert.Contains($"| `{quantity.Id}` | {quantity.Unit} | {quantity.Meaning} | {quantity.Source} |", readme, StringComparison.Ordinal);
    }
}
