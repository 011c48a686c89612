using ScopeReader.Numerics;
using ScopeReader.Readings;

namespace ScopeReader.Frequency;

/// <summary>Frequency by a Hann-windowed Fourier transform, interpolated between the two largest bins.</summary>
/// <remarks>
/// <para>With α the ratio of the second largest bin to the largest, δ = (2α - 1)/(α + 1) bins towards it: exact for one tone
/// and many samples (Rife and Vincent, Bell Syst. Tech. J. 49 (1970) 197, class I; from memory).</para>
/// <para>Uncertainty: the noise density near the tone, carried through both bins, whose noises have the correlation 2/3 that
/// Hann gives them; and the leakage of the tone's image and of its harmonics. Standard deviation 1.6 to 2 times the bound.</para>
/// <para>Records above 2^18 samples: the 2^18 in their middle; it is a quick view and a start value.</para>
/// </remarks>
public static class InterpolatedFft
{
    /// <summary>The method's name in readings.</summary>
    public const string Method = "interpolated-fft";

    private const int LongestTransform = 1 << 18, FewestSamples = 32;
    private const double FewestCycles = 4, NeighbourCorrelation = 2.0 / 3;

    /// <summary>Estimates the repetition frequency.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <returns>The estimate, or null: fewer than 32 samples or 4 cycles, or no line stands out of the noise.</returns>
    public static FrequencyEstimate? Estimate(ReadOnlySpan<double> samples)
    {
        if (samples.Length < FewestSamples)
            return null;
        int length = RealTransform.FastLengthAtMost(Math.Min(samples.Length, LongestTransform));
        samples = samples.Slice((samples.Length - length) / 2, length);
        var spectrum = new LineSpectrum(samples);
        if (spectrum.Strongest() is not { } bin)
            return null;

        int order = spectrum.OrderOf(bin);
        double largest = spectrum.Magnitude(bin), left = spectrum.Magnitude(bin - 1), right = spectrum.Magnitude(bin + 1);
        int side = right >= left ? 1 : -1;
        double alpha = Math.Max(left, right) / largest, offset = (2 * alpha - 1) / (1 + alpha);
        double frequency = (bin + side * offset) / length / order;
        if (frequency * length < FewestCycles || frequency * order >= 0.5 || Comb.Find(samples, frequency, order) is not { } comb)
            return null;

        // Noise in phase with the line, in either bin: half the noise power.
        (double variance, double degreesOfFreedom) = comb.Noise.Near(order * frequency);
        double ratio = Math.Sqrt(variance * spectrum.WindowPower / 2) / largest;
        double slope = 3 / ((1 + alpha) * (1 + alpha)), toCycles = 1.0 / length / order;
        double noise = slope * ratio * Math.Sqrt(1 + alpha * alpha - 2 * NeighbourCorrelation * alpha);
        double leakage = Leakage(comb.Around(order), alpha, offset, side);
        double folded = comb.Folded(order).Sum(line => Math.Abs(Change(line, alpha, offset, side))) / Window.Hann.Response(offset);
        return new FrequencyEstimate(Method, frequency,
            [
                BudgetTerm.Normal("noise", noise * toCycles, degreesOfFreedom: degreesOfFreedom),
                // Known, but left in: an error of that size.
                BudgetTerm.Rectangular("leakage", Math.Sqrt(3) * slope * Math.Abs(leakage) * toCycles),
                BudgetTerm.Rectangular("folding", slope * folded * toCycles),
            ],
            (int)(frequency * length));
    }

    // Change of α by other lines, each turned into the phase of the line that is measured, in the middle of the record.
    private static double Leakage(IEnumerable<Comb.Neighbour> lines, double alpha, double offset, int side)
    {
        double sum = 0;
        foreach (Comb.Neighbour line in lines)
            sum += Change(line, alpha, offset, side) * Math.Cos(line.Phase);
        return sum / Window.Hann.Response(offset);
    }

    private static double Change(Comb.Neighbour line, double alpha, double offset, int side)
    {
        double atLargest = Window.Hann.Response(side * line.Distance + offset), atSecond = Window.Hann.Response(side * line.Distance + offset - 1);
        return line.Ratio * (atSecond - alpha * atLargest);
    }
}
