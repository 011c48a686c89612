using ScopeReader.Bench.Work;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Tests.Bench.Work;

public class WordsTests
{
    [Theory]
    [InlineData(-50.0, 50.0, "−50 … 50 ppm")]
    [InlineData(null, 12.5, "≤ 12.5 ppm")]
    [InlineData(-100.0, null, "≥ −100 ppm")]
    public void A_limit_reads_as_a_person_would_write_it(double? low, double? high, string phrase) =>
        Assert.Equal(phrase, Words.Of(new Limit(Quantities.FrequencyError, low, high)));

    [Fact]
    public void Ends_of_a_limit_with_different_prefixes_keep_both_units() =>
        Assert.Equal("500 ns … 1.2 µs", Words.Of(new Limit(Quantities.Period, 500e-9, 1.2e-6)));

    [Fact]
    public void What_was_judged_comes_first_and_no_reading_twice()
    {
        OpenCapture capture = Made.Measured("a.csv", Made.Ringing());
        IReadOnlyList<ReadingRow> rows = ReadingRow.Of(capture.ChannelMeasured);
        Assert.Equal(["frequency-error", "rise-overshoot"], rows.Take(2).Select(r => r.Quantity.Id));
        Assert.Equal(capture.ChannelMeasured!.Readings.Count, rows.Count);
        Assert.Equal(rows.Count, rows.Select(r => r.Reading).Distinct().Count());
    }

    [Fact]
    public void A_limit_without_a_reading_still_has_its_line_and_reason()
    {
        var verdict = new Verdict(new Limit(Quantities.FallTime, null, 1e-6), VerdictOutcome.NotMeasured, null, null, "no falling edge");
        var row = new ReadingRow(Quantities.FallTime, null, verdict);
        Assert.Equal("no reading: no falling edge", row.Reason());
    }
}
