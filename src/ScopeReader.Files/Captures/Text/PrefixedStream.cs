namespace ScopeReader.Files.Text;

/// <summary>Gives bytes that were read ahead once more, then the rest of the stream.</summary>
internal sealed class PrefixedStream(ReadOnlyMemory<byte> prefix, Stream rest) : ForwardStream
{
    private ReadOnlyMemory<byte> _prefix = prefix;

    public override int Read(Span<byte> buffer)
    {
        if (_prefix.IsEmpty)
            return rest.Read(buffer);
        int count = Math.Min(buffer.Length, _prefix.Length);
        _prefix.Span[..count].CopyTo(buffer);
        _prefix = _prefix[count..];
        return count;
    }
}
