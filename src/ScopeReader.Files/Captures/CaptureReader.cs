using ScopeReader.Captures;
using ScopeReader.Files.Plans;

namespace ScopeReader.Files;

/// <summary>The way from a file's bytes to a <see cref="Capture"/>: find the block of numbers, read round it, read it, fit its axis.</summary>
public static class CaptureReader
{
    /// <summary>Reads a file; <c>-</c> is standard input.</summary>
    /// <param name="path">The file as the person named it.</param>
    /// <param name="settings">What the person says about it; where they say nothing, what its folder remembers counts.</param>
    /// <param name="scale">Multiplies the values (the chain's scale); levels in dB shift by 20 log of it.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <exception cref="ImportException">The file is not there, cannot be read, or is no capture.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public static CaptureFile Read(string path, ImportSettings settings, double scale = 1, CancellationToken cancellation = default) =>
        Read(path, settings, scale, null, cancellation);

    /// <summary>Reads a file and tells how far it is; <c>-</c> is standard input.</summary>
    /// <param name="path">The file as the person named it.</param>
    /// <param name="settings">What the person says about it; where they say nothing, what its folder remembers counts.</param>
    /// <param name="scale">Multiplies the values.</param>
    /// <param name="progress">Told of every few megabytes; from the thread that reads.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <exception cref="ImportException">The file is not there, cannot be read, or is no capture, or its folder's memory cannot be used.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public static CaptureFile Read(string path, ImportSettings settings, double scale, IProgress<ImportProgress>? progress, CancellationToken cancellation)
    {
        ArgumentException.ThrowIfNullOrEmpty(path);
        ArgumentNullException.ThrowIfNull(settings);
        var import = new ImportJob(path == "-" ? "standard input" : path, settings, scale) { Progress = progress, Cancellation = cancellation };
        if (path == "-")
            return import.Read(Console.OpenStandardInput());
        try
        {
            return (import with { Memory = FolderMemory.For(path) }).Read(new FileStream(path, FileMode.Open, FileAccess.Read, FileShare.ReadWrite | FileShare.Delete, 0, FileOptions.SequentialScan));
        }
        catch (Exception e) when (e is FileNotFoundException or DirectoryNotFoundException)
        {
            throw new ImportException(path, "expected a file, found none of that name. Check the name and the folder.", cause: e);
        }
        catch (UnauthorizedAccessException e)
        {
            throw new ImportException(path, Directory.Exists(path)
                ? "expected a file, found a folder. Name a file in it."
                : "expected a file that may be read, found one that may not. Check its permissions.", cause: e);
        }
    }

    /// <summary>Reads a stream to its end and closes it.</summary>
    /// <param name="stream">The file's bytes.</param>
    /// <param name="file">Its name, for messages and the capture.</param>
    /// <param name="settings">What the person says about it.</param>
    /// <param name="scale">Multiplies the values.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <exception cref="ImportException">The stream cannot be read or is no capture.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public static CaptureFile Read(Stream stream, string file, ImportSettings settings, double scale = 1, CancellationToken cancellation = default) =>
        Read(stream, file, settings, ImportTable.Empty, scale, cancellation);

    /// <summary>Reads a stream to its end and closes it, with what the folder remembers that its bytes come from.</summary>
    /// <param name="stream">The file's bytes.</param>
    /// <param name="file">Its name, for messages and the capture.</param>
    /// <param name="settings">What the person says about it.</param>
    /// <param name="memory">What counts where they say nothing.</param>
    /// <param name="scale">Multiplies the values.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <exception cref="ImportException">The stream cannot be read or is no capture.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public static CaptureFile Read(Stream stream, string file, ImportSettings settings, ImportTable memory, double scale, CancellationToken cancellation)
    {
        ArgumentNullException.ThrowIfNull(stream);
        ArgumentNullException.ThrowIfNull(settings);
        ArgumentNullException.ThrowIfNull(memory);
        return new ImportJob(file, settings, scale) { Memory = memory, Cancellation = cancellation }.Read(stream);
    }
}
