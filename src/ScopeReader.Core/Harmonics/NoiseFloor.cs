using ScopeReader.Numerics;

namespace ScopeReader.Harmonics;

/// <summary>The noise of a waveform between its lines, from the averaged periodogram of what the fit leaves.</summary>
/// <param name="Variance">Of one sample: the mean density of the bins that no line touches.</param>
/// <param name="DegreesOfFreedom">Of the variance.</param>
internal sealed record NoiseFloor(double Variance, double DegreesOfFreedom)
{
    private const int LongestSegment = 1 << 14, FewestSegments = 8, ShortestSegment = 64, Lobe = 3;

    // Below this share of bins left free the mean is that of a corner of the band.
    private const double FewestFree = 0.25;

    /// <summary>Measures it; where a record is short or full of lines, from one long periodogram.</summary>
    /// <param name="residual">Shape [n]: the samples less the model.</param>
    /// <param name="frequency">The fundamental's, cycles per sample.</param>
    /// <param name="modelled">How many harmonics the model has.</param>
    /// <param name="rest">The lines beside them, and the noise as the long periodogram has it.</param>
    public static NoiseFloor Of(ReadOnlySpan<double> residual, double frequency, int modelled, NoiseLines rest)
    {
        int segment = residual.Length / FewestSegments >= ShortestSegment ? RealTransform.FastLengthAtMost(Math.Min(LongestSegment, residual.Length / FewestSegments)) : 0;
        if (segment == 0)
            return new NoiseFloor(rest.Variance, rest.DegreesOfFreedom);
        var averaged = new AveragedPeriodogram(residual, segment, Window.Hann);
        var taken = new bool[averaged.Power.Length];
        for (int k = 0; k <= modelled; k++)
            Take(taken, Folding.Apparent(k * frequency, 1) * segment);
        foreach (NoiseLine line in rest.Lines)
            Take(taken, line.Frequency * segment);
        double sum = 0, squares = 0;
        int count = 0;
        for (int k = 0; k < taken.Length - 1; k++)
            if (!taken[k])
                (sum, squares, count) = (sum + averaged.Power[k], squares + averaged.Power[k] * averaged.Power[k], count + 1);
        if (count < FewestFree * taken.Length)
            return new NoiseFloor(rest.Variance, rest.DegreesOfFreedom);
        double whiteness = Math.Min(1, sum * sum / (count * squares)), share = (double)count / taken.Length;
        return new NoiseFloor(sum / count, Math.Max(1, averaged.Efficiency * averaged.Covered * whiteness * share));
    }

    private static void Take(bool[] taken, double bin)
    {
        for (int k = Math.Max(0, (int)Math.Floor(bin) - Lobe + 1); k <= Math.Min(taken.Length - 1, (int)Math.Ceiling(bin) + Lobe - 1); k++)
            taken[k] = true;
    }
}
