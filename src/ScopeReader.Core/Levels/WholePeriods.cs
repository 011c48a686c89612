namespace ScopeReader.Levels;

/// <summary>Means over whole periods.</summary>
/// <remarks>
/// The weight of a sample rises over the first period and falls over the last (a box of whole periods smoothed by a box of
/// one), so that a period that is no whole number of samples leaves no end effect. Over sixteen periods or more the record
/// is cut into eight blocks, whose scatter is the uncertainty, whatever the noise's spectrum; under that, white noise.
/// </remarks>
internal static class WholePeriods
{
    private const int Blocks = 8, FewestForBlocks = 16, FewestForThreads = 1 << 18;

    /// <summary>Mean and mean square, each with its standard uncertainty.</summary>
    /// <param name="memory">Shape [n].</param>
    /// <param name="period">The period, samples, at most n.</param>
    /// <param name="noise">Rms noise of one sample, for short records.</param>
    public static (Estimate Mean, Estimate Square, int Periods) Average(ReadOnlyMemory<double> memory, double period, double noise)
    {
        ReadOnlySpan<double> samples = memory.Span;
        int periods = (int)Math.Floor(samples.Length / period);
        // About the middle of the record's values: squares of a large offset would cost digits.
        double shift = samples[0];
        if (periods < FewestForBlocks)
        {
            (double mean, double square, double effective) = Block(samples, 0, periods, period, shift);
            double u = noise / Math.Sqrt(effective), rms = Math.Sqrt(Math.Max(0, square + 2 * shift * mean + shift * shift));
            return (new Estimate(shift + mean, u, null), new Estimate(rms * rms, 2 * rms * u, null), periods);
        }

        int perBlock = periods / Blocks;
        double[] means = new double[Blocks], squares = new double[Blocks];
        void One(int b)
        {
            int start = (int)((long)b * memory.Length / Blocks);
            (double mean, double square, _) = Block(memory.Span, start, perBlock, period, shift);
            (means[b], squares[b]) = (shift + mean, square + 2 * shift * mean + shift * shift);
        }
        // Each block on its own, so that the sums do not depend on how many cores share the work.
        if (memory.Length > FewestForThreads)
            Parallel.For(0, Blocks, One);
        else
            for (int b = 0; b < Blocks; b++)
                One(b);
        return (OfBlocks(means), OfBlocks(squares), perBlock * Blocks);
    }

    /// <summary>A value, its standard uncertainty and its degrees of freedom.</summary>
    public readonly record struct Estimate(double Value, double Uncertainty, double? DegreesOfFreedom);

    private static Estimate OfBlocks(double[] values)
    {
        double mean = 0, squares = 0;
        foreach (double value in values)
            mean += value / values.Length;
        foreach (double value in values)
            squares += (value - mean) * (value - mean);
        return new Estimate(mean, Math.Sqrt(squares / (values.Length - 1) / values.Length), values.Length - 1);
    }

    private static (double Mean, double Square, double Effective) Block(ReadOnlySpan<double> samples, int start, int periods, double period, double shift)
    {
        double span = periods * period, ramp = periods > 1 ? period : 1;
        int end = Math.Min(samples.Length, start + (int)Math.Ceiling(span));
        double weights = 0, squaredWeights = 0, sum = 0, squares = 0;
        for (int i = start; i < end; i++)
        {
            double t = i - start + 0.5, weight = Math.Clamp(Math.Min(t, span - t + (periods > 1 ? 0 : 0.5)) / ramp, 0, 1), value = samples[i] - shift;
            weights += weight;
            squaredWeights += weight * weight;
            sum += weight * value;
            squares += weight * value * value;
        }
        return (sum / weights, squares / weights, weights * weights / squaredWeights);
    }
}
