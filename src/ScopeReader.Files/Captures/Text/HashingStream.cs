using System.Security.Cryptography;

namespace ScopeReader.Files.Text;

/// <summary>Hashes the bytes as they are read, so that the hash is of what was parsed and not of a later state of the file.</summary>
internal sealed class HashingStream(Stream inner) : Stream
{
    private readonly IncrementalHash _hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);

    public override int Read(Span<byte> buffer)
    {
        int count = inner.Read(buffer);
        _hash.AppendData(buffer[..count]);
        return count;
    }

    public override int Read(byte[] buffer, int offset, int count) => Read(buffer.AsSpan(offset, count));

    /// <summary>Hash of everything, lower-case hexadecimal; what nobody has read yet is read here.</summary>
    public string Finish()
    {
        Span<byte> rest = stackalloc byte[4096];
        while (Read(rest) > 0)
        {
        }
        return Convert.ToHexStringLower(_hash.GetHashAndReset());
    }

    public override bool CanRead => true;

    public override bool CanSeek => false;

    public override bool CanWrite => false;

    public override long Length => throw new NotSupportedException();

    public override long Position { get => throw new NotSupportedException(); set => throw new NotSupportedException(); }

    public override void Flush()
    {
    }

    public override long Seek(long offset, SeekOrigin origin) => throw new NotSupportedException();

    public override void SetLength(long value) => throw new NotSupportedException();

    public override void Write(byte[] buffer, int offset, int count) => throw new NotSupportedException();

    protected override void Dispose(bool disposing)
    {
        if (disposing)
        {
            _hash.Dispose();
            inner.Dispose();
        }
        base.Dispose(disposing);
    }
}
