using Microsoft.Data.Sqlite;
using ScopeReader.Archive;

namespace ScopeReader.Tests.Archive;

public sealed class FaultTests : IDisposable
{
    private readonly Fixture _fixture = new();

    public void Dispose() => _fixture.Dispose();

    [Fact]
    public void A_missing_archive_says_what_makes_one() =>
        Assert.Equal($"{_fixture.File}: there is no archive here; archive add makes one, --archive names another",
            Assert.Throws<ArchiveException>(() => MeasurementArchive.OpenToRead(_fixture.File)).Message);

    [Fact]
    public void A_file_that_is_no_database_is_left_alone()
    {
        File.WriteAllText(_fixture.File, new string('x', 5000));
        Assert.Equal($"{_fixture.File}: not an archive of this program, or its first bytes are damaged; nothing was written",
            Assert.Throws<ArchiveException>(_fixture.Open).Message);
        Assert.Equal(new string('x', 5000), File.ReadAllText(_fixture.File));
    }

    [Fact]
    public void A_database_of_another_program_is_left_alone()
    {
        Run("CREATE TABLE theirs (a); INSERT INTO theirs VALUES (1)");
        byte[] before = File.ReadAllBytes(_fixture.File);
        Assert.Equal($"{_fixture.File}: a database of another program, not an archive; nothing was written; give another path with --archive",
            Assert.Throws<ArchiveException>(_fixture.Open).Message);
        Assert.Equal(before, File.ReadAllBytes(_fixture.File));
    }

    [Fact]
    public void An_archive_of_a_newer_version_is_left_alone()
    {
        _fixture.Filled();
        Run("PRAGMA user_version = 99");
        Assert.Equal($"{_fixture.File}: made by a newer version of this program (schema 99; this one knows 2); nothing was written; use the newer version",
            Assert.Throws<ArchiveException>(_fixture.Open).Message);
        Assert.Throws<ArchiveException>(() => MeasurementArchive.OpenToRead(_fixture.File));
    }

    [Fact]
    public void A_locked_archive_is_waited_for_and_then_named()
    {
        _fixture.Filled();
        using var other = new SqliteConnection($"Data Source={_fixture.File};Pooling=False");
        other.Open();
        using SqliteTransaction holds = other.BeginTransaction(deferred: false);
        using MeasurementArchive archive = MeasurementArchive.Open(_fixture.File, TimeSpan.FromSeconds(1));

        Assert.Equal($"{_fixture.File}: another program holds the archive; nothing was written; close that program or try again",
            Assert.Throws<ArchiveException>(() => archive.Add(Fixture.Entry(90))).Message);
        holds.Rollback();
        Assert.True(archive.Add(Fixture.Entry(90)).IsNew);
    }

    [Fact]
    public void A_full_disk_loses_nothing_that_was_acknowledged()
    {
        using MeasurementArchive archive = _fixture.Open();
        archive.Add(Fixture.Entry(1));
        // SQLite's own ceiling on the file raises the error that a full disk raises (SQLITE_FULL).
        archive.Database.Value($"PRAGMA max_page_count = {archive.Database.Number("PRAGMA page_count") + 2}");

        ArchiveException full = Assert.Throws<ArchiveException>(() => archive.Add([.. Enumerable.Range(2, 50).Select(Fixture.Entry)]));

        Assert.Equal($"{_fixture.File}: the disk is full; nothing of this was written and what was acknowledged is kept; make room and try again", full.Message);
        Assert.Equal(1, archive.Stats().Entries);
        archive.Database.Value("PRAGMA max_page_count = 1000000");
        Assert.True(archive.Add(Fixture.Entry(2)).IsNew);
        Assert.True(archive.Verify().IsSound);
    }

    [Fact]
    public void A_folder_that_takes_no_files_is_named()
    {
        // Nobody, not even root, makes files in /proc.
        if (!Directory.Exists("/proc/self"))
            return;
        Assert.Equal("/proc/archive.db: cannot be opened or made; check that the folder exists and that you may write to it",
            Assert.Throws<ArchiveException>(() => MeasurementArchive.Open("/proc/archive.db")).Message);
    }

    [Fact]
    public void A_damaged_page_is_one_clear_error()
    {
        _fixture.Filled(20);
        using (FileStream file = File.OpenWrite(_fixture.File))
            for (long page = 1; page < file.Length / 4096; page++)
            {
                file.Position = page * 4096;
                file.Write(new byte[64]);
            }
        using MeasurementArchive archive = MeasurementArchive.OpenToRead(_fixture.File);
        Assert.Equal($"{_fixture.File}: the file is damaged; nothing was written; run archive verify to see what, and go back to a backup or an export",
            Assert.Throws<ArchiveException>(() => archive.Show(1)).Message);
        Assert.False(archive.Verify().IsSound);
    }

    private void Run(string sql)
    {
        using var connection = new SqliteConnection($"Data Source={_fixture.File};Pooling=False");
        connection.Open();
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        command.ExecuteNonQuery();
    }

    [Fact]
    public void A_name_that_the_database_keeps_for_its_memory_is_a_file_like_any_other()
    {
        string before = Directory.GetCurrentDirectory();
        try
        {
            using (MeasurementArchive.Open(":memory:"))
                Assert.True(File.Exists(Path.Combine(before, ":memory:")));
        }
        finally
        {
            foreach (string left in Directory.GetFiles(before, ":memory:*"))
                File.Delete(left);
        }
    }
}
