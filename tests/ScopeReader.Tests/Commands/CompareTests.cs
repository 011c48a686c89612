using System.Text.Json;

namespace ScopeReader.Tests.Commands;

public class CompareTests
{
    private static readonly string Breadboard = Run.Demo("node-breadboard.csv"), Soldered = Run.Demo("node-soldered.csv"), Plan = Run.Demo("node.toml");

    [Fact]
    public async Task Demo_pair_is_told_apart_in_words()
    {
        (int status, string output, _) = await Run.Program("compare", Breadboard, Soldered, "--json");
        Assert.Equal(0, status);
        using JsonDocument document = JsonDocument.Parse(output);
        string[] findings = [.. document.RootElement.GetProperty("findings").EnumerateArray().Select(f => f.GetProperty("code").GetString()!)];
        Assert.Equal(["ringing-moved", "changed", "edges-apart", "unchanged", "scope"], findings);

        // The nodes were made with f0 of 11.2 and 37 MHz, ζ of 0.085 and 0.2: f0 √(1 − ζ²).
        JsonElement ringing = document.RootElement.GetProperty("differences").EnumerateArray().Single(d => d.GetProperty("quantity").GetString() == "ringing-frequency");
        double truth = 37e6 * Math.Sqrt(1 - 0.04) - 11.2e6 * Math.Sqrt(1 - 0.085 * 0.085), u = ringing.GetProperty("expandedUncertainty").GetDouble();
        // A 95 % interval, and half as much again so that this one capture is no coin to toss.
        Assert.Equal(truth, ringing.GetProperty("difference").GetDouble(), 1.5 * u);
        Assert.True(ringing.GetProperty("significant").GetBoolean());
    }

    [Theory]
    [InlineData(60)]
    [InlineData(80)]
    [InlineData(120)]
    public async Task No_line_is_wider_than_the_terminal(int width)
    {
        (int status, string output, string error) = await Run.At(width, ["compare", Breadboard, Soldered, "--plan", Plan]);
        // The breadboard fails its limits: of several files the worst counts.
        Assert.Equal((1, ""), (status, error));
        Assert.All(output.Split('\n'), line => Assert.InRange(line.Length, 0, width));
        Assert.Contains("rise-overshoot passes its limit, where the reference fails its limit", string.Join(' ', output.Split(['\n', ' '], StringSplitOptions.RemoveEmptyEntries)), StringComparison.Ordinal);
    }

    [Fact]
    public async Task Repeats_on_both_sides_count()
    {
        (int status, string output, _) = await Run.Program("compare", Run.Demo("if-source-7.csv"), Run.Demo("if-source-7.csv"), "--with", Run.Demo("if-source-8.csv"), Run.Demo("if-source-8.csv"), "--csv");
        Assert.Equal(0, status);
        // Repeats that are one file have no scatter at all: no more than the bounds that they share.
        Assert.Contains("\nfrequency,Hz,", output, StringComparison.Ordinal);
        Assert.Contains("if-source-8.csv", output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_file_that_cannot_be_read_is_named_and_the_rest_is_compared()
    {
        (int status, string output, string error) = await Run.Program("compare", Breadboard, "gone.csv", Soldered);
        Assert.Equal(3, status);
        Assert.StartsWith("gone.csv: ", error, StringComparison.Ordinal);
        Assert.Contains("Differences", output, StringComparison.Ordinal);

        (status, output, _) = await Run.Program("compare", "gone.csv", Soldered);
        Assert.Equal((3, ""), (status, output));
    }

    [Theory]
    [InlineData("compare needs two captures or more: scopereader compare BEFORE AFTER", "a.csv")]
    [InlineData("--json and --csv are two forms of the output; keep one of them", "a.csv", "b.csv", "--json", "--csv")]
    [InlineData("--added compares two states, without and with the capacitor; give repeats of the second with --with", "a.csv", "b.csv", "c.csv", "--added", "47pF")]
    [InlineData("--added: expected a unit after the number, such as 15 pF, found \"47\"", "a.csv", "b.csv", "--added", "47")]
    [InlineData("--added: expected more than zero, found \"0pF\"", "a.csv", "b.csv", "--added", "0pF")]
    [InlineData("--added-tolerance is the tolerance of --added, which is not given", "a.csv", "b.csv", "--added-tolerance", "5%")]
    [InlineData("--added-tolerance: expected 0 to 100 %, found \"120%\"", "a.csv", "b.csv", "--added", "47pF", "--added-tolerance", "120%")]
    [InlineData("standard input (-) can be read once", "-", "-")]
    [InlineData("a file's name is empty", "a.csv", "")]
    public async Task A_wrong_command_line_is_refused_before_anything_is_measured(string message, params string[] arguments)
    {
        (int status, string output, string error) = await Run.Program(["compare", .. arguments]);
        Assert.Equal((64, "", $"scopereader: {message}\n"), (status, output, error));
    }

    [Fact]
    public async Task Another_chain_brings_its_errors()
    {
        (_, string same, _) = await Run.Program("compare", Breadboard, Soldered, "--plan", Plan, "--json");
        (_, string other, _) = await Run.Program("compare", Breadboard, Soldered, "--plan", Plan, "--with-plan", Plan, "--json");
        // Two timebases of ±25 ppm at 503 kHz allow ±12.6 Hz each: 95 % of the triangle that they make is 78 % of the sum.
        Assert.InRange(Frequency(same), 0.1, 2);
        Assert.InRange(Frequency(other), 0.75 * 25.2, 25.2);

        static double Frequency(string json)
        {
            using JsonDocument document = JsonDocument.Parse(json);
            return document.RootElement.GetProperty("differences").EnumerateArray().Single(d => d.GetProperty("quantity").GetString() == "frequency").GetProperty("expandedUncertainty").GetDouble();
        }
    }
}
