using System.Globalization;
using System.Text;
using ScopeReader.Signals;

namespace ScopeReader.Tests.Commands;

public sealed class CalibrateTests : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("calibrate").FullName;

    private const string Plan = """
        # Quillmarsh Wireless and Instrument Workshop (invented)
        subject = "IF source"   # board 7
        nominal = "455 kHz"

        [chain]
        # the data sheet
        timebase-tolerance = "25 ppm" # ± 25
        timebase-reads = "3 ppm" # from last year
        timebase-uncertainty = "1 ppm"

        [[limit]]
        quantity = "frequency-error"
        high = "50 ppm"   # from the filter's maker
        """;

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private string Write(string name, string text)
    {
        string path = Path.Combine(_folder, name);
        File.WriteAllText(path, text);
        return path;
    }

    // A sine as an instrument shows it whose timebase reads so many ppm high: samples further apart than stated.
    private string Capture(string name, double frequency, double readsPpm)
    {
        Captures.Waveform taken = new Recording { Interval = 1e-8, Count = 20_000, Noise = 0.001, TimebaseReadsPpm = readsPpm }.Take(new HarmonicSine { Frequency = frequency }.Build());
        var text = new StringBuilder("Time (s),A (V)\n");
        for (int i = 0; i < taken.Count; i++)
            text.Append(CultureInfo.InvariantCulture, $"{i}.00000e-8,{taken.Samples[i]:0.000000}\n");
        return Write(name, text.ToString());
    }

    // Source: how the captures are made. The instrument shows 1 MHz as 1 MHz·(1 + 18 ppm) (or less), and the source is 455 kHz + 7 ppm.
    [Theory]
    [InlineData(18)]
    [InlineData(-18)]
    public async Task What_calibrate_finds_corrects_what_measure_reads(double reads)
    {
        string reference = Capture("reference.csv", 1e6, reads), source = Capture("source.csv", 455e3 * (1 + 7e-6), reads), plan = Write("source.toml", Plan);

        var (status, output, error) = await Run.Program("calibrate", reference, "--reference", "1MHz", "--reference-uncertainty", "0.01ppm", "--into", plan);
        Assert.Equal((0, ""), (status, error));
        Assert.Contains(reads > 0 ? "this timebase reads high by 1" : "this timebase reads low by 1", output, StringComparison.Ordinal);

        var measured = await Run.Program("measure", source, "--plan", plan, "--json");
        using var json = System.Text.Json.JsonDocument.Parse(measured.Output);
        System.Text.Json.JsonElement channel = json.RootElement.GetProperty("captures")[0].GetProperty("channels")[0];
        System.Text.Json.JsonElement reading = channel.GetProperty("readings").EnumerateArray().First(r => r.GetProperty("quantity").GetString() == "frequency-error");
        // Tolerance: four of the stated standard uncertainties, which are to be under 0.1 ppm.
        double u = reading.GetProperty("standardUncertainty").GetDouble();
        Assert.InRange(u, 0.01, 0.1);
        Assert.Equal(7, reading.GetProperty("value").GetDouble(), 4 * u);
        Assert.Contains(channel.GetProperty("findings").EnumerateArray(), f => f.GetProperty("code").GetString() == "timebase-corrected");
    }

    [Fact]
    public async Task The_plans_comments_and_layout_stay()
    {
        string plan = Write("source.toml", Plan);
        await Run.Program("calibrate", Capture("reference.csv", 1e6, 18), "--reference", "1MHz", "--reference-uncertainty", "0.01ppm", "--ageing", "1ppm/year", "--into", plan);
        string[] before = Plan.ReplaceLineEndings("\n").Split('\n'), after = (await File.ReadAllTextAsync(plan)).Split('\n');

        Assert.Equal(before.Length + 2, after.Length);
        Assert.Equal(before[..7], after[..7]);
        Assert.Matches("^timebase-reads = \"1[78]\\.[0-9]+ ppm\" # from last year$", after[7]);
        Assert.StartsWith("timebase-uncertainty = \"0.0", after[8], StringComparison.Ordinal);
        Assert.Equal(["timebase-calibrated = 2026-06-01", "timebase-ageing = \"1 ppm/year\""], after[9..11]);
        Assert.Equal(before[9..], after[11..]);
    }

    [Fact]
    public async Task Without_a_plan_the_keys_are_printed_as_one_would_have_them()
    {
        var (status, output, _) = await Run.Program("calibrate", Capture("reference.csv", 1e6, 18), "--reference", "1MHz", "--reference-uncertainty", "0.01ppm");
        string[] lines = output.TrimEnd('\n').Split('\n');

        Assert.Equal(0, status);
        // 18 ppm high; noise of 1 mV on 1 V over 0.2 ms leaves 0.03 Hz standard (Cramér-Rao), so no further digit is certain.
        Assert.StartsWith("# 1 MHz is shown as 1.00001", lines[0], StringComparison.Ordinal);
        Assert.Equal("[chain]", lines[1]);
        Assert.Equal("timebase-calibrated = 2026-06-01", lines[4]);
    }

    [Fact]
    public async Task Another_frequency_than_the_references_is_no_calibration()
    {
        string capture = Capture("reference.csv", 1e6, 0);
        var (status, _, error) = await Run.Program("calibrate", capture, "--reference", "10MHz", "--reference-uncertainty", "0.01ppm");

        Assert.Equal(3, status);
        Assert.Equal($"{capture}: expected 10 MHz, found 1.000000 MHz: further off than a timebase errs. Check --reference, and that the reference is on this channel.\n", error);
    }

    [Theory]
    [InlineData("scopereader: calibrate needs --reference-uncertainty: its standard uncertainty, such as 0.01ppm\n", "--reference", "1MHz")]
    [InlineData("scopereader: --reference: expected more than zero, found \"0Hz\"\n", "--reference", "0Hz", "--reference-uncertainty", "1ppm")]
    public async Task What_is_missing_or_wrong_is_named(string message, params string[] options)
    {
        var (status, _, error) = await Run.Program(["calibrate", "reference.csv", .. options]);

        Assert.Equal((64, message), (status, error));
    }

    [Fact]
    public async Task A_chain_on_one_line_is_not_torn_apart()
    {
        string plan = Write("source.toml", "chain = { timebase-tolerance = \"25 ppm\" }\n");
        var (status, _, error) = await Run.Program("calibrate", Capture("reference.csv", 1e6, 18), "--reference", "1MHz", "--reference-uncertainty", "0.01ppm", "--into", plan);

        Assert.Equal(64, status);
        Assert.Equal($"{plan}, line 1: the chain is written on one line; write it as a table, [chain], so that keys can be added to it\n", error);
        Assert.Equal("chain = { timebase-tolerance = \"25 ppm\" }\n", await File.ReadAllTextAsync(plan));
    }
}
