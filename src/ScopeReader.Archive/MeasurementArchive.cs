using Microsoft.Data.Sqlite;
using ScopeReader.Archive.Storage;

namespace ScopeReader.Archive;

/// <summary>The archive: captures, readings, verdicts and their history in one file.</summary>
/// <remarks>
/// <para>An SQLite file with a write-ahead log, every commit on the disk before it is acknowledged. What is kept for ever is
/// a ledger of records, each chained to the one before by hash, and the captures' bytes; the tables that searches use are
/// made from it.</para>
/// <para>Not for several threads at once; several processes may have the same archive open.</para>
/// </remarks>
public sealed partial class MeasurementArchive : IDisposable
{
    private static readonly TimeSpan DefaultPatience = TimeSpan.FromSeconds(20);

    private readonly Database _database;
    private readonly Ledger _ledger;
    private readonly SearchTables _tables;
    private readonly TimeProvider _clock;

    private MeasurementArchive(string path, Database database, TimeProvider? clock)
    {
        (Path, _database, _clock) = (path, database, clock ?? TimeProvider.System);
        (_ledger, _tables) = (new Ledger(database), new SearchTables(database));
    }

    /// <summary>Where archives are kept unless the person says otherwise: the user's data folder (XDG_DATA_HOME).</summary>
    public static string DefaultPath => System.IO.Path.Combine(
        Environment.GetFolderPath(Environment.SpecialFolder.LocalApplicationData, Environment.SpecialFolderOption.DoNotVerify), "scopereader", "archive.db");

    /// <summary>The archive's path as it was given.</summary>
    public string Path { get; }

    internal Database Database => _database;

    /// <summary>Opens an archive to read and write; makes it where there is none.</summary>
    /// <param name="path">The file.</param>
    /// <param name="patience">How long to wait for another program; 20 s by default.</param>
    /// <param name="clock">What time records get; the system's by default.</param>
    /// <exception cref="ArchiveException">It cannot be opened, or is no archive of this version or an older one.</exception>
    public static MeasurementArchive Open(string path, TimeSpan? patience = null, TimeProvider? clock = null)
    {
        ArgumentException.ThrowIfNullOrEmpty(path);
        return Guard(path, () =>
        {
            if (path == DefaultPath)
                Directory.CreateDirectory(System.IO.Path.GetDirectoryName(path)!);
            return new MeasurementArchive(path, ArchiveFile.OpenToWrite(path, patience ?? DefaultPatience), clock);
        });
    }

    /// <summary>Opens an archive to read.</summary>
    /// <param name="path">The file.</param>
    /// <param name="patience">How long to wait for another program; 20 s by default.</param>
    /// <exception cref="ArchiveException">There is none, or it cannot be read.</exception>
    public static MeasurementArchive OpenToRead(string path, TimeSpan? patience = null)
    {
        ArgumentException.ThrowIfNullOrEmpty(path);
        if (!File.Exists(path))
            throw new ArchiveException(path, "there is no archive here; archive add makes one, --archive names another");
        return Guard(path, () => new MeasurementArchive(path, ArchiveFile.OpenToRead(path, patience ?? DefaultPatience), null));
    }

    /// <summary>Hash of the last record: kept elsewhere, it proves later that nothing before it was changed.</summary>
    public string Head => Guard(() => _ledger.Head().Hash);

    /// <inheritdoc/>
    public void Dispose() => _database.Dispose();

    private T Guard<T>(Func<T> work)
    {
        try
        {
            return Guard(Path, work);
        }
        catch
        {
            _tables.Forget();
            throw;
        }
    }

    private static T Guard<T>(string path, Func<T> work)
    {
        try
        {
            return GuardFiles(path, work);
        }
        catch (SqliteException fault)
        {
            throw ArchiveException.From(fault, path);
        }
    }

    // Faults of files beside the archive: an export's folder.
    private static T GuardFiles<T>(string path, Func<T> work)
    {
        try
        {
            return work();
        }
        catch (Exception fault) when (fault is IOException or UnauthorizedAccessException)
        {
            throw new ArchiveException(path, fault.Message, fault);
        }
    }
}
