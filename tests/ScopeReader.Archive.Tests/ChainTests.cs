using System.Security.Cryptography;
using System.Text;
using Microsoft.Data.Sqlite;
using ScopeReader.Archive;

namespace ScopeReader.Tests.Archive;

public sealed class ChainTests : IDisposable
{
    private readonly Fixture _fixture = new();

    public void Dispose() => _fixture.Dispose();

    [Fact]
    public void A_sound_archive_verifies_and_its_head_extends_a_head_kept_earlier()
    {
        string early = _fixture.Filled();
        using (MeasurementArchive archive = _fixture.Open())
            archive.Add(Fixture.Entry(50));
        string head;
        using (MeasurementArchive archive = MeasurementArchive.OpenToRead(_fixture.File))
            head = archive.Head;

        using MeasurementArchive reopened = MeasurementArchive.OpenToRead(_fixture.File);
        Verification now = reopened.Verify(head), then = reopened.Verify(early);
        Assert.Empty(now.Damages);
        Assert.Equal((8, 6, head), (now.Records, now.Captures, now.Head));
        Assert.Equal((8L, 7L), (now.KeptHeadIsRecord, then.KeptHeadIsRecord));
    }

    [Fact]
    public void The_hash_of_a_record_is_that_of_eight_lines()
    {
        // The definition that an export's README.txt gives, followed here by hand.
        NewEntry added = Fixture.Entry(1);
        using MeasurementArchive archive = MeasurementArchive.Open(_fixture.File);
        archive.Add(added);
        string folder = _fixture.In("export");
        archive.Export(folder);
        string[] cells = File.ReadAllLines(Path.Combine(folder, "chain.csv"))[1].Split(',');
        string content = Hex(SHA256.HashData(File.ReadAllBytes(Path.Combine(folder, "records", "00000001.json"))));
        string capture = Hex(SHA256.HashData(added.Bytes.Span));

        string expected = Hex(SHA256.HashData(Encoding.UTF8.GetBytes($"scopereader-archive-record 1\n1\nentry\n1\n{cells[3]}\n{capture}\n{content}\n{new string('0', 64)}\n")));

        Assert.Equal([capture, content, expected], cells[4..]);
        Assert.Equal(expected, archive.Head);
    }

    [Theory]
    [InlineData("UPDATE capture SET packed = replace(packed, substr(packed, 40, 1), X'00') WHERE id = 3", "capture 3 (entry 3, board-000002.csv)")]
    [InlineData("UPDATE record SET at = '2001-01-01T00:00:00.000Z' WHERE number = 4", "record 4 (entry 4)")]
    [InlineData("UPDATE record SET content = (SELECT content FROM record WHERE number = 2) WHERE number = 4", "record 4 (entry 4)")]
    [InlineData("DELETE FROM record WHERE number = 3", "record 3")]
    [InlineData("UPDATE entry SET subject = 'better board' WHERE number = 4", "entry 4")]
    [InlineData("UPDATE reading SET value = value / 2 WHERE entry = 5", "entry 5")]
    [InlineData("UPDATE condition SET unit = 'A' WHERE entry = 1", "entry 1")]
    [InlineData("UPDATE entry_text SET notes = 'something' WHERE rowid = 3", "entry 3")]
    public void What_was_changed_behind_the_programs_back_is_named(string sql, string where)
    {
        _fixture.Filled();
        Tamper(sql);

        using MeasurementArchive archive = MeasurementArchive.OpenToRead(_fixture.File);
        Assert.Contains(archive.Verify().Damages, d => d.Where == where);
    }

    [Fact]
    public void The_file_itself_refuses_to_change_what_is_kept_for_ever()
    {
        _fixture.Filled();
        foreach (string table in (string[])["record", "capture"])
        {
            Assert.Contains("never", Assert.Throws<SqliteException>(() => Run($"DELETE FROM {table}")).Message, StringComparison.Ordinal);
            Assert.Contains("never", Assert.Throws<SqliteException>(() => Run($"UPDATE {table} SET {(table == "record" ? "at = ''" : "length = 0")}")).Message, StringComparison.Ordinal);
        }
    }

    [Theory]
    [InlineData("SELECT packed FROM capture")]
    [InlineData("SELECT content FROM record")]
    public void One_byte_changed_in_anything_kept_is_found(string sql)
    {
        _fixture.Filled(8);
        byte[] sound = File.ReadAllBytes(_fixture.File);
        foreach (byte[] kept in Blobs(sql))
        {
            // The start of a blob lies in one piece. SQLite may have left a copy of it in space that it no longer uses.
            byte[] damaged = [.. sound];
            for (int at; (at = damaged.AsSpan().IndexOf(kept.AsSpan(0, 48))) >= 0;)
                damaged[at + 40] ^= 1;
            string path = _fixture.In(Guid.NewGuid().ToString("N"));
            File.WriteAllBytes(path, damaged);
            using MeasurementArchive archive = MeasurementArchive.OpenToRead(path);
            Assert.False(archive.Verify().IsSound);
        }
    }

    [Fact]
    public void A_chain_written_anew_verifies_by_itself_and_is_told_by_the_head_kept_elsewhere()
    {
        string head = _fixture.Filled();
        string forged = _fixture.In("forged.db");
        using (MeasurementArchive archive = MeasurementArchive.Open(forged))
            archive.Add([.. Enumerable.Range(100, 7).Select(Fixture.Entry)]);

        using MeasurementArchive opened = MeasurementArchive.OpenToRead(forged);
        Assert.True(opened.Verify().IsSound);
        Damage damage = Assert.Single(opened.Verify(head).Damages);
        Assert.Equal("the chain", damage.Where);
    }

    [Fact]
    public void A_head_that_is_no_hash_is_refused()
    {
        _fixture.Filled();
        using MeasurementArchive archive = MeasurementArchive.OpenToRead(_fixture.File);
        Assert.Contains("expected a head hash of 64 hexadecimal digits, found \"abc\"", Assert.Throws<ArchiveException>(() => archive.Verify("abc")).Message, StringComparison.Ordinal);
    }

    // As somebody with another program would, who has taken the guards away first.
    private void Tamper(string sql) => Run(
        $"DROP TRIGGER record_is_permanent; DROP TRIGGER record_stays; DROP TRIGGER capture_is_permanent; DROP TRIGGER capture_stays; {sql}");

    private void Run(string sql)
    {
        using var connection = new SqliteConnection($"Data Source={_fixture.File};Pooling=False;Foreign Keys=False");
        connection.Open();
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        command.ExecuteNonQuery();
    }

    private List<byte[]> Blobs(string sql)
    {
        using var connection = new SqliteConnection($"Data Source={_fixture.File};Pooling=False");
        connection.Open();
        using SqliteCommand command = connection.CreateCommand();
        command.CommandText = sql;
        using SqliteDataReader row = command.ExecuteReader();
        var blobs = new List<byte[]>();
        while (row.Read())
            blobs.Add(row.GetFieldValue<byte[]>(0));
        return blobs;
    }

    private static string Hex(byte[] hash) => Convert.ToHexStringLower(hash);
}
