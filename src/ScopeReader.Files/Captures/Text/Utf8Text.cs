using System.IO.Compression;
using System.Text;

namespace ScopeReader.Files.Text;

/// <summary>A file's bytes as UTF-8 text, whatever they were: gzip, UTF-16, Latin-1, with a byte-order mark or without.</summary>
internal sealed class Utf8Text : IDisposable
{
    private const int SniffLength = 1 << 16;
    private const byte Gzip1 = 0x1F, Gzip2 = 0x8B;

    // Printed samples pack to a tenth at best, a table of one value to a hundredth.
    private const long MostExpansion = 200, LeastSuspect = 16 << 20;

    private readonly bool _isCompressed, _isUtf8;
    private readonly int _markLength;
    private readonly string _file;
    private readonly HashingStream _hashing;
    private readonly Stream _text;

    /// <param name="stream">The file's bytes; disposed with this.</param>
    /// <param name="file">Its name, for messages.</param>
    /// <param name="encoding">The encoding's name, where the person gave one.</param>
    /// <param name="progress">Who is told how far it is; null for nobody.</param>
    /// <exception cref="ImportException">Empty, binary, or an unknown encoding name.</exception>
    public Utf8Text(Stream stream, string file, string? encoding, IProgress<ImportProgress>? progress)
    {
        long size = stream.CanSeek ? stream.Length : 0;
        _hashing = new HashingStream(stream, progress);
        byte[] head = Sniff(_hashing);
        Stream bytes = new PrefixedStream(head, _hashing);
        string compressed = "";
        if (head.Length > 2 && head[0] == Gzip1 && head[1] == Gzip2)
        {
            bytes = new GZipStream(bytes, CompressionMode.Decompress);
            head = Sniff(bytes);
            bytes = new PrefixedStream(head, bytes);
            compressed = "gzip, ";
            size = 0;
            _isCompressed = true;
        }
        if (head.Length == 0)
            throw new ImportException(file, "expected a table of numbers, found an empty file. Save the capture again.");

        TextEncoding found = encoding is null ? TextEncoding.Of(head) : TextEncoding.Named(encoding)
            ?? throw new ImportException(file, $"expected an encoding of {string.Join(", ", TextEncoding.Names)}, found \"{Excerpt.Of(encoding)}\". Correct --encoding, or encoding under [import].");
        if (!found.IsWide && IsBinary(head))
            throw new ImportException(file, "expected a table of numbers as text, found binary data. Export the capture as CSV.");
        (_isUtf8, _markLength) = (found.Encoding is null, found.MarkLength(head));
        bytes.ReadExactly(new byte[_markLength]);
        _text = found.Encoding is { } other ? Encoding.CreateTranscodingStream(bytes, other, Encoding.UTF8) : bytes;
        ExpectedLength = found.IsWide ? size / 2 : size;
        _file = file;
        EncodingName = compressed + found.Name;
    }

    /// <summary>How the text was encoded.</summary>
    public string EncodingName { get; }

    /// <summary>How long the text may be in UTF-8, as far as the file's size tells; 0 where it doesn't.</summary>
    public long ExpectedLength { get; }

    /// <summary>How much was read.</summary>
    public long Position { get; private set; }

    /// <summary>Fills a place with text; less only at its end.</summary>
    /// <exception cref="ImportException">A compressed file unpacks to far more than any capture does.</exception>
    public int ReadAtLeast(Span<byte> into)
    {
        int count = _text.ReadAtLeast(into, into.Length, throwOnEndOfStream: false);
        Position += count;
        if (_isCompressed && Position > LeastSuspect && Position > MostExpansion * _hashing.Count)
            throw new ImportException(_file, FormattableString.Invariant($"expected a compressed file to unpack to at most {MostExpansion} times its size, found more. Unpack it and look at what it holds."));
        return count;
    }

    /// <summary>True where a compressed file holds less than its own last word says (RFC 1952, 2.3.1: ISIZE).</summary>
    public bool IsCut => _isCompressed && _hashing.LastWord is { } size && _isUtf8 && size != unchecked((uint)(Position + _markLength));

    /// <summary>SHA-256 of the file's bytes.</summary>
    public string Finish() => _hashing.Finish();

    public void Dispose()
    {
        _text.Dispose();
        _hashing.Dispose();
    }

    private static byte[] Sniff(Stream stream)
    {
        byte[] head = new byte[SniffLength];
        int count = stream.ReadAtLeast(head, head.Length, throwOnEndOfStream: false);
        return head[..count];
    }

    // Text has tabs and line ends and, in old exports, a form feed or an end-of-file mark; nothing else below the space.
    private static bool IsBinary(ReadOnlySpan<byte> head)
    {
        int controls = 0;
        foreach (byte b in head)
            if (b < 0x20 && b is not (9 or 10 or 12 or 13 or 26))
                controls++;
        return controls > 3 + head.Length / 100 || (controls > 0 && head.Contains((byte)0));
    }
}
