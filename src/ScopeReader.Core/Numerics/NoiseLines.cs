namespace ScopeReader.Numerics;

/// <summary>The lines of a residual's spectrum that its model does not have, and the noise between them.</summary>
/// <remarks>
/// A bin counts as a line where its power over the density around it is what noise alone reaches at any bin in one record of ten
/// thousand: what passes here becomes a number. Frequency and amplitude of a Hann line come from its two largest bins (Rife and Vincent 1970, from memory).
/// </remarks>
public sealed class NoiseLines
{
    private const int Block = 512, Reach = 4, LowestBin = 3, MostLines = 50;
    private const double Rarity = 1e4;
    private const double HannNoiseBandwidth = 1.5, HannShare = 18.0 / 35;

    private readonly NoiseSpectrum _spectrum;
    private readonly double[] _density;
    private readonly List<NoiseLine> _lines = [];

    /// <param name="spectrum">The residual's spectrum.</param>
    public NoiseLines(NoiseSpectrum spectrum)
    {
        ArgumentNullException.ThrowIfNull(spectrum);
        _spectrum = spectrum;
        ReadOnlySpan<double> power = spectrum.Power;
        _density = new double[power.Length / Block + 1];
        for (int i = 0; i < _density.Length; i++)
            _density[i] = spectrum.Near(Math.Min(0.5, (i + 0.5) * Block / spectrum.Length)).Variance;
        double outstanding = Math.Log(Rarity * power.Length), sum = 0, squares = 0;
        int count = 0;
        for (int k = LowestBin; k < power.Length - 2; k++)
        {
            if (spectrum.IsModelled(k))
                continue;
            if (power[k] > outstanding * Density(k))
            {
                if (IsTop(k))
                    _lines.Add(Line(k));
                continue;
            }
            (sum, squares, count) = (sum + power[k], squares + power[k] * power[k], count + 1);
        }
        // Feet of a line stay below the threshold of one: where lines stand, their neighbours do not count as noise.
        foreach (NoiseLine line in _lines)
        {
            int centre = (int)Math.Round(line.Frequency * spectrum.Length);
            for (int k = Math.Max(LowestBin, centre - Reach); k <= Math.Min(power.Length - 3, centre + Reach); k++)
                if (!spectrum.IsModelled(k) && power[k] <= outstanding * Density(k))
                    (sum, squares, count) = (sum - power[k], squares - power[k] * power[k], count - 1);
        }
        _lines.Sort((a, b) => b.Amplitude.CompareTo(a.Amplitude));
        if (_lines.Count > MostLines)
            _lines.RemoveRange(MostLines, _lines.Count - MostLines);
        count = Math.Max(1, count);
        Variance = sum / count;
        // Σ P² of n exponential powers is 2(Σ P)²/n where the noise is white, and more where it is not.
        Whiteness = squares > 0 ? Math.Min(1, 2 * sum * sum / (count * squares)) : 1;
    }

    /// <summary>The lines, the strongest first, fifty at most.</summary>
    public IReadOnlyList<NoiseLine> Lines => _lines;

    /// <summary>Variance of one sample's noise, lines left out: the mean density of the band.</summary>
    public double Variance { get; }

    /// <summary>Share of the samples that count as independent for a mean square: 1 where the noise is white.</summary>
    public double Whiteness { get; }

    /// <summary>Degrees of freedom of the variance; the Hann window makes use of 18/35 of the samples.</summary>
    public double DegreesOfFreedom => Math.Max(1, Whiteness * HannShare * _spectrum.Length);

    /// <summary>Number of samples that were looked at.</summary>
    public int Length => _spectrum.Length;

    /// <summary>The largest amplitude that noise alone has at any bin, in one record of ten thousand.</summary>
    public double Threshold => Math.Sqrt(Math.Log(Rarity * _spectrum.Power.Length) * _density.Max() * 4 * HannNoiseBandwidth / _spectrum.Length);

    private double Density(int bin) => _density[bin / Block];

    private bool IsTop(int bin)
    {
        ReadOnlySpan<double> power = _spectrum.Power;
        for (int k = Math.Max(0, bin - 3); k <= Math.Min(power.Length - 1, bin + 3); k++)
            if (power[k] > power[bin])
                return false;
        return true;
    }

    private NoiseLine Line(int bin)
    {
        ReadOnlySpan<double> power = _spectrum.Power;
        int side = power[bin + 1] >= power[bin - 1] ? 1 : -1;
        double alpha = Math.Sqrt(power[bin + side] / power[bin]), offset = Math.Clamp((2 * alpha - 1) / (1 + alpha), -0.5, 0.5);
        double response = Window.Hann.Response(offset), n = _spectrum.Length, density = Density(bin);
        // |X| = A N/2 · gain · response, and the periodogram is |X|² over Σ w² = 3N/8.
        double square = power[bin] * 1.5 * 4 / n / (response * response), u = Math.Sqrt(2 * HannNoiseBandwidth * density / n) / response;
        double amplitude = Math.Sqrt(Math.Max(square - u * u, square / 4));
        // The bound is √3/(πN) · u/A for the u of the whole record; two Hann bins stay within 1.2 times it, and u is 1.22 times larger.
        return new NoiseLine((bin + side * offset) / n, Math.Sqrt(6) / (Math.PI * n) * u / amplitude, amplitude, u);
    }
}
