using System.Text.Json;
using ScopeReader.Captures;
using ScopeReader.Files;
using ScopeReader.Files.Output;

namespace ScopeReader.Tests.Output;

public class InspectionJsonTests
{
    private static readonly ImportReport Report = new()
    {
        File = "a.csv",
        Encoding = "UTF-8",
        Delimiter = "semicolon",
        DecimalMark = ",",
        PreambleLines = 7,
        HeaderRows = 2,
        FirstLine = 10,
        Axis = new AxisReport(AxisSource.Column, "s", 1e-8, 0.9e-8, 1.1e-8, 2e-10),
        Channels = [new ChannelReport("CH1", "waveform", "V", 1, 1000, -1, 3.3, 4, 5)],
        Doubts = ["the last line breaks off: it was left out"],
    };

    private static string[] Names(JsonElement element) => [.. element.EnumerateObject().Select(p => p.Name)];

    [Fact]
    public void The_names_and_their_order_are_the_contract()
    {
        var json = new InspectionJson("scopereader 0.1.0");
        json.Add(Report);
        json.Add("gone.csv", "gone.csv: expected a file, found none");
        JsonElement root = JsonDocument.Parse(json.Document()).RootElement, file = root.GetProperty("captures")[0], gone = root.GetProperty("captures")[1];
        Assert.Equal(["format", "version", "program", "captures"], Names(root));
        // "error" is ours: a field may be added.
        Assert.Equal(["file", "error", "encoding", "delimiter", "decimalMark", "preambleLines", "headerRows", "axis", "channels", "doubts", "remembered"], Names(file));
        Assert.Equal(Names(file), Names(gone));
        Assert.Equal(["source", "unit", "interval", "intervalLow", "intervalHigh", "worstDeviation"], Names(file.GetProperty("axis")));
        Assert.Equal(["name", "kind", "unit", "segment", "samples", "minimum", "maximum", "clipped", "missing"], Names(file.GetProperty("channels")[0]));
        Assert.Equal(("column", 1e-8, 7, 5), (file.GetProperty("axis").GetProperty("source").GetString(), file.GetProperty("axis").GetProperty("interval").GetDouble(),
            file.GetProperty("preambleLines").GetInt32(), file.GetProperty("channels")[0].GetProperty("missing").GetInt32()));
        Assert.Equal(JsonValueKind.Null, file.GetProperty("error").ValueKind);
        Assert.Equal("gone.csv: expected a file, found none", gone.GetProperty("error").GetString());
    }
}
