namespace ScopeReader.Numerics;

/// <summary>A periodic wave as a constant and harmonics: y = offset + Σ a_k cos(2πkft) + b_k sin(2πkft).</summary>
/// <param name="Frequency">f, cycles per sample; the instants t are samples from the middle of the record.</param>
/// <param name="Offset">The constant.</param>
/// <param name="Cosines">a_1 … a_K.</param>
/// <param name="Sines">b_1 … b_K.</param>
public sealed record HarmonicModel(double Frequency, double Offset, double[] Cosines, double[] Sines)
{
    private const int Block = 256;

    /// <summary>K.</summary>
    public int Harmonics => Cosines.Length;

    /// <summary>Amplitude of a harmonic, peak.</summary>
    /// <param name="order">1 to K.</param>
    public double Amplitude(int order) => double.Hypot(Cosines[order - 1], Sines[order - 1]);

    /// <summary>Phase of a harmonic at the middle of the record, rad: y = A cos(2πkft + phase).</summary>
    /// <param name="order">1 to K.</param>
    public double Phase(int order) => Math.Atan2(-Sines[order - 1], Cosines[order - 1]);

    /// <summary>The samples less the model.</summary>
    /// <param name="samples">Shape [n].</param>
    public double[] Residual(ReadOnlySpan<double> samples) => Residual(samples, samples.Length);

    /// <summary>The samples in the middle of the record less the model.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="count">How many, at most n.</param>
    public double[] Residual(ReadOnlySpan<double> samples, int count)
    {
        int first = (samples.Length - count) / 2;
        double[] rest = samples.Slice(first, count).ToArray();
        var cosine = new double[Block];
        var sine = new double[Block];
        double middle = (samples.Length - 1) / 2.0 - first;
        for (int i = 0; i < rest.Length; i++)
            rest[i] -= Offset;
        for (int k = 1; k <= Harmonics; k++)
        {
            double f = k * Frequency;
            for (int j = 0; j < Block; j++)
                (cosine[j], sine[j]) = Turn.Of(f, j);
            for (int start = 0; start < rest.Length; start += Block)
            {
                Span<double> block = rest.AsSpan(start, Math.Min(Block, rest.Length - start));
                (double c0, double s0) = Turn.Of(f, start - middle);
                // a cos(x0 + x) + b sin(x0 + x), taken apart once a block.
                double a = Cosines[k - 1] * c0 + Sines[k - 1] * s0, b = Sines[k - 1] * c0 - Cosines[k - 1] * s0;
                for (int j = 0; j < block.Length; j++)
                    block[j] -= a * cosine[j] + b * sine[j];
            }
        }
        return rest;
    }
}
