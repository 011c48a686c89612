namespace ScopeReader.Numerics;

/// <summary>The forward Fourier transform of real samples, any length, unscaled: X_k = Σ x_n e^(-2πi·n·k/N), k = 0 … N/2.</summary>
/// <remarks>
/// <para>The convention of numpy.fft.rfft. Lengths without a prime factor above 5 are the fastest; the others cost about six
/// times as much (Bluestein). An even length is worked as a complex one of half of it.</para>
/// <para>Holds its tables and work space: make one a length and use it again; it is not for several threads at once.</para>
/// </remarks>
public sealed class RealTransform
{
    private readonly ComplexTransform _inner;
    private readonly double[] _re, _im, _cosine, _sine;

    /// <param name="length">Number of samples, 1 or more.</param>
    public RealTransform(int length)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(length, 1);
        Length = length;
        bool packed = length % 2 == 0;
        int complex = packed ? length / 2 : length;
        _inner = ComplexTransform.Of(complex);
        (_re, _im) = (new double[complex], new double[complex]);
        (_cosine, _sine) = packed ? TurnTable.Of(length, complex) : ([], []);
    }

    /// <summary>Number of samples.</summary>
    public int Length { get; }

    /// <summary>Number of bins, N/2 + 1.</summary>
    public int Bins => Length / 2 + 1;

    /// <summary>The longest length that transforms fast and is no longer than this, 1 or more.</summary>
    public static int FastLengthAtMost(int length)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(length, 1);
        while (!SmoothTransform.IsSmooth(length))
            length--;
        return length;
    }

    /// <summary>Transforms.</summary>
    /// <param name="samples">Shape [N].</param>
    /// <param name="re">Real parts, shape [N/2 + 1].</param>
    /// <param name="im">Imaginary parts, shape [N/2 + 1].</param>
    /// <exception cref="ArgumentException">A length is not what it must be.</exception>
    public void Forward(ReadOnlySpan<double> samples, Span<double> re, Span<double> im)
    {
        if (samples.Length != Length || re.Length != Bins || im.Length != Bins)
            throw new ArgumentException($"expected {Length} samples and {Bins} bins, found {samples.Length}, {re.Length} and {im.Length}");
        if (Length % 2 == 0)
            Packed(samples, re, im);
        else
            Whole(samples, re, im);
    }

    private void Whole(ReadOnlySpan<double> samples, Span<double> re, Span<double> im)
    {
        samples.CopyTo(_re);
        Array.Clear(_im);
        _inner.Forward(_re, _im);
        _re.AsSpan(0, Bins).CopyTo(re);
        _im.AsSpan(0, Bins).CopyTo(im);
        im[0] = 0;
    }

    // Even samples as real, odd ones as imaginary parts: their transforms are the even and the odd part of the result.
    private void Packed(ReadOnlySpan<double> samples, Span<double> re, Span<double> im)
    {
        int half = Length / 2;
        for (int n = 0; n < half; n++)
            (_re[n], _im[n]) = (samples[2 * n], samples[2 * n + 1]);
        _inner.Forward(_re, _im);
        (re[0], im[0]) = (_re[0] + _im[0], 0);
        (re[half], im[half]) = (_re[0] - _im[0], 0);
        for (int k = 1; k < half; k++)
        {
            double zr = _re[k], zi = _im[k], mr = _re[half - k], mi = -_im[half - k];
            double evenRe = 0.5 * (zr + mr), evenIm = 0.5 * (zi + mi), oddRe = 0.5 * (zi - mi), oddIm = 0.5 * (mr - zr);
            re[k] = evenRe + oddRe * _cosine[k] + oddIm * _sine[k];
            im[k] = evenIm + oddIm * _cosine[k] - oddRe * _sine[k];
        }
    }
}
