using ScopeReader.Archive;

namespace ScopeReader.Tests.Archive;

public sealed class AddTests : IDisposable
{
    private readonly Fixture _fixture = new();

    public void Dispose() => _fixture.Dispose();

    [Fact]
    public void The_original_bytes_and_every_statement_come_back_after_reopening()
    {
        NewEntry added = Fixture.Entry(7);
        using (MeasurementArchive archive = _fixture.Open())
            Assert.True(archive.Add(added).IsNew);

        using MeasurementArchive reopened = MeasurementArchive.OpenToRead(_fixture.File);
        Entry entry = reopened.Show(1);
        Assert.Equal(added.Bytes.ToArray(), reopened.Extract(1));
        Assert.Equal(added.Details.Subject, entry.Details.Subject);
        Assert.Equal(added.Details.Tags, entry.Details.Tags);
        Assert.Equal(added.Details.Conditions, entry.Details.Conditions);
        Assert.Equal(added.CapturedAt, entry.CapturedAt);
        Assert.Equal(added.Context.PlanText, entry.Measurement.Plan);
        var reading = added.Measurement.Channels[0].Readings[0];
        var kept = entry.Measurement.Channels[0].Readings[0];
        Assert.Equal((reading.Quantity.Id, reading.Value, reading.Unit, reading.Budget.ExpandedUncertainty, reading.Budget.Terms.Count),
            (kept.Quantity, kept.Value, kept.Unit, kept.ExpandedUncertainty, kept.Budget.Count));
        Assert.Equal(added.Measurement.Channels[0].Verdicts[0].Reason, entry.Measurement.Channels[0].Verdicts[0].Reason);
    }

    [Fact]
    public void The_same_capture_twice_is_recognised_and_nothing_is_written()
    {
        using MeasurementArchive archive = _fixture.Open();
        archive.Add(Fixture.Entry(1));
        string head = archive.Head;

        Added second = archive.Add(Fixture.Entry(1) with { File = "elsewhere/new2_final.csv" });

        Assert.Equal((1, false), (second.Entry, second.IsNew));
        Assert.Equal(head, archive.Head);
    }

    [Fact]
    public void The_same_capture_again_on_purpose_is_a_further_entry_of_bytes_kept_once()
    {
        using MeasurementArchive archive = _fixture.Open();
        archive.Add(Fixture.Entry(1));

        Added second = archive.Add(Fixture.Entry(1) with { Again = true });

        Assert.Equal((2, true), (second.Entry, second.IsNew));
        Assert.Equal((2, 1), (archive.Stats().Entries, archive.Stats().Captures));
        Assert.Equal(archive.Extract(1), archive.Extract(2));
    }

    [Fact]
    public void A_measurement_of_other_bytes_is_refused()
    {
        using MeasurementArchive archive = _fixture.Open();
        NewEntry wrong = Fixture.Entry(1) with { Bytes = Fixture.Entry(2).Bytes };

        Assert.StartsWith("board-000001.csv: the file changed after it was measured", Assert.Throws<ArgumentException>(() => archive.Add(wrong)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Folders_do_not_get_into_the_file_name()
    {
        using MeasurementArchive archive = _fixture.Open();
        archive.Add(Fixture.Entry(1) with { File = "../../somewhere/a b.csv" });
        Assert.Equal("a b.csv", archive.Show(1).File);
    }

    [Fact]
    public async Task Four_processes_adding_at_once_all_succeed()
    {
        const int Each = 25;
        var adders = Enumerable.Range(1, 4).Select(seed => ArchiveTrials.KillLoop.StartAdder(_fixture.File, Each, seed * 100)).ToArray();
        foreach (var adder in adders)
        {
            string[] lines = (await adder.StandardOutput.ReadToEndAsync()).Split('\n', StringSplitOptions.RemoveEmptyEntries);
            await adder.WaitForExitAsync();
            Assert.Equal((0, Each, ""), (adder.ExitCode, lines.Length, await adder.StandardError.ReadToEndAsync()));
            adder.Dispose();
        }

        using MeasurementArchive archive = MeasurementArchive.OpenToRead(_fixture.File);
        Assert.Equal(4 * Each, archive.Stats().Entries);
        Assert.Empty(archive.Verify().Damages);
    }

    [Fact]
    public void A_kill_at_any_moment_loses_nothing_that_was_acknowledged()
    {
        // A tenth of the trial in tools/; the same seed gives the same delays.
        var outcome = ArchiveTrials.KillLoop.Run(_fixture.File, 20, 7, TextWriter.Null);

        Assert.Equal((0, 0), (outcome.Lost, outcome.Damages));
        Assert.True(outcome.Kills >= 18, $"only {outcome.Kills} of 20 were running when they were killed");
        Assert.True(outcome.Acknowledged > 0);
    }
}
