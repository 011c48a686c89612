using ScopeReader.Archive;
using ScopeReader.Archive.Search;

namespace ScopeReader.Tests.Archive.Search;

public sealed class FindTests : IDisposable
{
    private const int Count = 60;

    private readonly Fixture _fixture = new();
    private readonly MeasurementArchive _archive;
    private readonly NewEntry[] _entries = [.. Enumerable.Range(0, Count).Select(Fixture.Entry)];

    public FindTests()
    {
        _archive = _fixture.Open();
        _archive.Add(_entries);
    }

    public void Dispose()
    {
        _archive.Dispose();
        _fixture.Dispose();
    }

    [Theory]
    [InlineData("frequency-error > 20 ppm")]
    [InlineData("frequency-error >= 0.002 %")]
    [InlineData("frequency-error<-20ppm")]
    [InlineData("|frequency-error| > 70 ppm")]
    [InlineData("|frequency-error| <= 30 ppm")]
    [InlineData("rise-time < 1500 ms")]
    [InlineData("high-level > 1500 mV")]
    [InlineData("supply = 5 V")]
    [InlineData("supply > 5100 mV")]
    [InlineData("temperature <= 22 °C")]
    public void A_bound_finds_what_going_through_them_all_finds(string text)
    {
        Comparison where = Where(text);
        int[] expected = [.. Enumerable.Range(0, Count).Where(i => Holds(_entries[i], where)).Select(i => i + 1)];

        Found found = _archive.Find(new ArchiveQuery { Where = [where] });

        Assert.NotEmpty(expected);
        Assert.Equal(expected.Length, found.Matches);
        Assert.Equal(expected, found.Entries.Select(e => e.Number).Order());
        Assert.Empty(found.UnknownNames);
    }

    [Fact]
    public void Everything_stated_must_hold()
    {
        Found found = _archive.Find(new ArchiveQuery { Tags = ["SOLDERED", "series-a"], Where = [Where("supply > 4.6 V")], Since = _entries[20].CapturedAt, Until = _entries[50].CapturedAt });
        // Every tenth seed is soldered; its supply is 4.5 V and a tenth of a volt for each of (seed mod 11).
        Assert.Equal([41, 31, 21], found.Entries.Select(e => e.Number));
    }

    [Fact]
    public void The_latest_capture_comes_first_and_the_number_of_matches_is_told()
    {
        Found found = _archive.Find(new ArchiveQuery { Subject = "if SOURCE*", Limit = 3 });
        Assert.Equal([60, 59, 58], found.Entries.Select(e => e.Number));
        Assert.Equal(Count, found.Matches);
        FoundEntry first = found.Entries[0];
        Assert.Equal(_entries[59].Details.Conditions, first.Conditions);
        Assert.Equal(_entries[59].Measurement.Channels[0].Readings.Count, first.Readings.Count);
    }

    [Fact]
    public void Outcome_text_and_entries_restrict()
    {
        string outcome = _archive.Find(new ArchiveQuery { Entries = [5] }).Entries[0].Outcome;
        Assert.Contains(5, _archive.Find(new ArchiveQuery { Outcome = outcome }).Entries.Select(e => e.Number));
        Assert.Equal(18, Assert.Single(_archive.Find(new ArchiveQuery { Text = "board S000017" }).Entries).Number);
        Assert.Equal(10, _archive.Find(new ArchiveQuery { Text = "s00001*" }).Matches);
    }

    [Theory]
    [InlineData("x' OR 1=1 --")]
    [InlineData("%")]
    [InlineData("_F source, board 1")]
    [InlineData("\"; DROP TABLE record; --")]
    [InlineData("subject : board OR NOT board NEAR( * ^")]
    [InlineData("\0")]
    public void Inputs_cannot_change_the_question(string input)
    {
        Assert.Empty(_archive.Find(new ArchiveQuery { Subject = input }).Entries);
        Assert.Empty(_archive.Find(new ArchiveQuery { Serial = input + "*" }).Entries);
        Assert.Empty(_archive.Find(new ArchiveQuery { Tags = [input] }).Entries);
        Assert.Empty(_archive.Find(new ArchiveQuery { Outcome = input }).Entries);
        _archive.Find(new ArchiveQuery { Text = input });
        Assert.Equal(Count, _archive.Stats().Entries);
    }

    [Fact]
    public void A_name_that_nothing_has_is_told()
    {
        Found found = _archive.Find(new ArchiveQuery { Where = [Where("frequncy-error > 20 ppm")] });
        Assert.Equal("frequncy-error", Assert.Single(found.UnknownNames));
    }

    [Theory]
    [InlineData("frequency-error", "expected a comparison such as \"frequency-error > 20 ppm\", found \"frequency-error\"")]
    [InlineData("frequency-error > 20 Hz", "expected a value in ppm, such as 25 ppm, found \"20 Hz\"")]
    [InlineData("> 20 ppm", "expected a quantity or a condition before >, found \"> 20 ppm\"")]
    [InlineData("high-level > 3", "expected a unit after the number, such as 3.3 V, found \"3\"")]
    [InlineData("supply > five", "expected a number with its unit after >, such as 5 V, found \"five\"")]
    public void A_comparison_that_does_not_read_says_what_is_wrong(string text, string problem)
    {
        Assert.False(Comparison.TryParse(text, out _, out string said));
        Assert.Equal(problem, said);
    }

    private static Comparison Where(string text) => Comparison.TryParse(text, out Comparison? comparison, out string problem) ? comparison! : throw new ArgumentException(problem);

    // The plain way: every entry, every primary reading or condition.
    private static bool Holds(NewEntry entry, Comparison where)
    {
        IEnumerable<double> values = where.IsQuantity
            ? entry.Measurement.Channels.SelectMany(c => c.Readings).Where(r => r.IsPrimary && r.Quantity.Id == where.Name && r.Unit == where.Unit).Select(r => r.Value)
            : entry.Details.Conditions.Where(c => c.Key == where.Name && c.Value.Unit == where.Unit).Select(c => c.Value.Value);
        return values.Select(v => where.IsMagnitude ? Math.Abs(v) : v).Any(v => where.Operator switch
        {
            ">" => v > where.Value,
            ">=" => v >= where.Value,
            "<" => v < where.Value,
            "<=" => v <= where.Value,
            _ => v == where.Value,
        });
    }
}
