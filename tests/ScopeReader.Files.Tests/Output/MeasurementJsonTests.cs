using System.Text.Json;
using ScopeReader.Captures;
using ScopeReader.Files.Output;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Output;

public class MeasurementJsonTests
{
    private const string Program = "scopereader 0.1.0";

    private static readonly Limit Tight = new(Quantities.Frequency, null, 455100);

    private static MeasuredFile Sample()
    {
        Reading frequency = Made.Frequency();
        return Made.File("if.csv", Made.Channel(Made.Waveform(), [frequency, Made.Level()], Judge.Reading(Tight, frequency)));
    }

    private static string Document(MeasuredFile[] files, bool explain)
    {
        var json = new MeasurementJson(Program, explain);
        foreach (MeasuredFile file in files)
            json.Add(file);
        return json.Document();
    }

    private static JsonElement Parse(string json) => JsonDocument.Parse(json).RootElement;

    private static string[] Names(JsonElement element) => [.. element.EnumerateObject().Select(p => p.Name)];

    // The names and their order are those of the published contract, version 1.
    [Fact]
    public void The_names_and_their_order_are_the_contract()
    {
        JsonElement root = Parse(Document([Sample()], explain: true));
        Assert.Equal(["format", "version", "program", "outcome", "captures"], Names(root));
        JsonElement capture = root.GetProperty("captures")[0], channel = capture.GetProperty("channels")[0], reading = channel.GetProperty("readings")[0];
        Assert.Equal(["file", "sha256", "error", "cautions", "doubts", "channels"], Names(capture));
        Assert.Equal(["name", "kind", "unit", "segment", "samples", "interval", "start", "readings", "notMeasured", "findings", "verdicts"], Names(channel));
        Assert.Equal(["quantity", "value", "unit", "standardUncertainty", "expandedUncertainty", "coverage", "coverageFactor", "degreesOfFreedom", "repeatability",
            "missing", "method", "primary", "count", "budget"], Names(reading));
        Assert.Equal(["term", "value", "distribution", "sensitivity", "contribution", "degreesOfFreedom"], Names(reading.GetProperty("budget")[0]));
        Assert.Equal(["quantity", "code", "reason"], Names(channel.GetProperty("notMeasured")[0]));
        Assert.Equal(["code", "value", "text"], Names(channel.GetProperty("findings")[0]));
        Assert.Equal(["quantity", "low", "high", "unit", "value", "expandedUncertainty", "rule", "guard", "probability", "outcome", "reason"], Names(channel.GetProperty("verdicts")[0]));
    }

    [Fact]
    public void The_values_are_in_base_units_and_the_unknown_is_null()
    {
        JsonElement root = Parse(Document([Sample()], explain: true));
        Assert.Equal(("scopereader-measurement", 1, Program, "pass"),
            (root.GetProperty("format").GetString(), root.GetProperty("version").GetInt32(), root.GetProperty("program").GetString(), root.GetProperty("outcome").GetString()));
        JsonElement capture = root.GetProperty("captures")[0], channel = capture.GetProperty("channels")[0], reading = channel.GetProperty("readings")[0];
        Assert.Equal(Made.Hash, capture.GetProperty("sha256").GetString());
        Assert.Equal(JsonValueKind.Null, capture.GetProperty("error").ValueKind);
        Assert.Equal((1e-8, -1e-5, 4), (channel.GetProperty("interval").GetDouble(), channel.GetProperty("start").GetDouble(), channel.GetProperty("samples").GetInt32()));
        Assert.Equal(455012.31, reading.GetProperty("value").GetDouble());
        // A rectangle of half-width a has the standard uncertainty a/sqrt 3 (JCGM 100:2008, 4.3.7): 25e-6 of the value, and
        // 0.06 Hz beside it, which adds 0.0003 Hz: hence the tolerance of 1e-3 Hz.
        Assert.Equal(25e-6 * 455012.31 / Math.Sqrt(3), reading.GetProperty("standardUncertainty").GetDouble(), 1e-3);
        Assert.Equal(0.06, reading.GetProperty("repeatability").GetDouble(), 1e-12);
        Assert.Equal(JsonValueKind.Null, reading.GetProperty("degreesOfFreedom").ValueKind);
        Assert.Equal("rectangular", reading.GetProperty("budget")[0].GetProperty("distribution").GetString());
        Assert.Equal(455012.31, reading.GetProperty("budget")[0].GetProperty("sensitivity").GetDouble());
        Assert.Equal("gain", channel.GetProperty("readings")[1].GetProperty("missing")[0].GetString());
        JsonElement verdict = channel.GetProperty("verdicts")[0];
        Assert.Equal(JsonValueKind.Null, verdict.GetProperty("low").ValueKind);
        Assert.Equal((455100d, "Hz", "guarded", 1d, "pass"), (verdict.GetProperty("high").GetDouble(), verdict.GetProperty("unit").GetString(),
            verdict.GetProperty("rule").GetString(), verdict.GetProperty("guard").GetDouble(), verdict.GetProperty("outcome").GetString()));
    }

