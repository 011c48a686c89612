using System.Text.Json;
using ScopeReader.Archive;

namespace ScopeReader.Tests.Commands.Archive;

public sealed class ArchiveVerbTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("scopereader-verbs-").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private string File => Path.Combine(_folder, "a.db");

    [Fact]
    public async Task A_demo_capture_is_added_found_shown_amended_and_given_back_byte_for_byte()
    {
        string capture = Run.Demo("if-source-7.csv");
        Assert.Equal((0, $"{capture}: kept as entry 1\n"), Out(await Archive("add", capture, "--plan", Run.Demo("if-source.toml"), "--set", "supply=5V", "--tag", "bench", "--serial", "7")));
        Assert.StartsWith($"{capture}: is entry 1 already, added ", (await Archive("add", capture, "--plan", Run.Demo("if-source.toml"))).Output, StringComparison.Ordinal);

        JsonElement found = JsonDocument.Parse((await Archive("find", "--where", "supply > 4.9 V", "--where", "|frequency-error| < 1 %", "--tag", "bench", "--json")).Output).RootElement;
        JsonElement entry = Assert.Single(found.GetProperty("entries").EnumerateArray());
        Assert.Equal(1, entry.GetProperty("id").GetInt32());
        Assert.Equal(5, entry.GetProperty("conditions").GetProperty("supply").GetProperty("value").GetDouble());
        Assert.Contains(entry.GetProperty("readings").EnumerateArray(), r => r.GetProperty("quantity").GetString() == "frequency-error");
        Assert.Contains("1 entry", (await Archive("find", "--verdict", entry.GetProperty("outcome").GetString()!)).Output, StringComparison.Ordinal);

        Assert.Equal((0, "entry 1: condition supply from 5 V to 5.1 V\n"), Out(await Archive("amend", "1", "--set", "supply=5100 mV", "--reason", "meter was read wrong", "--by", "tester")));
        string shown = (await Archive("show", "1")).Output;
        Assert.Contains("supply 5.1", shown, StringComparison.Ordinal);
        Assert.Contains("condition supply from 5 V to 5.1 V", shown.ReplaceLineEndings(" "), StringComparison.Ordinal);

        string copy = Path.Combine(_folder, "copy.csv");
        Assert.Equal(0, (await Archive("extract", "1", "--output", copy)).Status);
        Assert.Equal(System.IO.File.ReadAllBytes(capture), System.IO.File.ReadAllBytes(copy));
        Assert.Equal($"{copy}: exists already; nothing was overwritten; give another name with --output\n", (await Archive("extract", "1", "--output", copy)).Error);
    }

    [Fact]
    public async Task Measuring_again_with_the_same_program_changes_nothing_and_is_kept_where_that_is_asked()
    {
        await Archive("add", Run.Demo("if-source-7.csv"), "--plan", Run.Demo("if-source.toml"));
        Assert.Matches("^entry 1, if-source-7.csv: nothing changed, [a-z]+\n$", (await Archive("remeasure", "1", "--keep", "--reason", "a trial")).Output);
        using MeasurementArchive archive = MeasurementArchive.OpenToRead(File);
        Assert.Equal(["entry", "measurement"], archive.Show(1).History.Select(h => h.Kind));
    }

    [Fact]
    public async Task Export_import_backup_and_verify_agree_on_the_head()
    {
        await Archive("add", Run.Demo("if-source-7.csv"), Run.Demo("source-spectrum.csv"));
        string exported = (await Archive("export", Path.Combine(_folder, "export"))).Output;
        Assert.Equal(exported, (await Run.Program("archive", "import", Path.Combine(_folder, "export"), "--archive", Path.Combine(_folder, "b.db"))).Output);
        Assert.Equal(exported, (await Archive("backup", Path.Combine(_folder, "c.db"))).Output);
        string head = exported.Trim().Split(' ')[1];
        (int status, string output, _) = await Archive("verify", "--head", head);
        Assert.Equal(0, status);
        Assert.Contains("2 records, 2 captures: every link and every hash fits", output, StringComparison.Ordinal);
        Assert.Contains("nothing up to it was changed, and 0 records came after", output, StringComparison.Ordinal);
        Assert.Contains("keep the head elsewhere", (await Archive("verify")).Output, StringComparison.Ordinal);
        (status, output, _) = await Archive("verify", "--head", new string('0', 63) + "1");
        Assert.Equal(1, status);
        Assert.Contains("the chain was written anew", output, StringComparison.Ordinal);
        Assert.Contains(head, (await Archive("stats")).Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Keep_measures_and_keeps_in_one_go()
    {
        string capture = Run.Demo("if-source-7.csv"), plan = Run.Demo("if-source.toml");
        var plain = await Run.Program("measure", capture, "--plan", plan, "--json");
        var kept = await Run.Program("measure", capture, "--plan", plan, "--json", "--keep", "--archive", File);
        Assert.Equal((plain.Status, plain.Output), (kept.Status, kept.Output));
        Assert.Equal($"{capture}: kept as entry 1\n", kept.Error);
    }

    [Fact]
    public async Task A_trend_tells_drift_and_control_limits_and_a_series_its_slope()
    {
        for (int i = 0; i < 3; i++)
            await Archive("add", Run.Demo($"if-source-{7 + i}.csv"), "--plan", Run.Demo("if-source.toml"), "--captured", $"202{i}-01-01", "--set", $"supply={4 + i}V");
        string trend = (await Archive("trend", "frequency-error")).Output.ReplaceLineEndings(" ");
        Assert.Contains("ppm/year", trend, StringComparison.Ordinal);
        Assert.Contains("control limits", trend, StringComparison.Ordinal);
        string series = (await Run.Program("series", "--against", "supply", "--within", "500ppm", "--archive", File)).Output.ReplaceLineEndings(" ");
        Assert.Contains("ppm/V", series, StringComparison.Ordinal);
        Assert.Contains("within 500", series, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(3, "there is no archive here", "find")]
    [InlineData(64, "--where: expected a comparison", "find", "--where", "frequency-error")]
    [InlineData(64, "--verdict: expected one of", "find", "--verdict", "good")]
    [InlineData(64, "amend needs a reason", "amend", "1", "--subject", "x")]
    [InlineData(64, "expected an entry's number, such as 12, found \"x\"", "show", "x")]
    [InlineData(64, "--set: expected a name and a value, such as supply=5V, found \"supply\"", "add", "no.csv", "--set", "supply")]
    [InlineData(64, "unknown quantity \"rise-tim\"; the nearest is rise-time", "trend", "rise-tim")]
    public async Task What_is_wrong_is_one_line_and_a_status(int status, string problem, params string[] arguments)
    {
        var run = await Archive(arguments);
        Assert.Equal(status, run.Status);
        Assert.Contains(problem, run.Error, StringComparison.Ordinal);
        Assert.Equal(1, run.Error.Count(c => c == '\n'));
    }

    private Task<(int Status, string Output, string Error)> Archive(params string[] arguments) => Run.Program(["archive", .. arguments, "--archive", File]);

    private static (int, string) Out((int Status, string Output, string Error) run) => (run.Status, run.Output);
}
