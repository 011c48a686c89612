using System.Numerics;
using ZstdSharp;

namespace ScopeReader.Archive.Packing;

/// <summary>A run of whole numbers as differences of the order that leaves least, split into bytes, each byte's run compressed.</summary>
internal static class IntegerStream
{
    private const int HighestOrder = 2, SampleLength = 4096, Buckets = 4096;
    private const byte Zeros = 0, Compressed = 1;

    /// <summary>Writes the numbers; all arithmetic wraps at <paramref name="bits"/>.</summary>
    /// <param name="values">Shape [n]; spoilt.</param>
    /// <param name="bits">8, 16 or 64.</param>
    /// <param name="writer">Where they go.</param>
    /// <param name="compressor">Zstandard.</param>
    public static void Write(Span<long> values, int bits, PackWriter writer, Compressor compressor)
    {
        int order = BestOrder(values, bits);
        writer.Byte((byte)order);
        // From the end, so that each difference is of numbers not yet replaced.
        for (int pass = 0; pass < order; pass++)
            for (int i = values.Length - 1; i > pass; i--)
                values[i] -= values[i - 1];

        ulong all = 0;
        for (int i = 0; i < values.Length; i++)
        {
            ulong folded = Fold(values[i], bits);
            values[i] = (long)folded;
            if (i >= order)
                all |= folded;
        }
        for (int i = 0; i < Math.Min(order, values.Length); i++)
            writer.Number((ulong)values[i]);

        int width = (71 - BitOperations.LeadingZeroCount(all)) / 8;
        writer.Byte((byte)width);
        var plane = new byte[Math.Max(0, values.Length - order)];
        for (int k = 0; k < width; k++)
        {
            for (int i = 0; i < plane.Length; i++)
                plane[i] = (byte)((ulong)values[i + order] >> (8 * k));
            if (plane.AsSpan().ContainsAnyExcept((byte)0))
            {
                writer.Byte(Compressed);
                writer.Block(compressor.Wrap(plane));
            }
            else
            {
                writer.Byte(Zeros);
            }
        }
    }

    /// <summary>Reads as many numbers as there is room for.</summary>
    public static void Read(Span<long> values, int bits, ref PackReader reader, Decompressor decompressor)
    {
        int order = reader.Byte();
        if (order > HighestOrder)
            throw new InvalidDataException("a packed stream has an unknown order");
        values.Clear();
        for (int i = 0; i < Math.Min(order, values.Length); i++)
            values[i] = (long)reader.Number();
        int width = reader.Byte();
        for (int k = 0; k < width; k++)
        {
            if (reader.Byte() == Zeros)
                continue;
            ReadOnlySpan<byte> plane = decompressor.Unwrap(reader.Block());
            if (plane.Length != values.Length - order || k >= 8)
                throw new InvalidDataException("a packed stream has another length than its table");
            for (int i = 0; i < plane.Length; i++)
                values[i + order] |= (long)plane[i] << (8 * k);
        }
        for (int i = 0; i < values.Length; i++)
            values[i] = Unfold((ulong)values[i]);
        for (int pass = order - 1; pass >= 0; pass--)
            for (int i = pass + 1; i < values.Length; i++)
                values[i] += values[i - 1];
        if (bits < 64)
            for (int i = 0; i < values.Length; i++)
                values[i] &= (1L << bits) - 1;
    }

    // Zero, -1, 1, -2, … become 0, 1, 2, 3, …: small either way.
    private static ulong Fold(long value, int bits)
    {
        long signed = value << (64 - bits) >> (64 - bits);
        return ((ulong)signed << 1 ^ (ulong)(signed >> 63)) & (bits == 64 ? ulong.MaxValue : (1UL << bits) - 1);
    }

    private static long Unfold(ulong folded) => (long)(folded >> 1) ^ -(long)(folded & 1);

    // The order whose differences have the least entropy, judged on the start of the run.
    private static int BestOrder(ReadOnlySpan<long> values, int bits)
    {
        if (!values.IsEmpty && !values.ContainsAnyExcept(values[0]))
            return 1;
        long[] sample = values[..Math.Min(values.Length, SampleLength)].ToArray();
        int best = 0;
        double least = double.PositiveInfinity;
        for (int order = 0; order <= HighestOrder; order++)
        {
            double entropy = Entropy(sample.AsSpan(Math.Min(order, sample.Length)), bits);
            if (entropy < least - 1e-9)
                (best, least) = (order, entropy);
            for (int i = sample.Length - 1; i > order; i--)
                sample[i] -= sample[i - 1];
        }
        return best;
    }

    private static double Entropy(ReadOnlySpan<long> values, int bits)
    {
        var counts = new int[Buckets];
        double above = 0;
        foreach (long value in values)
        {
            ulong folded = Fold(value, bits);
            counts[folded % Buckets]++;
            above += Math.Max(0, 64 - BitOperations.LeadingZeroCount(folded) - 12);
        }
        double sum = 0;
        foreach (int count in counts)
            if (count > 0)
                sum += count * Math.Log2((double)values.Length / count);
        return values.Length == 0 ? 0 : (sum + above) / values.Length;
    }
}
