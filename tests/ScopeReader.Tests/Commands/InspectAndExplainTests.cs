using System.Text.Json;
using ScopeReader.Files.Plans;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Commands;

public class InspectAndExplainTests
{
    // The file as captures-demo/README.md describes it: semicolons, decimal commas, settings above, times cut to three digits.
    [Fact]
    public async Task Inspect_says_how_an_awkward_export_was_understood()
    {
        (int status, string output, string error) = await Run.Program("inspect", Run.Demo("logger-export.csv"));
        Assert.Equal((0, ""), (status, error));
        Assert.Contains("columns  between them: semicolon; decimal mark ,", output, StringComparison.Ordinal);
        Assert.Contains("gate: waveform", output, StringComparison.Ordinal);
        Assert.Contains("sense: waveform", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Inspect_goes_on_after_a_file_that_cannot_be_read_and_ends_with_3()
    {
        (int status, string output, string error) = await Run.Program("inspect", "gone.csv", Run.Demo("logger-export.csv"), "--json");
        JsonElement captures = JsonDocument.Parse(output).RootElement.GetProperty("captures");
        Assert.Equal((3, 2), (status, captures.GetArrayLength()));
        Assert.Equal(error, captures[0].GetProperty("error").GetString() + "\n");
        Assert.Equal("semicolon", captures[1].GetProperty("delimiter").GetString());
    }

    [Fact]
    public async Task Explain_gives_a_quantity_from_the_one_table()
    {
        (int status, string output, _) = await Run.At(200, ["explain", "frequency-error"]);
        Assert.Equal(0, status);
        Assert.Equal($"frequency-error, in ppm\nmeaning   {Quantities.FrequencyError.Meaning}\nsource    {Quantities.FrequencyError.Source}\nfound in  waveforms and spectrum traces\n", output);
    }

    [Fact]
    public async Task Explain_lists_every_quantity_and_every_key_of_a_plan()
    {
        (_, string quantities, _) = await Run.Program("explain");
        Assert.All(Quantities.All.Where(q => !q.Id.StartsWith("harmonic-", StringComparison.Ordinal)), q => Assert.Contains(q.Id + "\n", quantities, StringComparison.Ordinal));
        (_, string keys, _) = await Run.Program("explain", "plan");
        Assert.All(PlanKeyList.All, k => Assert.Contains($"\n{k.Name} = {k.Example}\n", keys, StringComparison.Ordinal));
    }
}
