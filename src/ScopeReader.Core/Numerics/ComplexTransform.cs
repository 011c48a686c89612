namespace ScopeReader.Numerics;

/// <summary>A forward complex Fourier transform of one length, in place, unscaled.</summary>
internal abstract class ComplexTransform
{
    /// <summary>The transform for a length of 1 or more.</summary>
    public static ComplexTransform Of(int length) => SmoothTransform.IsSmooth(length) ? new SmoothTransform(length) : new ChirpTransform(length);

    /// <summary>Replaces x by X_k = Σ x_n e^(-2πi·n·k/N).</summary>
    /// <param name="re">Real parts, shape [N].</param>
    /// <param name="im">Imaginary parts, shape [N].</param>
    public abstract void Forward(double[] re, double[] im);
}
