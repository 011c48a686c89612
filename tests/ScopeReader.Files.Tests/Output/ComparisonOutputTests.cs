using System.Text.Json;
using ScopeReader.Comparing;
using ScopeReader.Files.Output;

namespace ScopeReader.Tests.Output;

public class ComparisonOutputTests
{
    // Repeatability 0.06 Hz each: 1.96 · √2 · 0.06 = 0.166 Hz of the difference of 1 Hz.
    private static (MeasuredFile[] Files, Comparison Comparison) Pair(string name = "b.csv")
    {
        MeasuredFile a = Made.File("a.csv", Made.Channel(Made.Waveform(), [Made.Frequency(), Made.Level()])), b = Made.File(name, Made.Channel(Made.Waveform(), [Made.Frequency(455013.31), Made.Level()]));
        return ([a, b], Comparison.Of(new ComparedSide([a.Measurement!]), [new ComparedSide([b.Measurement!])]));
    }

    [Fact]
    public void Json_has_the_agreed_fields()
    {
        var (files, comparison) = Pair();
        using JsonDocument document = JsonDocument.Parse(ComparisonJson.Document("scopereader 0", files, comparison));
        JsonElement root = document.RootElement, difference = root.GetProperty("differences")[0];

        Assert.Equal(["format", "version", "program", "reference", "captures", "differences", "findings", "readings", "notMeasured"], root.EnumerateObject().Select(p => p.Name));
        Assert.Equal(("scopereader-comparison", 1, "a.csv"), (root.GetProperty("format").GetString(), root.GetProperty("version").GetInt32(), root.GetProperty("reference").GetString()));
        Assert.Equal(["file", "sha256", "error", "cautions", "doubts", "channels"], root.GetProperty("captures")[1].EnumerateObject().Select(p => p.Name));
        Assert.Equal(["quantity", "unit", "file", "channel", "reference", "value", "difference", "expandedUncertainty", "significant", "ratio", "referenceCount", "count", "missing"],
            difference.EnumerateObject().Select(p => p.Name));
        Assert.Equal(("frequency", "Hz", "b.csv", "CH1"), (difference.GetProperty("quantity").GetString(), difference.GetProperty("unit").GetString(),
            difference.GetProperty("file").GetString(), difference.GetProperty("channel").GetString()));
        Assert.Equal((455012.31, 455013.31), (difference.GetProperty("reference").GetDouble(), difference.GetProperty("value").GetDouble()));
        Assert.Equal(1, difference.GetProperty("difference").GetDouble(), 1e-9);
        Assert.Equal(1.959964 * Math.Sqrt(2) * 0.06, difference.GetProperty("expandedUncertainty").GetDouble(), 1e-6);
        Assert.True(difference.GetProperty("significant").GetBoolean());
        Assert.Equal("scope", root.GetProperty("findings").EnumerateArray().Last().GetProperty("code").GetString());
    }

    [Fact]
    public void Json_of_too_few_readable_files_still_says_which()
    {
        using JsonDocument document = JsonDocument.Parse(ComparisonJson.Document("scopereader 0", [new MeasuredFile("gone.csv", null, "gone.csv: no such file")], null));
        Assert.Equal(JsonValueKind.Null, document.RootElement.GetProperty("reference").ValueKind);
        Assert.Equal("gone.csv: no such file", document.RootElement.GetProperty("captures")[0].GetProperty("error").GetString());
    }

    [Fact]
    public void Csv_has_a_row_a_difference_and_no_formula()
    {
        var output = new StringWriter();
        ComparisonCsv.Write(output, Pair("=cmd.csv").Comparison.Differences);
        string[] lines = output.ToString().Split('\n');

        Assert.Equal("quantity,unit,file,channel,reference,value,difference,expandedUncertainty,significant", lines[0]);
        Assert.StartsWith("frequency,Hz,\"'=cmd.csv\",CH1,455012.31,455013.31,1,0.16", lines[1], StringComparison.Ordinal);
        Assert.EndsWith(",true", lines[1], StringComparison.Ordinal);
        Assert.Equal(["", ","], [lines[3], lines[2][^6..^5]]);
    }
}
