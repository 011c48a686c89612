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

    // The largest of 2^19 exponential powers exceeds 30 times their median in one record of a thousand.
    private const int MostLines = 20, LowestLine = 3, HighestMultiple = 2000;
    private const double StandsOut = 40;

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

    /// <summary>The periodogram, bins 0 to half of its length: white noise has its variance in each.</summary>
    public ReadOnlySpan<double> Power => _power;

    /// <summary>Number of samples that it was made of.</summary>
    public int Length => _length;

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

    /// <summary>The strongest line that stands out of its surroundings and is no multiple of the fundamental.</summary>
    /// <param name="beyond">Highest amplitude that a harmonic beyond the modelled ones may have, peak; it falls with its order.</param>
    /// <returns>Cycles per sample and peak amplitude; an amplitude of 0 where no line stands out.</returns>
    public (double Frequency, double Amplitude) StrongestLine(double beyond)
    {
        var tried = new HashSet<int>();
        for (int tries = 0; tries < MostLines; tries++)
        {
            int peak = -1;
            for (int k = LowestLine; k < _power.Length - LowestLine; k++)
                if ((peak < 0 || _power[k] > _power[peak]) && !tried.Contains(k) && !IsModelled(k))
                    peak = k;
            if (peak < 0 || !(_power[peak] > StandsOut * Math.Max(MedianAround(peak), double.Epsilon)))
                return (0, 0);
            double power = 0, moment = 0;
            for (int k = peak - 2; k <= peak + 2; k++)
                (power, moment) = (power + _power[k], moment + k * _power[k]);
            double place = moment / power, amplitude = AmplitudeAt(place / _length);
            if (!IsMultiple(place, Math.Max(_modelled, _modelled * beyond / amplitude)))
                return (place / _length, amplitude);
            for (int k = peak - MainLobe; k <= peak + MainLobe; k++)
                tried.Add(k);
        }
        return (0, 0);
    }

    /// <summary>Peak amplitude of a line near a frequency, noise included; 0 beyond the spectrum's ends.</summary>
    public double AmplitudeAt(double frequency)
    {
        int centre = (int)Math.Round(frequency * _length);
        if (centre < LowestLine || centre > _power.Length - LowestLine)
            return 0;
        double power = 0;
        for (int k = centre - 2; k <= centre + 2; k++)
            power += _power[k];
        // A Hann line holds 1.5 times its largest possible bin, wherever it lies between two.
        return Math.Sqrt(6 * power / (1.5 * _length));
    }

    // Whether a multiple of the fundamental, of an order up to the one given, is folded to that bin.
    private bool IsMultiple(double bin, double highest)
    {
        for (int k = 1; k <= Math.Min(highest, HighestMultiple); k++)
        {
            double folded = k * _fundamental;
            if (Math.Abs(Math.Abs(folded - Math.Round(folded)) * _length - bin) <= MainLobe)
                return true;
        }
        return false;
    }

    private double MedianAround(int bin)
    {
        double[] around = _power[Math.Max(1, bin - 64)..Math.Min(_power.Length - 1, bin + 65)];
        Array.Sort(around);
        return around[around.Length / 2];
    }

    /// <summary>True where the model has taken the noise of a bin too.</summary>
    internal bool IsModelled(int bin)
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
