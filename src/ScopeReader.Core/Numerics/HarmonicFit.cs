namespace ScopeReader.Numerics;

/// <summary>Least-squares fits of a <see cref="HarmonicModel"/>, at a known frequency or with the frequency among the unknowns.</summary>
/// <remarks>
/// With the instants counted from the middle of the record, cosines and sines are orthogonal to each other, and every
/// element of the normal equations is a <see cref="Dirichlet"/> sum; only the right-hand sides read the samples. With one
/// harmonic these are the three- and four-parameter fits of IEEE Std 1057 (clauses from memory, not quoted).
/// </remarks>
public sealed class HarmonicFit
{
    private const double LastStep = 1e-4;

    private readonly Cholesky _normal;

    private HarmonicFit(HarmonicModel model, Cholesky normal, bool frequencyKnown, double restSquares) =>
        (Model, _normal, FrequencyKnown, RestSquares) = (model, normal, frequencyKnown, restSquares);

    /// <summary>The fitted model.</summary>
    public HarmonicModel Model { get; }

    /// <summary>True where the frequency was given.</summary>
    public bool FrequencyKnown { get; }

    /// <summary>Sum of the squares of the samples less the model.</summary>
    /// <remarks>From the sums of the fit: right to 1e-13 of the samples' own sum of squares or so.</remarks>
    public double RestSquares { get; }

    /// <summary>Number of unknowns.</summary>
    public int Unknowns => 2 * Model.Harmonics + (FrequencyKnown ? 1 : 2);

    /// <summary>Variance of the fitted frequency for noise of variance 1 a sample, (cycles per sample)².</summary>
    public double FrequencyVariance => FrequencyKnown ? 0 : _normal.InverseDiagonal(2 * Model.Harmonics + 1);

    /// <summary>Variances of a harmonic's cosine and sine for noise of variance 1 a sample.</summary>
    /// <param name="order">1 to K.</param>
    public (double Cosine, double Sine) Variances(int order) =>
        (_normal.InverseDiagonal(order), _normal.InverseDiagonal(Model.Harmonics + order));

    /// <summary>Fits offset and harmonics at a known frequency.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="frequency">Cycles per sample, above 0.</param>
    /// <param name="harmonics">K, 1 or more; those above 0.5 are fitted where sampling folds them to.</param>
    /// <returns>The fit, or null where harmonics cannot be told apart in this record.</returns>
    public static HarmonicFit? At(ReadOnlySpan<double> samples, double frequency, int harmonics) =>
        Solve(samples, Flat(frequency, harmonics), frequencyKnown: true);

    /// <summary>Fits the frequency too, from a start value that is within 0.6 cycles a record of it.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="start">Cycles per sample.</param>
    /// <param name="harmonics">K, 1 or more.</param>
    /// <returns>The fit, or null where it does not settle, or settles elsewhere.</returns>
    public static HarmonicFit? From(ReadOnlySpan<double> samples, double start, int harmonics)
    {
        const int mostSteps = 30;
        double n = samples.Length, frequency = start;
        HarmonicModel? model = At(samples, start, harmonics)?.Model;
        for (int step = 0; step < mostSteps && model is not null; step++)
        {
            HarmonicFit? fit = Solve(samples, model, frequencyKnown: false);
            if (fit is null)
                return null;
            double moved = fit.Model.Frequency - frequency;
            // Steps shrink as their squares: the next would be under 1e-8 cycles a record.
            if (Math.Abs(moved) < LastStep / (n * harmonics))
                return fit;
            // Further than this the linear form says nothing: go part of the way.
            frequency += Math.Clamp(moved, -0.3 / n, 0.3 / n);
            if (Math.Abs(frequency - start) > 1 / n || frequency * harmonics >= 0.5 || frequency <= 0)
                return null;
            model = At(samples, frequency, harmonics)?.Model;
        }
        return null;
    }

