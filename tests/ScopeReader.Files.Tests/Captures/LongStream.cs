namespace ScopeReader.Tests.Captures;

/// <summary>A long text without the memory for it: a head, then the same again and again.</summary>
internal sealed class LongStream(byte[] head, byte[] again, long length) : Stream
{
    private long _at;

    public override bool CanRead => true;

    public override bool CanSeek => false;

    public override bool CanWrite => false;

    public override long Length => throw new NotSupportedException();

    public override long Position { get => throw new NotSupportedException(); set => throw new NotSupportedException(); }

    public override int Read(byte[] buffer, int offset, int count)
    {
        int read = (int)Math.Min(count, length - _at);
        for (int i = 0; i < read; i++, _at++)
            buffer[offset + i] = _at < head.Length ? head[_at] : again[(_at - head.Length) % again.Length];
        return read;
    }

    public override void Flush()
    {
    }

    public override long Seek(long offset, SeekOrigin origin) => throw new NotSupportedException();

    public override void SetLength(long value) => throw new NotSupportedException();

    public override void Write(byte[] buffer, int offset, int count) => throw new NotSupportedException();
}
