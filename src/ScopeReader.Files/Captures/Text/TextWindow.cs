namespace ScopeReader.Files.Text;

/// <summary>The part of the text that is being looked at: bytes are added at its end and let go of at its start.</summary>
internal sealed class TextWindow(Utf8Text text, string file)
{
    /// <summary>The longest line that is read, in bytes; a longer one is no row of a table.</summary>
    public const int LongestLine = 1 << 20;

    /// <summary>How many bytes behind what is pending may be looked at, whatever they are.</summary>
    public const int Slack = 16;

    // A short file needs little room; a long one is read in blocks that keep every core busy.
    private const int FirstBlock = 1 << 17, Block = 1 << 20;

    private byte[] _buffer = new byte[FirstBlock + Slack];
    private int _start, _end;
    private bool? _hasLoneReturns;

    /// <summary>The text that is there, from the first byte nobody has consumed.</summary>
    public ReadOnlySpan<byte> Pending => _buffer.AsSpan(_start, _end - _start);

    /// <summary>The same, to keep until the next call of <see cref="Fill"/>.</summary>
    public ReadOnlyMemory<byte> PendingMemory => _buffer.AsMemory(_start, _end - _start);

    /// <summary>Number of the line that <see cref="Pending"/> starts in, from 1.</summary>
    public long Line { get; private set; } = 1;

    /// <summary>True where nothing follows what is pending.</summary>
    public bool Ended { get; private set; }

    /// <summary>How many bytes of text may follow what was read so far, as far as the file's size tells.</summary>
    public long Remaining => Math.Max(0, text.ExpectedLength - text.Position) + _end - _start;

    /// <summary>Lets go of text.</summary>
    /// <param name="bytes">How much.</param>
    /// <param name="lines">How many lines end in it.</param>
    public void Consume(int bytes, long lines)
    {
        _start += bytes;
        Line += lines;
    }

    /// <summary>Adds text behind what is pending; false where there is none left.</summary>
    /// <exception cref="ImportException">What is pending is one line longer than any table's.</exception>
    public bool Fill()
    {
        if (Ended)
            return false;
        if (_start > 0)
        {
            Pending.CopyTo(_buffer);
            (_start, _end) = (0, _end - _start);
        }
        if (_end > LongestLine && Pending.Length - Pending.LastIndexOf((byte)'\n') - 1 > LongestLine)
            throw TooLong(Line + Pending.Count((byte)'\n'));
        int room = _buffer.Length - Slack - _end;
        if (room < _buffer.Length / 2 && (_buffer.Length < Block || room < Block / 4))
            Array.Resize(ref _buffer, Math.Max(2 * (_buffer.Length - Slack), 4 * FirstBlock) + Slack);
        int count = text.ReadAtLeast(_buffer.AsSpan(_end, _buffer.Length - Slack - _end));
        Ended = count == 0;
        Span<byte> added = _buffer.AsSpan(Math.Max(_start, _end - 1), count + Math.Min(1, _end - _start));
        if (_hasLoneReturns ??= HasLoneReturns(added))
            LoneReturnsToLineFeeds(added);
        _end += count;
        return count > 0;
    }

    /// <summary>Why a line is refused that is longer than any table's.</summary>
    /// <param name="line">Its number.</param>
    public ImportException TooLong(long line) =>
        new(file, FormattableString.Invariant($"expected lines of at most {LongestLine >> 20} MB, found a longer one. Export the capture as CSV with one sample of each channel a line."), line);

    private static bool HasLoneReturns(ReadOnlySpan<byte> text)
    {
        for (int at; (at = text.IndexOf((byte)'\r')) >= 0 && at + 1 < text.Length; text = text[(at + 2)..])
            if (text[at + 1] != '\n')
                return true;
        return text is [.., (byte)'\r'];
    }

    // Old exports end lines, or the header's lines, in a carriage return alone. One at the very end waits for what follows.
    private void LoneReturnsToLineFeeds(Span<byte> added)
    {
        for (int at; (at = added.IndexOf((byte)'\r')) >= 0; added = added[(at + 1)..])
        {
            if (at + 1 == added.Length && !Ended)
                return;
            if (at + 1 == added.Length || added[at + 1] != '\n')
                added[at] = (byte)'\n';
        }
    }
}
