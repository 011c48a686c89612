using ScopeReader.Captures;
using ScopeReader.Files.Rows;
using ScopeReader.Files.Structure;
using ScopeReader.Files.Text;

namespace ScopeReader.Files;

/// <summary>The way from a file's bytes to a <see cref="Capture"/>: find the block of numbers, read round it, read it, fit its axis.</summary>
public static class CaptureReader
{
    /// <summary>Reads a file; <c>-</c> is standard input.</summary>
    /// <param name="path">The file as the person named it.</param>
    /// <param name="settings">What the person says about it.</param>
    /// <param name="scale">Multiplies the values (the chain's scale); levels in dB shift by 20 log of it.</param>
    /// <param name="cancellation">Stops the work.</param>
    /// <exception cref="ImportException">The file is not there, cannot be read, or is no capture.</exception>
    /// <exception cref="OperationCanceledException">The work was stopped.</exception>
    public static CaptureFile Read(string path, ImportSettings settings, double scale = 1, CancellationToken cancellation = default)
    {
        ArgumentException.ThrowIfNullOrEmpty(path);
        if (path == "-")
            return Read(Console.OpenStandardInput(), "standard input", settings, scale, cancellation);
        try
        {
            return Read(new FileStream(path, FileMode.Open, FileAccess.Read, FileShare.ReadWrite | FileShare.Delete, 0, FileOptions.SequentialScan), path, settings, scale, cancellation);
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
    public static CaptureFile Read(Stream stream, string file, ImportSettings settings, double scale = 1, CancellationToken cancellation = default)
    {
        ArgumentNullException.ThrowIfNull(stream);
        ArgumentNullException.ThrowIfNull(settings);
        try
        {
            using var text = new Utf8Text(stream, file, settings.Encoding);
            return Read(text, file, settings, scale, cancellation);
        }
        catch (Exception e) when (e is IOException or InvalidDataException)
        {
            throw new ImportException(file, $"expected to read it to its end, found: {Excerpt.Of(e.Message, 120)} Save or copy it again.", cause: e);
        }
    }

    private static CaptureFile Read(Utf8Text text, string file, ImportSettings settings, double scale, CancellationToken cancellation)
    {
        var sequence = new TableSequence(new TextWindow(text, file), file, settings);
        var capture = new CaptureBuilder(file, settings, scale);
        Table? first = null;
        while (sequence.Next(cancellation) is { } table)
        {
            first ??= table;
            capture.Add(table);
            if (table.IsCut)
                capture.Doubts.Add("the last line breaks off: it was left out");
        }
        string hash = text.Finish();
        if (text.IsCut)
            capture.Doubts.Add("the compressed file breaks off: what could be unpacked of it was read");
        if (capture.Channels.Count == 0)
            throw new ImportException(file, FormattableString.Invariant($"expected a segment {settings.Segment}, found none of that number. Run inspect to see the segments."));
        return new CaptureFile(
            new Capture(file, hash, capture.Channels, capture.Doubts),
            new ImportReport
            {
                File = file,
                Encoding = text.EncodingName,
                Delimiter = NameOf(first!.Shape),
                DecimalMark = first.Shape.Mark.ToString(),
                PreambleLines = first.Header.FirstRow,
                HeaderRows = first.Header.Rows,
                FirstLine = first.FirstLine,
                Axis = capture.Axis!,
                Channels = capture.Reports,
                Doubts = capture.Doubts,
            });
    }

    private static string NameOf(TableShape shape) => shape switch
    {
        { Columns: [0] } when shape.Rows[shape.First].Length == 1 => "none",
        { Delimiter: ',' } => "comma",
        { Delimiter: ';' } => "semicolon",
        { Delimiter: '\t' } => "tab",
        { Delimiter: '|' } => "bar",
        { Delimiter: RowSplitter.Spaces } => "spaces",
        _ => shape.Delimiter.ToString(),
    };
}
