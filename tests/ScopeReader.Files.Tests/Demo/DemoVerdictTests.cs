using ScopeReader.Captures;
using ScopeReader.Files;
using ScopeReader.Files.Plans;

namespace ScopeReader.Tests.Demo;

/// <summary>What captures-demo/README.md promises of each capture.</summary>
public class DemoVerdictTests
{
    private static readonly string Folder = Path.Combine(Top(), "captures-demo");

    // Outcomes follow from how the captures were made: true errors of -4, 84 and 29 ppm, shown 12 ppm higher, against ±50 ppm
    // with a rectangle of ±25 ppm; the rest stand clear of their limits.
    [Theory]
    [InlineData("if-source-7.csv", "if-source.toml", Outcome.Pass)]
    [InlineData("if-source-8.csv", "if-source.toml", Outcome.Fail)]
    [InlineData("if-source-9.csv", "if-source.toml", Outcome.Undecided)]
    [InlineData("oscillator-pin-7.csv", "oscillator-pin.toml", Outcome.Fail)]
    [InlineData("node-breadboard.csv", "node.toml", Outcome.Fail)]
    [InlineData("node-soldered.csv", "node.toml", Outcome.Pass)]
    [InlineData("source-spectrum.csv", "source-spectrum.toml", Outcome.Pass)]
    [InlineData("logger-export.csv", "logger-export.toml", Outcome.Pass)]
    [InlineData("slow-edge.csv", "slow-edge.toml", Outcome.Fail)]
    [InlineData("divider.csv", "divider.toml", Outcome.Pass)]
    public void Verdict_is_the_one_that_the_readme_tells(string capture, string plan, Outcome expected) =>
        Assert.Equal(expected, Measured(capture, plan).Outcome);

    [Fact]
    public void Probe_at_the_oscillators_pin_is_named_as_a_cause()
    {
        Measurement pin = Measured("oscillator-pin-7.csv", "oscillator-pin.toml");
        Assert.Contains(pin.Channels[0].Findings, f => f.Text.Contains("probe", StringComparison.Ordinal) && f.Text.Contains("12 pF", StringComparison.Ordinal));
    }

    private static Measurement Measured(string capture, string plan)
    {
        Plan read = PlanReader.ReadFile(Path.Combine(Folder, plan));
        Capture made = CaptureReader.Read(Path.Combine(Folder, capture), read.Import, read.Chain.Scale).Capture;
        return Analysis.Measure(made, read);
    }

    private static string Top()
    {
        DirectoryInfo? here = new(AppContext.BaseDirectory);
        while (here is not null && !File.Exists(Path.Combine(here.FullName, "ScopeReader.sln")))
            here = here.Parent;
        return here?.FullName ?? throw new DirectoryNotFoundException("no ScopeReader.sln above the tests");
    }
}
