using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;

namespace ScopeReader.Numerics;

/// <summary>One stage of a Stockham transform: short transforms across the data, written out in sorted order.</summary>
internal static class Stockham
{
    /// <summary>Runs a stage.</summary>
    /// <param name="inRe">Real parts, shape [radix · count · stride].</param>
    /// <param name="inIm">Imaginary parts.</param>
    /// <param name="outRe">Real parts of the result, same shape.</param>
    /// <param name="outIm">Imaginary parts.</param>
    /// <param name="twiddleRe">Shape [(radix - 1) · count]: e^(-2πi·p·leg/(radix·count)) at (leg - 1)·count + p.</param>
    /// <param name="twiddleIm">Imaginary parts.</param>
    /// <param name="count">Short transforms a stride.</param>
    /// <param name="stride">Independent sequences that lie side by side.</param>
    public static void Stage<TButterfly>(ReadOnlySpan<double> inRe, ReadOnlySpan<double> inIm, Span<double> outRe, Span<double> outIm,
        ReadOnlySpan<double> twiddleRe, ReadOnlySpan<double> twiddleIm, int count, int stride) where TButterfly : IButterfly
    {
        var legs = new Legs
        {
            InRe = ref MemoryMarshal.GetReference(inRe),
            InIm = ref MemoryMarshal.GetReference(inIm),
            OutRe = ref MemoryMarshal.GetReference(outRe),
            OutIm = ref MemoryMarshal.GetReference(outIm),
            TwiddleRe = ref MemoryMarshal.GetReference(twiddleRe),
            TwiddleIm = ref MemoryMarshal.GetReference(twiddleIm),
            InStep = (nint)count * stride,
            OutStep = stride,
            TwiddleStep = count,
        };
        for (nint p = 0; p < count; p++)
        {
            legs.Twiddle = p;
            nint from = p * stride, to = p * stride * TButterfly.Radix, q = 0;
            for (; q + 4 <= stride; q += 4)
            {
                (legs.In, legs.Out) = (from + q, to + q);
                TButterfly.Apply<Four>(ref legs);
            }
            for (; q < stride; q++)
            {
                (legs.In, legs.Out) = (from + q, to + q);
                TButterfly.Apply<One>(ref legs);
            }
        }
    }

    /// <summary>The first stage of radix 4, whose stride is 1: four short transforms at once, turned over as they are stored; the count is a multiple of 4.</summary>
    public static void FirstOfFour(ReadOnlySpan<double> inRe, ReadOnlySpan<double> inIm, Span<double> outRe, Span<double> outIm,
        ReadOnlySpan<double> twiddleRe, ReadOnlySpan<double> twiddleIm, int count)
    {
        ref double xr = ref MemoryMarshal.GetReference(inRe), xi = ref MemoryMarshal.GetReference(inIm);
        ref double yr = ref MemoryMarshal.GetReference(outRe), yi = ref MemoryMarshal.GetReference(outIm);
        ref double wr = ref MemoryMarshal.GetReference(twiddleRe), wi = ref MemoryMarshal.GetReference(twiddleIm);
        nint n = count;
        for (nint p = 0; p < n; p += 4)
        {
            var a = Split<Four>.Load(ref xr, ref xi, p);
            var b = Split<Four>.Load(ref xr, ref xi, n + p);
            var c = Split<Four>.Load(ref xr, ref xi, 2 * n + p);
            var d = Split<Four>.Load(ref xr, ref xi, 3 * n + p);
            Split<Four> even = a + c, evenDifference = a - c, odd = b + d, oddTurned = (b - d).TurnedBack;
            Split<Four> y0 = even + odd, y1 = (evenDifference + oddTurned) * Split<Four>.Load(ref wr, ref wi, p);
            Split<Four> y2 = (even - odd) * Split<Four>.Load(ref wr, ref wi, n + p), y3 = (evenDifference - oddTurned) * Split<Four>.Load(ref wr, ref wi, 2 * n + p);
            StoreTransposed(y0.Re.Value, y1.Re.Value, y2.Re.Value, y3.Re.Value, ref Unsafe.Add(ref yr, 4 * p));
            StoreTransposed(y0.Im.Value, y1.Im.Value, y2.Im.Value, y3.Im.Value, ref Unsafe.Add(ref yi, 4 * p));
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void StoreTransposed(Vector256<double> a, Vector256<double> b, Vector256<double> c, Vector256<double> d, ref double target)
    {
        if (Avx.IsSupported)
        {
            Vector256<double> ab = Avx.UnpackLow(a, b), abHigh = Avx.UnpackHigh(a, b), cd = Avx.UnpackLow(c, d), cdHigh = Avx.UnpackHigh(c, d);
            Avx.Permute2x128(ab, cd, 0x20).StoreUnsafe(ref target);
            Avx.Permute2x128(abHigh, cdHigh, 0x20).StoreUnsafe(ref target, 4);
            Avx.Permute2x128(ab, cd, 0x31).StoreUnsafe(ref target, 8);
            Avx.Permute2x128(abHigh, cdHigh, 0x31).StoreUnsafe(ref target, 12);
            return;
        }
        for (int i = 0; i < 4; i++)
            Vector256.Create(a[i], b[i], c[i], d[i]).StoreUnsafe(ref target, (nuint)(4 * i));
    }
}
