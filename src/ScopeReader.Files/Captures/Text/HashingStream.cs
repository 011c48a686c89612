using System.Buffers.Binary;
using System.Security.Cryptography;

namespace ScopeReader.Files.Text;

/// <summary>Hashes the bytes as they are read, so that the hash is of what was parsed and not of a later state of the file.</summary>
/// <remarks>Once a file proves long, the next block is read and hashed beside the parsing of this one.</remarks>
internal sealed class HashingStream(Stream inner, IProgress<ImportProgress>? progress) : ForwardStream
{
    private const int Block = 1 << 20, Long = 1 << 20;

    private readonly IncrementalHash _hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
    private readonly long? _size = inner.CanSeek ? inner.Length : null;
    private byte[] _ahead = [];
    private int _aheadStart, _aheadEnd;
    private Task<int>? _running;

    /// <summary>How many bytes were read.</summary>
    public long Count { get; private set; }

    /// <summary>The last four bytes read, lowest first; null where they are not known.</summary>
    public uint? LastWord { get; private set; }

    public override int Read(Span<byte> buffer)
    {
        int count = _running is null && _aheadStart == _aheadEnd ? ReadNow(buffer) : ReadAhead(buffer);
        Count += count;
        progress?.Report(new ImportProgress(Count, _size));
        // Whoever waits at a terminal or a pipe must not be waited for when the work is stopped.
        if (Count >= Long && inner.CanSeek && _running is null && _aheadStart == _aheadEnd && count > 0)
            Start();
        return count;
    }

    private int ReadNow(Span<byte> buffer)
    {
        int count = inner.Read(buffer);
        _hash.AppendData(buffer[..count]);
        if (count >= 4)
            LastWord = BinaryPrimitives.ReadUInt32LittleEndian(buffer[(count - 4)..count]);
        else if (count > 0)
            LastWord = null; // Cut across two blocks: not known.
        return count;
    }

    private int ReadAhead(Span<byte> buffer)
    {
        if (_running is { } running)
        {
            (_aheadStart, _aheadEnd) = (0, running.GetAwaiter().GetResult());
            _running = null;
        }
        int count = Math.Min(buffer.Length, _aheadEnd - _aheadStart);
        _ahead.AsSpan(_aheadStart, count).CopyTo(buffer);
        _aheadStart += count;
        return count;
    }

    private void Start()
    {
        if (_ahead.Length == 0)
            _ahead = GC.AllocateUninitializedArray<byte>(Block);
        _running = Task.Run(() => ReadNow(_ahead));
    }

    /// <summary>Hash of everything, lower-case hexadecimal; what nobody has read yet is read here.</summary>
    public string Finish()
    {
        Span<byte> rest = stackalloc byte[4096];
        while (Read(rest) > 0)
        {
        }
        return Convert.ToHexStringLower(_hash.GetHashAndReset());
    }

    protected override void Dispose(bool disposing)
    {
        if (disposing)
        {
            _running?.Wait();
            _hash.Dispose();
            inner.Dispose();
        }
        base.Dispose(disposing);
    }
}
