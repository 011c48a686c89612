namespace ScopeReader.Files.Text;

/// <summary>The part of the text that is being looked at: bytes are added at its end and let go of at its start.</summary>
internal sealed class TextWindow(Utf8Text text, string file)
{
    /// <summary>The longest line that is read, in bytes; a longer one is no row of a table.</summary>
    public const int LongestLine = 16 << 20;

    private const int Block = 1 << 20;

    private byte[] _buffer = new byte[Block + Block / 4];
    private int _start, _end;

    /// <summary>The text that is there, from the first byte nobody has consumed.</summary>
    public ReadOnlySpan<byte> Pending => _buffer.AsSpan(_start, _end - _start);

    /// <summary>The same, to keep until the next call of <see cref="Fill"/>.</summary>
    public ReadOnlyMemory<byte> PendingMemory => _buffer.AsMemory(_start, _end - _start);

    /// <summary>Number of the line that <see cref="Pending"/> starts in, from 1.</summary>
    public long Line { get; private set; } = 1;

    /// <summary>True where nothing follows what is pending.</summary>
    public bool Ended { get; private set; }

    /// <summary>Lets go of text.</summary>
    /// <param name="bytes">How much.</param>
    /// <param name="lines">How many lines end in it.</param>
    public void Consume(int bytes, long lines)
    {
        _start += bytes;
        Line += lines;
    }

    /// <summary>Adds a block of text behind what is pending; false where there is none left.</summary>
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
        if (_buffer.Length - _end < Block / 4)
        {
            if (_buffer.Length > LongestLine)
                throw new ImportException(file, FormattableString.Invariant($"expected lines of at most {LongestLine >> 20} MB, found a longer one. Export the capture as CSV with one sample a line."), Line);
            Array.Resize(ref _buffer, 2 * _buffer.Length);
        }
        int count = text.Read(_buffer.AsSpan(_end));
        Ended = count == 0;
        LoneReturnsToLineFeeds(_buffer.AsSpan(Math.Max(_start, _end - 1), count + Math.Min(1, _end - _start)));
        _end += count;
        return count > 0;
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
