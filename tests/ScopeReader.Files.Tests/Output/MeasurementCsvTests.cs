using ScopeReader.Files.Output;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Output;

public class MeasurementCsvTests
{
    private const string Header = "file,channel,segment,quantity,value,unit,standardUncertainty,expandedUncertainty,coverage,method,primary,outcome";

    private static string[] Lines(params MeasuredFile[] files)
    {
        var text = new StringWriter();
        MeasurementCsv.WriteHeader(text);
        foreach (MeasuredFile file in files)
            MeasurementCsv.Write(text, file);
        Assert.DoesNotContain('\r', text.ToString());
        return text.ToString().TrimEnd('\n').Split('\n');
    }

    [Fact]
    public void There_is_one_row_a_reading_under_the_columns_of_the_contract()
    {
        Reading frequency = Made.Frequency();
        string[] lines = Lines(Made.File("if.csv", Made.Channel(Made.Waveform(), [frequency, Made.Level()], Judge.Reading(new Limit(Quantities.Frequency, null, 455100), frequency))));
        Assert.Equal(Header, lines[0]);
        Assert.Equal(3, lines.Length);
        Assert.StartsWith("if.csv,CH1,1,frequency,455012.31,Hz,", lines[1], StringComparison.Ordinal);
        Assert.EndsWith(",0.95,crossings,true,pass", lines[1], StringComparison.Ordinal);
        Assert.StartsWith("if.csv,CH1,1,amplitude,3.3,V,0.001,", lines[2], StringComparison.Ordinal);
        Assert.EndsWith(",0.95,histogram,true,", lines[2], StringComparison.Ordinal);
    }

    [Fact]
    public void The_worst_of_several_limits_on_a_reading_is_its_outcome()
    {
        Reading frequency = Made.Frequency();
        Verdict pass = Judge.Reading(new Limit(Quantities.Frequency, null, 456000), frequency), fail = Judge.Reading(new Limit(Quantities.Frequency, null, 454000), frequency);
        Assert.EndsWith(",fail", Lines(Made.File("if.csv", Made.Channel(Made.Waveform(), [frequency], pass, fail)))[1], StringComparison.Ordinal);
    }

    [Fact]
    public void Numbers_come_back_to_the_last_bit()
    {
        string cell = Lines(Made.File("a.csv", Made.Channel(Made.Waveform(), [Made.Frequency(0.1 + 0.2)])))[1].Split(',')[4];
        Assert.Equal("0.30000000000000004", cell);
    }

    // OWASP's list of characters that start a formula in a spreadsheet (from memory): = + - @ tab, carriage return.
    [Theory]
    [InlineData("=HYPERLINK(1)")]
    [InlineData("+1")]
    [InlineData("-1+2")]
    [InlineData("@SUM(A1)")]
    [InlineData("\t=1")]
    [InlineData("\r=1")]
    [InlineData("\n=1")]
    public void A_name_that_a_spreadsheet_would_calculate_is_written_as_text(string name)
    {
        var text = new StringWriter();
        MeasurementCsv.Write(text, Made.File(name, Made.Channel(Made.Waveform(name), [Made.Frequency()])));
        Assert.StartsWith($"\"'{name}\",\"'{name}\",1,", text.ToString(), StringComparison.Ordinal);
    }

    [Fact]
    public void A_negative_number_stays_a_number() =>
        Assert.Equal("-5", Lines(Made.File("a.csv", Made.Channel(Made.Waveform(), [new Reading(Quantities.FrequencyError, -5, "ppm", new Budget([]), "crossings")])))[1].Split(',')[4]);

    [Fact]
    public void A_file_that_could_not_be_read_has_no_row() => Assert.Equal([Header], Lines(new MeasuredFile("gone.csv", null, "gone.csv: no such file")));
}
