using System.Runtime.InteropServices;
using System.Security.Cryptography;

namespace ScopeReader.Archive.Packing;

/// <summary>Different short texts, numbered in the order in which they were first seen.</summary>
/// <param name="most">As many as it holds.</param>
internal sealed class WordTable(int most)
{
    /// <summary>Longest text, in bytes.</summary>
    public const int LongestWord = 31;

    // Odd, and unknown to whoever wrote the file: nobody can make all texts fall on one place.
    private static readonly ulong[] Multipliers = [Odd(), Odd(), Odd(), Odd()];

    private readonly int[] _places = new int[(int)System.Numerics.BitOperations.RoundUpToPowerOf2((uint)(2 * most + 2))];
    private readonly List<byte[]> _words = [];

    /// <summary>The texts.</summary>
    public IReadOnlyList<byte[]> Words => _words;

    /// <summary>Number of a text, which is noted where it is new; -1 where that would be one too many.</summary>
    public int NumberOf(ReadOnlySpan<byte> word)
    {
        for (int place = Place(word); ; place = (place + 1) & (_places.Length - 1))
        {
            int number = _places[place] - 1;
            if (number >= 0)
            {
                if (_words[number].AsSpan().SequenceEqual(word))
                    return number;
                continue;
            }
            if (_words.Count == most)
                return -1;
            _words.Add(word.ToArray());
            _places[place] = _words.Count;
            return _words.Count - 1;
        }
    }

    private int Place(ReadOnlySpan<byte> word)
    {
        Span<byte> padded = stackalloc byte[LongestWord + 1];
        padded.Clear();
        word.CopyTo(padded);
        ReadOnlySpan<ulong> parts = MemoryMarshal.Cast<byte, ulong>(padded);
        ulong hash = (ulong)word.Length;
        for (int i = 0; i < parts.Length; i++)
            hash = (hash ^ parts[i]) * Multipliers[i] + (hash >> 29);
        return (int)(hash >> 33) & (_places.Length - 1);
    }

    private static ulong Odd() => MemoryMarshal.Read<ulong>(RandomNumberGenerator.GetBytes(8)) | 1;
}
