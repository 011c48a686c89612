using System.Text.Json;

namespace ScopeReader.Tests.Commands;

public sealed class MeasureTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("measure").FullName;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private string Write(string name, string text)
    {
        string path = Path.Combine(_folder, name);
        File.WriteAllText(path, text);
        return path;
    }

    // The demo plan's limit on frequency and its timebase, without its other limits: what they find is for other tests.
    private string ErrorPlan() => Write("error.toml", "nominal = \"455 kHz\"\n[chain]\ntimebase-tolerance = \"25 ppm\"\n[[limit]]\nquantity = \"frequency-error\"\nlow = \"-50 ppm\"\nhigh = \"50 ppm\"\n");

    // What each demo capture really is stands in captures-demo/README.md: they are made, so the truth is known.
    [Theory]
    [InlineData(0, "if-source-7.csv")] // really -4 ppm, limit 50
    [InlineData(1, "if-source-8.csv")] // really 84 ppm
    [InlineData(2, "if-source-9.csv")] // really 29 ppm, read as 41, timebase 25
    [InlineData(3, "gone.csv")]
    // Of several files the worst counts, in the order 3, 1, 2, 0.
    [InlineData(2, "if-source-7.csv", "if-source-9.csv")]
    [InlineData(1, "if-source-8.csv", "if-source-9.csv", "if-source-7.csv")]
    [InlineData(3, "if-source-8.csv", "gone.csv", "if-source-7.csv")]
    public async Task The_exit_status_is_that_of_the_worst_file(int status, params string[] files)
    {
        (int found, _, string error) = await Run.Program(["measure", .. files.Select(Run.Demo), "--plan", ErrorPlan(), "--quiet"]);
        Assert.Equal(status, found);
        Assert.Equal(files.Count(f => f == "gone.csv"), error.Split('\n').Length - 1);
    }

    [Fact]
    public async Task Without_a_plan_nothing_is_judged_and_the_status_is_0()
    {
        (int status, string output, string error) = await Run.Program("measure", Run.Demo("if-source-8.csv"));
        Assert.Equal((0, ""), (status, error));
        Assert.DoesNotContain("PASS", output, StringComparison.Ordinal);
        Assert.Contains("the plan does not state them", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_wrong_plan_is_told_before_any_file_is_looked_at()
    {
        string plan = Write("plan.toml", "[[limit]]\nquantity = \"rise-tme\"\nhigh = \"1 us\"\n");
        Assert.Equal((64, "", $"{plan}, line 2: unknown quantity \"rise-tme\"; the nearest is rise-time\n"), await Run.Program("measure", "gone.csv", "--plan", plan));
    }

    [Fact]
    public async Task A_limit_on_a_channel_that_the_capture_does_not_have_is_an_error_that_names_both()
    {
        string plan = Write("plan.toml", "channel = \"CH9\"\n[[limit]]\nquantity = \"frequency\"\nlow = \"1 Hz\"\n");
        (int status, string output, _) = await Run.Program("measure", Run.Demo("divider.csv"), "--plan", plan, "--quiet");
        Assert.Equal(3, status);
        Assert.StartsWith("NOT JUDGED  the plan's limits are for CH9, and this capture has Clock, Half, Quarter", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_channel_that_is_not_there_is_named_with_those_that_are()
    {
        string file = Run.Demo("divider.csv");
        Assert.Equal((3, "", $"{file}: expected a channel \"CH9\", found Clock, Half, Quarter. Name one of these with --channel.\n"), await Run.Program("measure", file, "--channel", "CH9"));
    }

    [Fact]
    public async Task One_channel_can_be_measured_alone()
    {
        (_, string output, _) = await Run.Program("measure", Run.Demo("divider.csv"), "--channel", "Half", "--json");
        JsonElement channel = Assert.Single(JsonDocument.Parse(output).RootElement.GetProperty("captures")[0].GetProperty("channels").EnumerateArray());
        Assert.Equal("Half", channel.GetProperty("name").GetString());
    }

    [Fact]
    public async Task The_frequency_error_of_the_made_source_is_within_its_stated_uncertainty_of_the_truth()
    {
        (_, string output, _) = await Run.Program("measure", Run.Demo("if-source-7.csv"), "--plan", ErrorPlan(), "--json", "--explain");
        JsonElement root = JsonDocument.Parse(output).RootElement;
        Assert.Equal("pass", root.GetProperty("outcome").GetString());
        JsonElement error = root.GetProperty("captures")[0].GetProperty("channels")[0].GetProperty("readings").EnumerateArray()
            .Single(r => r.GetProperty("quantity").GetString() == "frequency-error" && r.GetProperty("primary").GetBoolean());
        // The source is made 4 ppm low and the timebase reads 12 ppm high (captures-demo/README.md): the truth is -4 ppm.
        Assert.InRange(-4, error.GetProperty("value").GetDouble() - error.GetProperty("expandedUncertainty").GetDouble(), error.GetProperty("value").GetDouble() + error.GetProperty("expandedUncertainty").GetDouble());
        Assert.Contains(error.GetProperty("budget").EnumerateArray(), t => t.GetProperty("term").GetString() == "timebase");
    }

    [Fact]
    public async Task Several_jobs_change_neither_the_order_nor_a_letter()
    {
        string[] files = [Run.Demo("if-source-9.csv"), Run.Demo("gone.csv"), Run.Demo("if-source-7.csv"), Run.Demo("if-source-8.csv")];
        foreach (string form in (string[])["--json", "--csv"])
            Assert.Equal(await Run.Program(["measure", .. files, "--plan", ErrorPlan(), form]), await Run.Program(["measure", .. files, "--plan", ErrorPlan(), form, "--jobs", "4"]));
    }

    [Fact]
    public async Task Lines_of_json_are_one_object_a_file_also_for_one_that_cannot_be_read()
    {
        (int status, string output, string error) = await Run.Program("measure", Run.Demo("slow-edge.csv"), "gone.csv", "--jsonl");
        string[] lines = output.TrimEnd('\n').Split('\n');
        Assert.Equal((3, 2), (status, lines.Length));
        Assert.Equal(JsonValueKind.Null, JsonDocument.Parse(lines[0]).RootElement.GetProperty("error").ValueKind);
        Assert.Equal(error, JsonDocument.Parse(lines[1]).RootElement.GetProperty("error").GetString() + "\n");
    }

    [Fact]
    public async Task After_several_files_each_is_named_once_more_with_its_answer()
    {
        string slow = Run.Demo("slow-edge.csv");
        (_, string output, _) = await Run.At(400, ["measure", slow, "gone.csv", "--plan", Run.Demo("slow-edge.toml")]);
        // The edge takes 1.2 us where 1 us is asked (captures-demo/README.md).
        Assert.EndsWith($"\nAll files\nFAIL        {slow}\nUNREADABLE  gone.csv\n", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_calibration_that_ran_out_is_a_doubt()
    {
        string plan = Write("plan.toml", "[chain]\ncalibration-due = 2026-05-31\n");
        (_, string output, _) = await Run.Program("measure", Run.Demo("slow-edge.csv"), "--plan", plan);
        Assert.Contains("the instrument's calibration ran out on 2026-05-31, by the plan", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_stopped_run_ends_with_130()
    {
        using var stop = new CancellationTokenSource();
        await stop.CancelAsync();
        (int status, _, string error) = await Run.At(80, ["measure", Run.Demo("if-source-7.csv")], cancellation: stop.Token);
        Assert.Equal((130, ""), (status, error));
    }

    [Fact]
    public async Task A_fault_of_the_program_is_one_line_and_70() =>
        Assert.Equal((70, "", "scopereader: a fault of this program, not of your files: InvalidOperationException: the bench was opened\n"), await Run.Program());
}
