namespace ScopeReader.Numerics;

/// <summary>The averaged periodogram of a record: the power of overlapping windowed stretches, averaged bin by bin.</summary>
/// <remarks>P. D. Welch, IEEE Trans. Audio Electroacoust. 15 (1967) 70 (from memory); stretches overlap by half, none is detrended.</remarks>
public sealed class AveragedPeriodogram
{
    private readonly double[] _power;

    /// <param name="samples">Shape [n].</param>
    /// <param name="segment">Length of a stretch, 2 to n; lengths without a prime factor above 5 are the fastest.</param>
    /// <param name="window">The window.</param>
    public AveragedPeriodogram(ReadOnlySpan<double> samples, int segment, Window window)
    {
        ArgumentNullException.ThrowIfNull(window);
        ArgumentOutOfRangeException.ThrowIfLessThan(segment, 2);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(segment, samples.Length);
        double[] weights = window.Values(segment), windowed = new double[segment];
        double gain = 0;
        foreach (double w in weights)
            gain += w * w;
        var transform = new RealTransform(segment);
        double[] re = new double[transform.Bins], im = new double[transform.Bins];
        _power = new double[transform.Bins];
        int hop = segment / 2;
        Segments = (samples.Length - segment) / hop + 1;
        for (int s = 0; s < Segments; s++)
        {
            ReadOnlySpan<double> part = samples.Slice(s * hop, segment);
            for (int i = 0; i < segment; i++)
                windowed[i] = weights[i] * part[i];
            transform.Forward(windowed, re, im);
            for (int k = 0; k < re.Length; k++)
                _power[k] += (re[k] * re[k] + im[k] * im[k]) / (gain * Segments);
        }
        (Segment, Covered, Efficiency) = (segment, (Segments - 1) * hop + segment, Share(weights, hop));
    }

    /// <summary>Mean power of each bin, 0 to half of a stretch: white noise has its variance in each.</summary>
    public ReadOnlySpan<double> Power => _power;

    /// <summary>Number of stretches.</summary>
    public int Segments { get; }

    /// <summary>Length of a stretch.</summary>
    public int Segment { get; }

    /// <summary>Samples that the stretches cover.</summary>
    public int Covered { get; }

    /// <summary>Share of the covered samples that count as independent for the mean power of white noise: what the window's overlapping squares leave of them.</summary>
    public double Efficiency { get; }

    /// <summary>One-sided power density of a bin, in the square of the samples' unit over hertz.</summary>
    /// <param name="bin">0 to half of a stretch.</param>
    /// <param name="interval">Sample interval, s.</param>
    public double Density(int bin, double interval) => _power[bin] * interval * (bin == 0 || 2 * bin == Segment ? 1 : 2);

    // (Σ c)²/(n Σ c²), c the weight that a sample has in all stretches together.
    private static double Share(double[] weights, int hop)
    {
        double sum = 0, squares = 0;
        for (int i = 0; i < hop; i++)
        {
            double c = 0;
            for (int j = i; j < weights.Length; j += hop)
                c += weights[j] * weights[j];
            (sum, squares) = (sum + c, squares + c * c);
        }
        return sum * sum / (hop * squares);
    }
}
