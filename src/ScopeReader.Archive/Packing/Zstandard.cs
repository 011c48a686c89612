using ZstdSharp;

namespace ScopeReader.Archive.Packing;

/// <summary>One compressor and one decompressor a thread: their tables cost more to make than a small capture to pack.</summary>
internal static class Zstandard
{
    private const int Level = 3;

    [ThreadStatic]
    private static Compressor? _compressor;

    [ThreadStatic]
    private static Decompressor? _decompressor;

    public static Compressor Compressor => _compressor ??= new Compressor(Level);

    public static Decompressor Decompressor => _decompressor ??= new Decompressor();
}
