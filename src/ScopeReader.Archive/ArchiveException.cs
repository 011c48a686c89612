using Microsoft.Data.Sqlite;

namespace ScopeReader.Archive;

/// <summary>The archive cannot be used as asked; nothing that it had acknowledged is lost.</summary>
public sealed class ArchiveException : Exception
{
    private const int Busy = 5, Locked = 6, ReadOnly = 8, InputOutput = 10, Corrupt = 11, Full = 13, CannotOpen = 14, TooBig = 18, NotADatabase = 26;
    private const string FullDisk = "the disk is full; nothing of this was written and what was acknowledged is kept; make room and try again";

    // Less than the files beside the archive grow by at a time.
    private const long LittleRoom = 64 * 1024;

    /// <param name="path">The archive's path.</param>
    /// <param name="problem">What is wrong and what to do, without the path.</param>
    /// <param name="inner">What it comes from.</param>
    public ArchiveException(string path, string problem, Exception? inner = null) : base($"{path}: {problem}", inner) => Path = path;

    /// <summary>The archive's path.</summary>
    public string Path { get; }

    internal static ArchiveException From(SqliteException fault, string path) => new(path, fault.SqliteErrorCode switch
    {
        Busy or Locked => "another program holds the archive; nothing was written; close that program or try again",
        ReadOnly => "the archive or its folder is read-only; nothing was written; make it writable or copy it elsewhere",
        InputOutput when HasNoRoom(path) => FullDisk,
        InputOutput => "the disk reported a fault while the archive was read or written; what was acknowledged is kept; check the disk, then run archive verify",
        Corrupt => "the file is damaged; nothing was written; run archive verify to see what, and go back to a backup or an export",
        Full => FullDisk,
        CannotOpen => "cannot be opened or made; check that the folder exists and that you may write to it",
        TooBig => "the capture is too large for one entry (1,000,000,000 bytes after packing)",
        NotADatabase => "not an archive of this program, or its first bytes are damaged; nothing was written",
        _ => $"the archive could not be used: {fault.Message}",
    }, fault);

    // Some of the files beside the archive answer a full disk as if it were broken.
    private static bool HasNoRoom(string path)
    {
        try
        {
            return new DriveInfo(System.IO.Path.GetDirectoryName(System.IO.Path.GetFullPath(path))!).AvailableFreeSpace < LittleRoom;
        }
        catch (Exception fault) when (fault is IOException or UnauthorizedAccessException or ArgumentException)
        {
            // Not to be told: then it is the fault that was reported.
            return false;
        }
    }
}
