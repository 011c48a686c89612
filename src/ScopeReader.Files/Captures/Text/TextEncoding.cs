using System.Text;

namespace ScopeReader.Files.Text;

/// <summary>An encoding that exports come in.</summary>
/// <param name="Name">As shown to people.</param>
/// <param name="Encoding">What decodes it; null for UTF-8, which needs no decoding.</param>
internal sealed record TextEncoding(string Name, Encoding? Encoding)
{
    private static readonly TextEncoding Utf8 = new("UTF-8", null);
    private static readonly TextEncoding Utf16 = new("UTF-16 LE", new UnicodeEncoding(bigEndian: false, byteOrderMark: false));
    private static readonly TextEncoding Utf16BigEndian = new("UTF-16 BE", new UnicodeEncoding(bigEndian: true, byteOrderMark: false));
    private static readonly TextEncoding Latin1 = new("Latin-1", Encoding.Latin1);

    /// <summary>The names that a person may give, in their usual spelling.</summary>
    public static IReadOnlyList<string> Names { get; } = ["utf-8", "utf-16", "utf-16be", "latin-1"];

    /// <summary>True where a character takes two bytes.</summary>
    public bool IsWide => Encoding is UnicodeEncoding;

    /// <summary>The encoding that a person named; null where the name is not known.</summary>
    public static TextEncoding? Named(string name) => name.Trim().ToUpperInvariant().Replace("-", "", StringComparison.Ordinal).Replace(" ", "", StringComparison.Ordinal) switch
    {
        "UTF8" or "ASCII" => Utf8,
        "UTF16" or "UTF16LE" => Utf16,
        "UTF16BE" => Utf16BigEndian,
        "LATIN1" or "ISO88591" or "WINDOWS1252" or "CP1252" => Latin1,
        _ => null,
    };

    /// <summary>The encoding of a text whose first bytes are given.</summary>
    public static TextEncoding Of(ReadOnlySpan<byte> head)
    {
        if (head is [0xFF, 0xFE, ..])
            return Utf16;
        if (head is [0xFE, 0xFF, ..])
            return Utf16BigEndian;
        if (head.Length >= 4 && ZeroShare(head, 1) > 0.4 && ZeroShare(head, 0) < 0.05)
            return Utf16;
        if (head.Length >= 4 && ZeroShare(head, 0) > 0.4 && ZeroShare(head, 1) < 0.05)
            return Utf16BigEndian;
        return IsUtf8(head) ? Utf8 : Latin1;
    }

    /// <summary>Length of the byte-order mark at the start.</summary>
    public int MarkLength(ReadOnlySpan<byte> head) => this switch
    {
        { Encoding: null } when head is [0xEF, 0xBB, 0xBF, ..] => 3,
        { IsWide: true } when head is [0xFF, 0xFE, ..] or [0xFE, 0xFF, ..] => 2,
        _ => 0,
    };

    // A character may be cut at the end of what was read ahead: up to three bytes don't count.
    private static bool IsUtf8(ReadOnlySpan<byte> head)
    {
        for (int cut = 0; cut <= Math.Min(3, head.Length); cut++)
            if (System.Text.Unicode.Utf8.IsValid(head[..^cut]))
                return true;
        return false;
    }

    private static double ZeroShare(ReadOnlySpan<byte> head, int offset)
    {
        int zeros = 0, count = 0;
        for (int i = offset; i < head.Length; i += 2, count++)
            if (head[i] == 0)
                zeros++;
        return (double)zeros / count;
    }
}
