namespace ScopeReader.Numerics;

/// <summary>A transform of any length as a convolution with a chirp, done on a smooth length (Bluestein 1970).</summary>
/// <remarks>n·k = (n² + k² - (k - n)²)/2, so X_k = c_k Σ (x_n c_n) · conj(c_(k-n)) with c_n = e^(-πi·n²/N).</remarks>
internal sealed class ChirpTransform : ComplexTransform
{
    private readonly int _length;
    private readonly SmoothTransform _inner;
    private readonly double[] _chirpRe, _chirpIm, _responseRe, _responseIm, _re, _im;

    public ChirpTransform(int length)
    {
        _length = length;
        int padded = 2 * length - 1;
        // A multiple of 4 keeps the vector stages busy.
        padded += -padded & 3;
        while (!SmoothTransform.IsSmooth(padded))
            padded += 4;
        _inner = new SmoothTransform(padded);
        (_chirpRe, _chirpIm) = (new double[length], new double[length]);
        (_responseRe, _responseIm, _re, _im) = (new double[padded], new double[padded], new double[padded], new double[padded]);
        for (int n = 0; n < length; n++)
        {
            (double c, double s) = Turn.Of((long)n * n % (2L * length), 2L * length);
            (_chirpRe[n], _chirpIm[n]) = (c, -s);
            int mirrored = n == 0 ? 0 : padded - n;
            // The inner transform is unscaled both ways: its length is divided out here.
            (_responseRe[n], _responseIm[n]) = (_responseRe[mirrored], _responseIm[mirrored]) = (c / padded, s / padded);
        }
        _inner.Forward(_responseRe, _responseIm);
    }

    public override void Forward(double[] re, double[] im)
    {
        for (int n = 0; n < _length; n++)
            (_re[n], _im[n]) = (re[n] * _chirpRe[n] - im[n] * _chirpIm[n], re[n] * _chirpIm[n] + im[n] * _chirpRe[n]);
        _re.AsSpan(_length).Clear();
        _im.AsSpan(_length).Clear();
        _inner.Forward(_re, _im);
        for (int k = 0; k < _re.Length; k++)
            (_re[k], _im[k]) = (_re[k] * _responseRe[k] - _im[k] * _responseIm[k], _re[k] * _responseIm[k] + _im[k] * _responseRe[k]);
        // With real and imaginary parts exchanged on both sides, the forward transform is the inverse one.
        _inner.Forward(_im, _re);
        for (int k = 0; k < _length; k++)
            (re[k], im[k]) = (_re[k] * _chirpRe[k] - _im[k] * _chirpIm[k], _re[k] * _chirpIm[k] + _im[k] * _chirpRe[k]);
    }
}
