namespace ScopeReader.Numerics;

/// <summary>How the noise of a residual is spread over frequency.</summary>
/// <remarks>
/// <para>A Hann periodogram of at most 2^20 samples from the record's middle. The density near a frequency is the median of the
/// bins around it, over ln 2: the median of exponentially distributed powers over their mean. Lines that are few beside the
/// bins do not move a median, so what a model left over does not pass for noise.</para>
/// </remarks>
public sealed class NoiseSpectrum
{
    private const int LongestTransform = 1 << 20, MainLobe = 3, FewestBins = 12;

    private readonly double[] _power;
    private readonly int _length, _modelled;
    private readonly double _fundamental, _variance;

    /// <param name="residual">Shape [n], n of 8 or more: the samples less the model.</param>
    /// <param name="fundamental">Cycles per sample: bins near its multiples are left out, for the model has taken their noise too.</param>
    /// <param name="unknowns">Number of unknowns of the model.</param>
    public NoiseSpectrum(ReadOnlySpan<double> residual, double fundamental, int unknowns)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(residual.Length, 8);
        (_fundamental, _modelled) = (fundamental, (unknowns - 1) / 2);
        double sum = 0;
        foreach (double v in residual)
            sum += v * v;
        _variance = sum / Math.Max(1, residual.Length - unknowns);
        _length = RealTransform.FastLengthAtMost(Math.Min(residual.Length, LongestTransform));
        _power = Periodogram(residual.Slice((residual.Length - _length) / 2, _length));
    }

    /// <summary>Variance of one sample, were the noise all over the band as it is near a frequency, and its degrees of freedom.</summary>
    /// <param name="frequency">Cycles per sample, 0 to 0.5.</param>
    /// <remarks>Where a short record leaves too few bins, the variance of the whole residual.</remarks>
    public (double Variance, double DegreesOfFreedom) Near(double frequency)
    {
        int centre = (int)Math.Round(frequency * _length);
        // Local enough to follow a front end's roll-off, wide enough for a median: a few percent either way in variance.
        int reach = Math.Clamp(_length / 16, 32, 256);
        Span<double> bins = stackalloc double[2 * reach + 1];
        int count = 0;
        for (int k = Math.Max(2, centre - reach); k <= Math.Min(_power.Length - 3, centre + reach); k++)
            if (!IsModelled(k))
                bins[count++] = _power[k];
        if (count < FewestBins)
            return (_variance, Math.Max(1, _length - 2 * _modelled - 2));
        bins = bins[..count];
        bins.Sort();
        double median = count % 2 == 1 ? bins[count / 2] : (bins[count / 2 - 1] + bins[count / 2]) / 2;
        // A median of n exponential powers scatters by 1/(√n ln 2), and Hann makes neighbours alike: 1.5 bins count as one.
        return (median / Math.Log(2), 2 * Math.Log(2) * Math.Log(2) * count / 1.5);
    }

    private bool IsModelled(int bin)
    {
        double order = Math.Round(bin / (_fundamental * _length));
        return order >= 1 && order <= _modelled && Math.Abs(bin - order * _fundamental * _length) <= MainLobe;
    }

    private static double[] Periodogram(ReadOnlySpan<double> samples)
    {
        double[] windowed = Window.Hann.Values(samples.Length);
        double gain = 0;
        for (int i = 0; i < windowed.Length; i++)
        {
            gain += windowed[i] * windowed[i];
            windowed[i] *= samples[i];
        }
        var transform = new RealTransform(samples.Length);
        double[] re = new double[transform.Bins], im = new double[transform.Bins];
        transform.Forward(windowed, re, im);
        for (int k = 0; k < re.Length; k++)
            re[k] = (re[k] * re[k] + im[k] * im[k]) / gain;
        return re;
    }
}
