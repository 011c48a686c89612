using ScopeReader.Archive;
using ScopeReader.Archive.Exchange;

namespace ScopeReader.Tests.Archive.Exchange;

public sealed class ExportTests : IDisposable
{
    private readonly Fixture _fixture = new();

    public void Dispose() => _fixture.Dispose();

    [Fact]
    public void An_archive_made_of_an_export_has_the_same_head_and_the_same_entries()
    {
        string head = _fixture.Filled(), folder = _fixture.In("export"), copy = _fixture.In("copy.db");
        using (MeasurementArchive archive = MeasurementArchive.OpenToRead(_fixture.File))
            Assert.Equal(head, archive.Export(folder));

        Assert.Equal(head, MeasurementArchive.Import(folder, copy));

        using MeasurementArchive first = MeasurementArchive.OpenToRead(_fixture.File), second = MeasurementArchive.OpenToRead(copy);
        Assert.True(second.Verify(head).IsSound);
        for (int entry = 1; entry <= 5; entry++)
        {
            Assert.Equal(first.Extract(entry), second.Extract(entry));
            Assert.Equal(first.Show(entry).History.Select(h => h.Hash), second.Show(entry).History.Select(h => h.Hash));
        }
    }

    [Theory]
    [InlineData("chain.csv", "line ")]
    [InlineData("records/00000003.json", "line 4: records/00000003.json does not have the hash that this line states")]
    [InlineData("captures", "do not have the hash that names them")]
    public void A_changed_export_makes_no_archive(string name, string problem)
    {
        string folder = _fixture.In("export"), copy = _fixture.In("copy.db");
        _fixture.Filled();
        using (MeasurementArchive archive = MeasurementArchive.OpenToRead(_fixture.File))
            archive.Export(folder);
        string path = Path.Combine(folder, name);
        if (Directory.Exists(path))
            path = Directory.EnumerateFiles(path).Order().First();
        byte[] bytes = File.ReadAllBytes(path);
        bytes[bytes.Length / 2] ^= 1;
        File.WriteAllBytes(path, bytes);

        ArchiveException refused = Assert.Throws<ArchiveException>(() => MeasurementArchive.Import(folder, copy));

        Assert.Contains(problem, refused.Message, StringComparison.Ordinal);
        Assert.EndsWith("the export was changed or is incomplete; no archive was made", refused.Message, StringComparison.Ordinal);
        Assert.Empty(Directory.EnumerateFiles(_fixture.Folder, "copy.db*"));
    }

    [Fact]
    public void Nothing_is_overwritten()
    {
        _fixture.Filled();
        string folder = _fixture.In("export");
        using MeasurementArchive archive = MeasurementArchive.OpenToRead(_fixture.File);
        archive.Export(folder);
        Assert.Contains("is not empty", Assert.Throws<ArchiveException>(() => archive.Export(folder)).Message, StringComparison.Ordinal);
        Assert.Contains("exists already", Assert.Throws<ArchiveException>(() => MeasurementArchive.Import(folder, _fixture.File)).Message, StringComparison.Ordinal);
        Assert.Contains("exists already", Assert.Throws<ArchiveException>(() => archive.Backup(_fixture.File)).Message, StringComparison.Ordinal);
        Assert.Contains("not a complete export", Assert.Throws<ArchiveException>(() => MeasurementArchive.Import(_fixture.Folder, _fixture.In("new.db"))).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_backup_taken_while_another_adds_is_a_sound_archive()
    {
        string head = _fixture.Filled();
        using MeasurementArchive writing = _fixture.Open();
        using (MeasurementArchive reading = MeasurementArchive.OpenToRead(_fixture.File))
            Assert.Equal(head, reading.Backup(_fixture.In("backup.db")));
        writing.Add(Fixture.Entry(70));

        using MeasurementArchive backup = MeasurementArchive.OpenToRead(_fixture.In("backup.db"));
        Assert.True(backup.Verify(head).IsSound);
        Assert.Equal(5, backup.Stats().Entries);
    }

    [Theory]
    [InlineData("=1+1", "'=1+1")]
    [InlineData(" +1", " '+1")]
    [InlineData("@a", "'@a")]
    [InlineData("\t-a", "\t'-a")]
    [InlineData("\uFF1Dcmd", "'\uFF1Dcmd")]
    [InlineData("a;=b", "a;'=b")]
    [InlineData("a\"=b", "a\"'=b")]
    [InlineData("a\n=b", "a\n'=b")]
    [InlineData("a|\"=b", "a|\"'=b")]
    [InlineData("a-b=c", "a-b=c")]
    [InlineData("50 ohm", "50 ohm")]
    public void No_text_can_begin_a_formula_where_a_cell_could_begin(string text, string safe) =>
        Assert.Equal(safe, SpreadsheetCsv.Safe(text));

    [Fact]
    public void A_hostile_entry_is_harmless_in_every_table_of_an_export()
    {
        const string Hostile = "=HYPERLINK(\"http://x\");+cmd|' /C calc'!A0\n@SUM(1)";
        using MeasurementArchive archive = _fixture.Open();
        NewEntry entry = Fixture.Entry(1);
        archive.Add(entry with { File = "-x=.csv", Details = entry.Details with { Subject = Hostile, Notes = Hostile, Tags = [Hostile] } });
        archive.Export(_fixture.In("export"));

        foreach (string table in (string[])["entries.csv", "readings.csv", "chain.csv"])
            foreach (string cell in File.ReadAllText(Path.Combine(_fixture.In("export"), table)).Split([',', ';', '\t', '|', '\n', '"']))
                // A number may be negative; nothing else may start as a formula does.
                Assert.True(cell.Trim().Length == 0 || !"=+@-".Contains(cell.Trim()[0], StringComparison.Ordinal) || double.TryParse(cell, out _), cell);
    }
}