    [Fact]
    public void Limit_line_has_its_place_beside_the_verdicts_own_fields()
    {
        var line = new LimitLine("mask", "dBm", [(1e6, -40), (2e6, -50)]);
        var margin = new Reading(Quantities.LimitLineMargin, 2.5, "dB", new Budget([BudgetTerm.Normal("noise", 0.1)]), "limit-line");
        var verdict = new Verdict(new Limit(Quantities.LimitLineMargin, 0, null), VerdictOutcome.Pass, margin, 1, "inside") { Line = new LinePlace(line, 1.5e6, -47.5, -45) };
        var trace = new SpectrumTrace("trace 1", "dBm", [1e6, 1.5e6, 2e6], [-60, -47.5, -60]);
        JsonElement written = Parse(MeasurementJson.Line(Made.File("a.csv", Made.Channel(trace, [margin], verdict)), explain: false)).GetProperty("channels")[0].GetProperty("verdicts")[0];
        Assert.Equal(("limit-line-margin", 0d, "dB", 2.5), (written.GetProperty("quantity").GetString(), written.GetProperty("low").GetDouble(), written.GetProperty("unit").GetString(), written.GetProperty("value").GetDouble()));
        JsonElement place = written.GetProperty("limitLine");
        Assert.Equal(("mask", "upper", "dBm", 1.5e6, -47.5, -45d), (place.GetProperty("name").GetString(), place.GetProperty("side").GetString(), place.GetProperty("unit").GetString(),
            place.GetProperty("frequency").GetDouble(), place.GetProperty("level").GetDouble(), place.GetProperty("lineLevel").GetDouble()));
    }

    [Fact]
    public void Budgets_are_there_only_where_they_were_asked_for() =>
        Assert.False(Parse(Document([Sample()], explain: false)).GetProperty("captures")[0].GetProperty("channels")[0].GetProperty("readings")[0].TryGetProperty("budget", out _));

    [Fact]
    public void A_file_that_could_not_be_read_is_there_with_its_error_and_makes_the_whole_an_error()
    {
        JsonElement root = Parse(Document([Sample(), new MeasuredFile("gone.csv", null, "gone.csv: there is no such file")], explain: false));
        Assert.Equal("error", root.GetProperty("outcome").GetString());
        JsonElement gone = root.GetProperty("captures")[1];
        Assert.Equal(["file", "sha256", "error", "cautions", "doubts", "channels"], Names(gone));
        Assert.Equal((JsonValueKind.Null, "gone.csv: there is no such file", 0), (gone.GetProperty("sha256").ValueKind, gone.GetProperty("error").GetString(), gone.GetProperty("channels").GetArrayLength()));
    }

    [Fact]
    public void Without_an_interval_the_interval_is_null_and_the_start_zero()
    {
        JsonElement channel = Parse(MeasurementJson.Line(Made.File("a.csv", Made.Channel(Made.Waveform(axis: TimeAxis.PerSample), [])), explain: false)).GetProperty("channels")[0];
        Assert.Equal((JsonValueKind.Null, 0d), (channel.GetProperty("interval").ValueKind, channel.GetProperty("start").GetDouble()));
    }

    [Theory]
    [InlineData(1e6, 2e6, 3e6, 1e6)] // even
    [InlineData(1e6, 2.001e6, 3e6, 1e6)] // rounded as a file prints it
    [InlineData(1e6, 2e6, 4e6, null)]
    public void A_spectrum_has_its_start_and_its_step_in_hertz(double first, double second, double third, double? step)
    {
        var trace = new SpectrumTrace("trace 1", "dBm", [first, second, third], [-50, -10, -50]);
        JsonElement channel = Parse(MeasurementJson.Line(Made.File("a.csv", Made.Channel(trace, [])), explain: false)).GetProperty("channels")[0];
        Assert.Equal(("spectrum", first), (channel.GetProperty("kind").GetString(), channel.GetProperty("start").GetDouble()));
        Assert.Equal(step, channel.GetProperty("interval").ValueKind == JsonValueKind.Null ? null : channel.GetProperty("interval").GetDouble());
    }

    [Fact]
    public void What_is_not_finite_is_null_so_that_every_reader_takes_the_text()
    {
        // Squares of 1e200 overflow: the uncertainty is infinite, the factor is not a number.
        var wild = new Reading(Quantities.Frequency, 1, "Hz", new Budget([BudgetTerm.Normal("noise", 1e200)]), "crossings");
        string json = Document([Made.File("a.csv", Made.Channel(Made.Waveform(), [wild]))], explain: true);
        Assert.Equal(JsonValueKind.Null, Parse(json).GetProperty("captures")[0].GetProperty("channels")[0].GetProperty("readings")[0].GetProperty("standardUncertainty").ValueKind);
        Assert.DoesNotContain("NaN", json, StringComparison.Ordinal);
        Assert.DoesNotContain("Infinity", json, StringComparison.Ordinal);
    }

    [Fact]
    public void The_same_measurement_gives_the_same_text_and_a_line_is_one_line()
    {
        Assert.Equal(Document([Sample()], explain: true), Document([Sample()], explain: true));
        Assert.DoesNotContain('\n', MeasurementJson.Line(Sample(), explain: true));
        Assert.DoesNotContain('\r', Document([Sample()], explain: true));
    }

    [Fact]
    public void A_name_from_a_file_cannot_drive_the_terminal_that_shows_the_text()
    {
        string json = MeasurementJson.Line(Made.File("a\u001b[31m.csv", Made.Channel(Made.Waveform("CH\u009b2J\u202e µ"), [])), explain: false);
        Assert.All(json, c => Assert.False(char.IsControl(c)));
        Assert.Equal("CH\u009b2J\u202e µ", Parse(json).GetProperty("channels")[0].GetProperty("name").GetString());
    }
}
