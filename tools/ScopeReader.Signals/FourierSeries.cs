using System.Numerics;

namespace ScopeReader.Signals;

/// <summary>A real periodic function by its Fourier coefficients: c₀ + 2 Re Σ c_k e^(j2πkφ), φ in cycles.</summary>
public sealed class FourierSeries
{
    private readonly Complex[] _coefficients;

    /// <param name="coefficients">c₀ (real) to c_K.</param>
    public FourierSeries(Complex[] coefficients)
    {
        ArgumentNullException.ThrowIfNull(coefficients);
        ArgumentOutOfRangeException.ThrowIfLessThan(coefficients.Length, 2);
        _coefficients = coefficients;
    }

    /// <summary>The coefficients, from c₀.</summary>
    public ReadOnlySpan<Complex> Coefficients => _coefficients;

    /// <summary>Mean over a period.</summary>
    public double Mean => _coefficients[0].Real;

    /// <summary>Root mean square over a period, the mean in it (Parseval).</summary>
    public double Rms
    {
        get
        {
            double sum = Mean * Mean;
            foreach (Complex c in _coefficients.AsSpan(1))
                sum += 2 * (c.Real * c.Real + c.Imaginary * c.Imaginary);
            return Math.Sqrt(sum);
        }
    }

    /// <summary>Peak amplitude of a harmonic; 0 beyond the last.</summary>
    public double Amplitude(int harmonic) => harmonic < _coefficients.Length ? 2 * _coefficients[harmonic].Magnitude : 0;

    /// <summary>The sum of the series.</summary>
    /// <param name="phase">Cycles.</param>
    public double At(double phase)
    {
        var (sin, cos) = Math.SinCos(2 * Math.PI * phase);
        var z = new Complex(cos, sin);
        Complex sum = Complex.Zero;
        for (int k = _coefficients.Length - 1; k > 0; k--)
            sum = (sum + _coefficients[k]) * z;
        return Mean + 2 * sum.Real;
    }

    /// <summary>One period in equal steps from phase 0, with the slopes per cycle, by an inverse transform.</summary>
    /// <param name="steps">A power of two above twice the number of harmonics.</param>
    public (double[] Values, double[] Slopes) Tabulate(int steps)
    {
        // Positive frequencies alone, doubled: the real part of the transform is the function.
        Complex[] values = new Complex[steps], slopes = new Complex[steps];
        values[0] = Mean * steps;
        for (int k = 1; k < _coefficients.Length; k++)
        {
            values[k] = 2 * steps * _coefficients[k];
            slopes[k] = values[k] * new Complex(0, 2 * Math.PI * k);
        }
        FftSharp.FFT.Inverse(values);
        FftSharp.FFT.Inverse(slopes);
        return (Array.ConvertAll(values, c => c.Real), Array.ConvertAll(slopes, c => c.Real));
    }
}
