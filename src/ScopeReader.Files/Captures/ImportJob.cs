using ScopeReader.Captures;
using ScopeReader.Files.Plans;
using ScopeReader.Files.Rows;
using ScopeReader.Files.Structure;
using ScopeReader.Files.Text;

namespace ScopeReader.Files;

/// <summary>One reading of one file, with everything that it depends on.</summary>
/// <param name="File">The file's name, for messages and the capture.</param>
/// <param name="Said">What the person says about it.</param>
/// <param name="Scale">Multiplies the values.</param>
internal sealed record ImportJob(string File, ImportSettings Said, double Scale)
{
    /// <summary>What the file's folder remembers.</summary>
    public ImportTable Memory { get; init; } = ImportTable.Empty;

    /// <summary>Who is told how far it is.</summary>
    public IProgress<ImportProgress>? Progress { get; init; }

    /// <summary>Stops the work.</summary>
    public CancellationToken Cancellation { get; init; }

    /// <summary>Reads a stream to its end and closes it.</summary>
    public CaptureFile Read(Stream stream)
    {
        try
        {
            using var text = new Utf8Text(stream, File, Said.Or(Memory.Settings).Encoding, Progress);
            return Read(text);
        }
        catch (Exception e) when (e is IOException or InvalidDataException)
        {
            throw new ImportException(File, $"expected to read it to its end, found: {Excerpt.Of(e.Message, 120)} Save or copy it again.", cause: e);
        }
    }

    private CaptureFile Read(Utf8Text text)
    {
        ImportSettings settings = Said.Or(Memory.Settings);
        var sequence = new TableSequence(new TextWindow(text, File), File, settings);
        var capture = new CaptureBuilder(File, settings, Scale);
        // Only what nobody said louder was used.
        string[] remembered = [.. Memory.Entries.Where(e => !Says(Said, e.Key)).Select(e => Excerpt.Of(e.ToString(), 80))];
        if (remembered.Length > 0)
            capture.Doubts.Add($"read as {FolderMemory.FileName} in its folder says: {string.Join("; ", remembered)}");
        Table? first = null;
        while (sequence.Next(Cancellation) is { } table)
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
            throw new ImportException(File, FormattableString.Invariant($"expected a segment {settings.Segment}, found none of that number. Run inspect to see the segments."));
        return new CaptureFile(
            new Capture(File, hash, capture.Channels, capture.Doubts),
            new ImportReport
            {
                File = File,
                Encoding = text.EncodingName,
                Delimiter = NameOf(first!.Shape),
                DecimalMark = first.Shape.Mark.ToString(),
                PreambleLines = first.Header.FirstRow,
                HeaderRows = first.Header.Rows,
                FirstLine = first.FirstLine,
                Axis = capture.Axis!,
                Channels = capture.Reports,
                Remembered = remembered,
                Doubts = capture.Doubts,
            });
    }

    private static bool Says(ImportSettings said, string key) => key switch
    {
        "delimiter" => said.Delimiter is not null,
        "decimal" => said.DecimalMark is not null,
        "first-line" => said.FirstLine is not null,
        "encoding" => said.Encoding is not null,
        "interval" or "rate" => said.Interval is not null,
        "columns" => said.Columns is not null,
        "units" => said.Units is not null,
        "segment" => said.Segment is not null,
        "factor" => said.Factor is not null,
        _ => false,
    };

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
