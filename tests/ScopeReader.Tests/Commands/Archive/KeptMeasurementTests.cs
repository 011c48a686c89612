using System.Text.Json;

namespace ScopeReader.Tests.Commands.Archive;

/// <summary>What the archive keeps of a measurement is all that measuring gives to programs.</summary>
public sealed class KeptMeasurementTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("scopereader-kept-").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    [Theory]
    [InlineData("if-source-7.csv", "if-source.toml")]
    [InlineData("node-breadboard.csv", "node.toml")]
    [InlineData("source-spectrum.csv", "source-spectrum.toml")]
    [InlineData("slow-edge.csv", "slow-edge.toml")]
    public async Task An_entry_says_everything_that_measure_says_as_JSON(string capture, string plan)
    {
        string archive = Path.Combine(_folder, "a.db");
        string[] measured = [Run.Demo(capture), "--plan", Run.Demo(plan), "--json", "--explain"];
        JsonElement said = JsonDocument.Parse((await Run.Program(["measure", .. measured, "--keep", "--archive", archive])).Output).RootElement.GetProperty("captures")[0];
        JsonElement kept = JsonDocument.Parse((await Run.Program("archive", "show", "1", "--json", "--archive", archive)).Output).RootElement;

        Assert.Equal(said.GetProperty("sha256").GetString(), kept.GetProperty("sha256").GetString());
        Assert.Empty(Missing(said.GetProperty("channels"), kept.GetProperty("measurement").GetProperty("channels"), "channels").Take(5));
        Assert.Empty(Missing(said.GetProperty("cautions"), kept.GetProperty("measurement").GetProperty("cautions"), "cautions"));
        Assert.Empty(Missing(said.GetProperty("doubts"), kept.GetProperty("measurement").GetProperty("doubts"), "doubts"));
    }

    // Where the second says something else than the first, or nothing. A null may be left out.
    private static IEnumerable<string> Missing(JsonElement said, JsonElement kept, string at) => (said.ValueKind, kept.ValueKind) switch
    {
        (JsonValueKind.Object, JsonValueKind.Object) => said.EnumerateObject().SelectMany(p =>
            kept.TryGetProperty(p.Name, out JsonElement other) ? Missing(p.Value, other, $"{at}.{p.Name}") : p.Value.ValueKind == JsonValueKind.Null ? [] : [$"{at}.{p.Name} is not kept"]),
        (JsonValueKind.Array, JsonValueKind.Array) when said.GetArrayLength() == kept.GetArrayLength() =>
            said.EnumerateArray().Zip(kept.EnumerateArray()).SelectMany((pair, i) => Missing(pair.First, pair.Second, $"{at}[{i}]")),
        _ => JsonElement.DeepEquals(said, kept) ? [] : [$"{at}: {said} is kept as {kept}"],
    };
}