    private static HarmonicModel Flat(double frequency, int harmonics)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(harmonics, 1);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(frequency);
        return new HarmonicModel(frequency, 0, new double[harmonics], new double[harmonics]);
    }

    // Unknowns: offset, cosines, sines and, where it is free, the step of the frequency from that of the model.
    private static HarmonicFit? Solve(ReadOnlySpan<double> samples, HarmonicModel at, bool frequencyKnown)
    {
        int k = at.Harmonics, size = 2 * k + (frequencyKnown ? 1 : 2);
        var right = new double[size];
        double mean = 0;
        foreach (double v in samples)
            mean += v;
        mean /= samples.Length;
        double rest = 0;
        foreach (double v in samples)
            rest += (v - mean) * (v - mean);
        var sums = new Dirichlet[2 * k + 1];
        for (int i = 0; i <= 2 * k; i++)
            sums[i] = Dirichlet.Of(i * at.Frequency, samples.Length);
        ToneSums[] tones = frequencyKnown ? ToneSums.OfMultiples(samples, at.Frequency, k) : [];
        for (int i = 1; i <= k; i++)
        {
            ToneSums tone = frequencyKnown ? tones[i - 1] : ToneSums.Of(samples, i * at.Frequency);
            // The mean is taken off here: an offset far above the amplitude would cost digits.
            right[i] = tone.Cosine - mean * sums[i].Cosine;
            right[k + i] = tone.Sine;
            if (!frequencyKnown)
                right[size - 1] += 2 * Math.PI * i * (at.Sines[i - 1] * tone.TimeCosine - at.Cosines[i - 1] * (tone.TimeSine - mean * sums[i].TimeSine));
        }
        if (Cholesky.Factor(Normal(at, sums, size)) is not { } normal)
            return null;
        double[] x = normal.Solve(right);
        double frequency = at.Frequency + (frequencyKnown ? 0 : x[size - 1]);
        for (int i = 0; i < size; i++)
            rest -= x[i] * right[i];
        return new HarmonicFit(new HarmonicModel(frequency, mean + x[0], x[1..(k + 1)], x[(k + 1)..(2 * k + 1)]), normal, frequencyKnown, Math.Max(0, rest));
    }

    private static double[,] Normal(HarmonicModel at, Dirichlet[] sums, int size)
    {
        int k = at.Harmonics, last = size - 1;
        var normal = new double[size, size];
        normal[0, 0] = sums[0].Cosine;
        for (int i = 1; i <= k; i++)
        {
            normal[i, 0] = sums[i].Cosine;
            for (int j = 1; j <= i; j++)
            {
                double difference = sums[i - j].Cosine, sum = sums[i + j].Cosine;
                normal[i, j] = (difference + sum) / 2;
                normal[k + i, k + j] = (difference - sum) / 2;
            }
        }
        if (last == 2 * k)
            return normal;
        // The column of the frequency is 2πt Σ j (b_j cos - a_j sin).
        for (int j = 1; j <= k; j++)
        {
            double a = 2 * Math.PI * j * at.Cosines[j - 1], b = 2 * Math.PI * j * at.Sines[j - 1];
            normal[last, 0] -= a * sums[j].TimeSine;
            for (int i = 1; i <= k; i++)
            {
                double sum = sums[i + j].TimeSine, difference = Math.Sign(i - j) * sums[Math.Abs(i - j)].TimeSine;
                // Σ t cos(i) sin(j) and Σ t sin(i) cos(j).
                normal[last, i] -= a * (sum - difference) / 2;
                normal[last, k + i] += b * (sum + difference) / 2;
                double c = 2 * Math.PI * i * at.Cosines[i - 1], s = 2 * Math.PI * i * at.Sines[i - 1];
                double plus = sums[i + j].SquareCosine, minus = sums[Math.Abs(i - j)].SquareCosine;
                normal[last, last] += (b * s * (minus + plus) + a * c * (minus - plus)) / 2;
            }
        }
        return normal;
    }
}
