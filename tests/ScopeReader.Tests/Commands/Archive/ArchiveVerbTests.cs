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
        Assert.Matches("^entry 1, if-source-7.csv: nothing changed, [a-z]+\n  kept as record 2\n$", (await Archive("remeasure", "1", "--keep", "--reason", "a trial")).Output);
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

    [Fact]
    public async Task A_series_of_two_foretells_no_further_reading_and_ends_as_its_worst_file_does()
    {
        string missing = Path.Combine(Path.GetTempPath(), "no-such-capture.csv");
        var (status, output, error) = await Run.Program("series", Run.Demo("if-source-7.csv"), Run.Demo("if-source-8.csv"), missing, "--plan", Run.Demo("if-source.toml"),
            "--against", "supply", "--at", "4.5V,5V,5.5V", "--within", "500ppm");
        Assert.Equal(3, status);
        Assert.StartsWith(missing, error, StringComparison.Ordinal);
        Assert.Contains("by the curve", output, StringComparison.Ordinal);
        Assert.DoesNotContain("one more reading", output.ReplaceLineEndings(" "), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(20)]
    [InlineData(40)]
    [InlineData(80)]
    [InlineData(200)]
    public async Task Nothing_in_an_entry_reaches_the_terminal_and_nothing_runs_past_its_width(int width)
    {
        string hostile = "\u001b[31mred\u0007\nsecond line \u202e=HYPERLINK(\"x\")";
        await Archive("add", Run.Demo("if-source-7.csv"), "--plan", Run.Demo("if-source.toml"), "--subject", hostile, "--notes", hostile, "--tag", hostile, "--serial", "=1+1", "--set", "supply=5V");
        foreach (string[] verb in (string[][])[["find"], ["show", "1"], ["trend", "rise-time"], ["stats"], ["find", "--where", "frequency-error < 1 %"]])
        {
            (int status, string output, string error) = await Run.At(width, ["archive", .. verb, "--archive", File], null);
            Assert.Equal((0, ""), (status, error));
            Assert.DoesNotContain(output, c => char.IsControl(c) && c != '\n');
            Assert.DoesNotContain('\u202e', output);
            // A path, a hash and a name without spaces are one word: broken or not, they end where the line does.
            Assert.All(output.Split('\n'), line => Assert.InRange(line.Length, 0, Math.Max(width, 35)));
        }
        Assert.DoesNotContain("\n=", (await Archive("find", "--csv")).Output.Replace(",", "\n", StringComparison.Ordinal), StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_misspelt_quantity_finds_nothing_and_says_why()
    {
        await Archive("add", Run.Demo("if-source-7.csv"));
        (int status, string output, string error) = await Archive("find", "--where", "frequncy-error > 20 ppm");
        Assert.Equal((0, "0 entries\n", "\"frequncy-error\" is neither a quantity nor a condition of any entry; the nearest is frequency-error\n"), (status, output, error));
    }

    [Theory]
    [InlineData(3, "there is no archive here", "find")]
    [InlineData(64, "--where: expected a comparison", "find", "--where", "frequency-error")]
    [InlineData(64, "--verdict: expected one of", "find", "--verdict", "good")]
    [InlineData(64, "amend needs a reason", "amend", "1", "--subject", "x")]
    [InlineData(64, "expected an entry's number, such as 12, found \"x\"", "show", "x")]
    [InlineData(64, "--set: expected a name and a value, such as supply=5V, found \"supply\"", "add", "no.csv", "--set", "supply")]
    [InlineData(64, "add needs a file: scopereader archive add FILE", "add")]
    [InlineData(64, "show needs an entry: scopereader archive show ENTRY", "show")]
    [InlineData(64, "--captured: 2999-01-01 is in the future", "add", "no.csv", "--captured", "2999-01-01")]
    [InlineData(64, "--captured: expected a date, such as 2026-11-30 or 2026-11-30T14:05, found \"yesterday\"", "amend", "1", "--captured", "yesterday", "--reason", "x")]
    [InlineData(64, "--calibration-due: expected a day, such as 2026-11-30, found \"2026-13-01\"", "amend", "1", "--calibration-due", "2026-13-01", "--reason", "x")]
    [InlineData(64, "--until: expected a date after that of --since, 2026-01-01, found \"2025-01-01\"", "find", "--since", "2026-01-01", "--until", "2025-01-01")]
    [InlineData(64, "--since: expected a date, such as 2026-11-30 or 2026-11-30T14:05, found \"2025-02-30\"", "find", "--since", "2025-02-30")]
    [InlineData(64, "--head: expected the 64 hexadecimal digits of a hash, found \"abc\"", "verify", "--head", "abc")]
    [InlineData(64, "--limit: expected a whole number above zero, found \"0\"", "find", "--limit", "0")]
    [InlineData(64, "unexpected \"extra\" after verify", "verify", "extra")]
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
