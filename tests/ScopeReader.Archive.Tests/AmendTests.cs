using ScopeReader.Archive;
using ScopeReader.Archive.Search;

namespace ScopeReader.Tests.Archive;

public sealed class AmendTests : IDisposable
{
    private readonly Fixture _fixture = new();

    public void Dispose() => _fixture.Dispose();

    [Fact]
    public void A_correction_stands_beside_what_it_corrects_with_who_when_and_why()
    {
        using MeasurementArchive archive = _fixture.Open();
        archive.Add(Fixture.Entry(3));
        string first = archive.Head;

        Entry entry = archive.Amend(1, [new("subject", null, "Board 9"), new("condition supply", null, "5.1 V"), new("condition temperature", null, null),
            new("tag", null, "checked"), new("tag", "breadboard", null), new("captured-at", null, "2024-02-29T10:00:00Z")], "A. Tester", "label was misread");

        Assert.Equal("Board 9", entry.Details.Subject);
        Assert.Equal(["checked"], entry.Details.Tags);
        Assert.Equal(new Dictionary<string, Condition> { ["supply"] = new(5.1, "V") }, entry.Details.Conditions);
        Assert.Equal(new DateTimeOffset(2024, 2, 29, 10, 0, 0, TimeSpan.Zero), entry.CapturedAt);
        Assert.Equal(first, entry.History[0].Hash);
        EntryEvent correction = entry.History[1];
        Assert.Equal(("amendment", "A. Tester", "label was misread"), (correction.Kind, correction.By, correction.Reason));
        Assert.Contains(new("subject", "IF source, board 4", "Board 9"), correction.Changes);
        Assert.Contains(new("condition supply", "4.8 V", "5.1 V"), correction.Changes);
    }

    [Fact]
    public void Searches_see_the_correction()
    {
        _fixture.Filled();
        using MeasurementArchive archive = MeasurementArchive.OpenToRead(_fixture.File);
        Assert.Equal(2, Assert.Single(archive.Find(new ArchiveQuery { Subject = "reference source" }).Entries).Number);
        Assert.Empty(archive.Find(new ArchiveQuery { Subject = "IF source, board 2" }).Entries);
    }

    [Fact]
    public void A_later_measurement_is_added_and_the_earlier_one_stays()
    {
        _fixture.Filled();
        using MeasurementArchive archive = MeasurementArchive.OpenToRead(_fixture.File);
        Entry entry = archive.Show(1);
        Assert.Equal("a later version", entry.Measurement.Program);
        Assert.Equal(["archive trials", "a later version"], entry.History.Select(h => h.Measurement!.Program));
    }

    [Theory]
    [InlineData("subject", "IF source, board 4", "entry 1 says so already; nothing was written")]
    [InlineData("colour", "red", "colour cannot become \"red\": expected one of subject, serial, operator, instrument, calibration-due, notes, captured-at, tag or a condition, found \"colour\"")]
    [InlineData("condition supply", "five", "condition supply cannot become \"five\": expected a number with its unit, such as 5 V, found \"five\"")]
    public void What_cannot_be_corrected_is_refused_and_nothing_is_written(string field, string to, string problem)
    {
        using MeasurementArchive archive = _fixture.Open();
        archive.Add(Fixture.Entry(3));
        string head = archive.Head;
        Assert.Equal($"{_fixture.File}: {problem}", Assert.Throws<ArchiveException>(() => archive.Amend(1, [new(field, null, to)], "x", "y")).Message);
        Assert.Equal(head, archive.Head);
    }

    [Fact]
    public void An_entry_that_is_not_there_is_named()
    {
        _fixture.Filled();
        using MeasurementArchive archive = _fixture.Open();
        Assert.Equal($"{_fixture.File}: there is no entry 77; archive find lists them",
            Assert.Throws<ArchiveException>(() => archive.Amend(77, [new("subject", null, "a")], "x", "y")).Message);
    }
}
