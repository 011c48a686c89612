namespace ScopeReader.Numerics;

/// <summary>A window of cosines for spectra, in its periodic form: w_n = Σ (-1)^j a_j cos(2πjn/N), n = 0 … N - 1.</summary>
/// <remarks>
/// Coherent gain and noise bandwidth as in F. J. Harris, Proc. IEEE 66 (1978) 51, and Heinzel, Rüdiger and Schilling,
/// Spectrum and spectral density estimation by the DFT, 2002 (both from memory).
/// </remarks>
public sealed class Window
{
    private readonly double[] _coefficients;

    private Window(string name, params double[] coefficients)
    {
        (Name, _coefficients) = (name, coefficients);
        CoherentGain = coefficients[0];
        double power = 0;
        for (int j = 1; j < coefficients.Length; j++)
            power += coefficients[j] * coefficients[j] / 2;
        NoiseBandwidth = 1 + power / (CoherentGain * CoherentGain);
    }

    /// <summary>Hann: for frequencies.</summary>
    public static Window Hann { get; } = new("Hann", 0.5, 0.5);

    /// <summary>Four-term Blackman-Harris: for weak lines beside strong ones (Harris 1978, sidelobes -92 dB).</summary>
    public static Window BlackmanHarris { get; } = new("Blackman-Harris", 0.35875, 0.48829, 0.14128, 0.01168);

    /// <summary>HFT90D flat-top: for levels read off the largest bin (Heinzel 2002, sidelobes -90.2 dB).</summary>
    public static Window FlatTop { get; } = new("HFT90D", 1, 1.942604, 1.340318, 0.440811, 0.043097);

    /// <summary>Any window of cosines.</summary>
    /// <param name="name">Its name.</param>
    /// <param name="coefficients">a_0, a_1, …, each above 0: the signs alternate by themselves.</param>
    public static Window OfCosines(string name, params ReadOnlySpan<double> coefficients)
    {
        ArgumentException.ThrowIfNullOrEmpty(name);
        ArgumentOutOfRangeException.ThrowIfZero(coefficients.Length);
        return new Window(name, coefficients.ToArray());
    }

    /// <summary>The window's name.</summary>
    public string Name { get; }

    /// <summary>Mean of the window: what a line's amplitude is multiplied by.</summary>
    public double CoherentGain { get; }

    /// <summary>Equivalent noise bandwidth, bins.</summary>
    public double NoiseBandwidth { get; }

    /// <summary>The window's values.</summary>
    /// <param name="length">N, 1 or more.</param>
    public double[] Values(int length)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(length, 1);
        var values = new double[length];
        double[] cosine = TurnTable.Of(length, length).Cosine;
        for (int n = 0; n <= length / 2; n++)
        {
            double value = _coefficients[0];
            for (int j = 1; j < _coefficients.Length; j++)
                value += (j % 2 == 0 ? _coefficients[j] : -_coefficients[j]) * cosine[(int)((long)j * n % length)];
            values[n] = value;
            if (n > 0)
                values[length - n] = value;
        }
        return values;
    }

    /// <summary>Response to a line off the centre of a bin over that to one on it; its sign alternates with the sidelobes.</summary>
    /// <param name="offset">Distance, bins.</param>
    /// <remarks>The limit of many samples; at 64 it is right to 1e-3 of itself near the centre.</remarks>
    public double Response(double offset)
    {
        double sum = _coefficients[0] * Sinc(offset);
        for (int j = 1; j < _coefficients.Length; j++)
            sum += _coefficients[j] / 2 * (Sinc(offset - j) + Sinc(offset + j));
        return sum / CoherentGain;
    }

    private static double Sinc(double x) => x == 0 ? 1 : Math.Sin(Math.PI * x) / (Math.PI * x);
}
