using System.Diagnostics;
using System.Globalization;
using Microsoft.Data.Sqlite;

namespace ScopeReader.Archive.Storage;

/// <summary>Opens an archive's file: checks whose it is, brings its schema up to date, sets what makes it safe.</summary>
internal static class ArchiveFile
{
    /// <summary>"ScRd" as a number: what marks the file as an archive of this program.</summary>
    public const int ApplicationId = 0x53635264;

    private const int Busy = 5, Locked = 6, ReadOnly = 8, CannotOpen = 14;

    // Pages kept in memory, KiB: an index that a hundred entries write all over fits.
    private const int CacheSize = 64 * 1024;

    // Pages that the log may grow to, 40 MB, before they go into the archive: pages that every batch changes go there once for
    // many batches. What is in the log is on the disk like the rest.
    private const int LogPages = 10_000;

    private static readonly string[] Migrations = ["001-initial.sql", "002-reading-units.sql"];

    /// <summary>The schema's version that this program writes.</summary>
    public static int SchemaVersion => Migrations.Length;

    /// <summary>Opens to read and write, making the file where there is none.</summary>
    public static Database OpenToWrite(string path, TimeSpan patience)
    {
        Database database = Connect(Path.GetFullPath(path), SqliteOpenMode.ReadWriteCreate, patience);
        try
        {
            Check(database, path, allowEmpty: true);
            UseWriteAheadLog(database, patience);
            database.Run("PRAGMA synchronous = FULL");
            database.Run(string.Create(CultureInfo.InvariantCulture, $"PRAGMA cache_size = -{CacheSize}"));
            database.Value(string.Create(CultureInfo.InvariantCulture, $"PRAGMA wal_autocheckpoint = {LogPages}"));
            Migrate(database, path);
            return database;
        }
        catch
        {
            database.Dispose();
            throw;
        }
    }

    /// <summary>Opens to read; works in a read-only folder too where no unfinished log lies beside the file.</summary>
    public static Database OpenToRead(string path, TimeSpan patience)
    {
        Database database = OpenReadOnly(path, patience);
        long version = database.Number("PRAGMA user_version");
        if (version == SchemaVersion)
            return database;
        database.Dispose();
        try
        {
            // Its search tables get what is new; its records stay as they are.
            OpenToWrite(path, patience).Dispose();
        }
        catch (SqliteException fault) when (fault.SqliteErrorCode is ReadOnly or CannotOpen)
        {
            throw new ArchiveException(path, string.Create(CultureInfo.InvariantCulture,
                $"made by an older version of this program (schema {version} of {SchemaVersion}) and cannot be brought up to date here; copy it to where it can be written"), fault);
        }
        return OpenReadOnly(path, patience);
    }

    private static Database OpenReadOnly(string path, TimeSpan patience)
    {
        Database? database = null;
        try
        {
            database = Connect(Path.GetFullPath(path), SqliteOpenMode.ReadOnly, patience);
            Check(database, path, allowEmpty: false);
            return database;
        }
        catch (SqliteException fault) when (fault.SqliteErrorCode is CannotOpen or ReadOnly && LogIsEmpty(path))
        {
            database?.Dispose();
            // Reading a file with a write-ahead log needs a shared-memory file beside it. In a folder that cannot take one
            // nobody else can be writing either.
            database = Connect("file:" + Uri.EscapeDataString(Path.GetFullPath(path)).Replace("%2F", "/", StringComparison.Ordinal) + "?immutable=1", SqliteOpenMode.ReadOnly, patience);
            Check(database, path, allowEmpty: false);
            return database;
        }
        catch
        {
            database?.Dispose();
            throw;
        }
    }

    private static bool LogIsEmpty(string path) => !File.Exists(path + "-wal") || new FileInfo(path + "-wal").Length == 0;

    // A whole path: names such as :memory: would otherwise make an archive that ends with the process.
    private static Database Connect(string source, SqliteOpenMode mode, TimeSpan patience)
    {
        var database = new Database(new SqliteConnectionStringBuilder
        {
            DataSource = source,
            Mode = mode,
            ForeignKeys = mode == SqliteOpenMode.ReadWriteCreate,
            Pooling = false,
            DefaultTimeout = Math.Max(1, (int)patience.TotalSeconds),
        }.ToString());
        // SQLite's own waiting tries again within milliseconds; the library's, every 150 ms, starves among busy writers.
        database.Value(string.Create(CultureInfo.InvariantCulture, $"PRAGMA busy_timeout = {(int)patience.TotalMilliseconds}"));
        return database;
    }

    private static void Check(Database database, string path, bool allowEmpty)
    {
        long id = database.Number("PRAGMA application_id"), version = database.Number("PRAGMA user_version");
        if (allowEmpty && id == 0 && version == 0 && database.Number("SELECT count(*) FROM sqlite_schema") == 0)
            return;
        if (id != ApplicationId)
            throw new ArchiveException(path, "a database of another program, not an archive; nothing was written; give another path with --archive");
        if (version > SchemaVersion)
            throw new ArchiveException(path, string.Create(CultureInfo.InvariantCulture,
                $"made by a newer version of this program (schema {version}; this one knows {SchemaVersion}); nothing was written; use the newer version"));
    }

    // Changing the journal's kind does not wait for other openers by itself.
    private static void UseWriteAheadLog(Database database, TimeSpan patience)
    {
        var watch = Stopwatch.StartNew();
        while (true)
        {
            try
            {
                if (database.Value("PRAGMA journal_mode") as string != "wal")
                    database.Value("PRAGMA journal_mode = WAL");
                return;
            }
            catch (SqliteException fault) when (fault.SqliteErrorCode is Busy or Locked && watch.Elapsed < patience)
            {
                Thread.Sleep(5);
            }
        }
    }

    private static void Migrate(Database database, string path)
    {
        if (database.Number("PRAGMA user_version") == SchemaVersion)
            return;
        database.Write(() =>
        {
            // Another opener may have been quicker.
            Check(database, path, allowEmpty: true);
            for (long version = database.Number("PRAGMA user_version"); version < SchemaVersion; version++)
            {
                database.Run(Script(Migrations[version]));
                database.Run(string.Create(CultureInfo.InvariantCulture, $"PRAGMA user_version = {version + 1}"));
            }
            return database.Run(string.Create(CultureInfo.InvariantCulture, $"PRAGMA application_id = {ApplicationId}"));
        });
    }

    private static string Script(string name)
    {
        using Stream stream = typeof(ArchiveFile).Assembly.GetManifestResourceStream(name) ?? throw new InvalidOperationException($"{name} is not embedded");
        using var reader = new StreamReader(stream);
        return reader.ReadToEnd();
    }
}
