using ScopeReader.Numerics;
using ScopeReader.Readings;

namespace ScopeReader.Frequency;

/// <summary>Frequency of a periodic wave by a joint fit of all its harmonics that show.</summary>
/// <remarks>
/// <para>Reaches the bound of a periodic wave in white noise, u(f) = √(12σ²/(N·T²·⟨s'²⟩)): every sample counts by the square of the
/// wave's slope there. Up to 200,000 samples by least squares over the whole record (<see cref="HarmonicFit"/>); beyond that the
/// template of its middle is laid on 64 parts, and the frequency is the slope of their phases: 64 parts cost 1/64² of the certainty.</para>
/// <para>σ² is the residual's density near the harmonics, weighted as they count. Where the parts scatter more than that, the edges
/// jitter or wander, and their scatter is the uncertainty.</para>
/// </remarks>
public static class HarmonicFrequency
{
    /// <summary>The method's name in readings.</summary>
    public const string Method = "harmonic-fit";

    private const int LongestJointFit = 200_000, FewestForScatter = 10, FewestSamples = 16;
    private const double FewestCycles = 3, Shows = 3.5, Significant = 3;

    /// <summary>Estimates the frequency.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="comb">The wave's lines, at the start value.</param>
    /// <param name="laid">The template of those lines laid on parts of the record, at the start value.</param>
    /// <param name="start">Cycles per sample, within a few hundredths of a cycle a record.</param>
    /// <param name="crossings">What the edges gave; null where they gave nothing.</param>
    /// <returns>The estimate, or null: fewer than 16 samples or 3 cycles, or the fit does not settle near the start.</returns>
    internal static FrequencyEstimate? Estimate(ReadOnlyMemory<double> samples, Comb comb, PartFit[] laid, double start, CrossingFrequency? crossings)
    {
        int count = samples.Length, harmonics = Showing(comb);
        if (count < FewestSamples || start * count < FewestCycles || harmonics == 0)
            return null;
        double noise = Noise(comb, harmonics, out double freedom), frequency, variance;
        if (count <= LongestJointFit)
        {
            if (HarmonicFit.From(samples.Span, start, harmonics) is not { } fit)
                return null;
            (frequency, variance) = (fit.Model.Frequency, fit.FrequencyVariance);
            laid = PartFit.Over(samples, new WaveTemplate(fit.Model), frequency);
        }
        else
        {
            (frequency, variance) = (start, double.NaN);
        }

        Line? line = laid.Length < FewestForScatter ? null : Line.Through(laid);
        if (count > LongestJointFit)
        {
            if (line is null)
                return null;
            frequency += line.Slope;
            variance = line.Variance;
        }
        double u = Math.Sqrt(variance) * noise;
        string name = "noise";
        if (line is not null && line.MeanSquare > noise * noise * (1 + Significant * Math.Sqrt(2.0 / line.DegreesOfFreedom)))
            (name, u, freedom) = ("jitter", Math.Sqrt(line.Variance * line.MeanSquare), line.DegreesOfFreedom);
        var terms = new List<BudgetTerm> { BudgetTerm.Normal(name, u, degreesOfFreedom: freedom) };
        if (crossings is { CommensurateMultiple: > 0 })
            terms.Add(BudgetTerm.Rectangular(CrossingFrequency.InterpolationTerm, EdgeInterpolation.RelativeBound(EdgeInterpolation.LargestAliasing(crossings.IsResolved ? crossings.EdgeDuration : 0), count) * frequency));
        return new FrequencyEstimate(Method, frequency, terms, (int)(frequency * count));
    }

    /// <summary>The highest harmonic that stands out of the noise; 0 where none does.</summary>
    internal static int Showing(Comb comb)
    {
        for (int k = comb.Model.Harmonics; k >= 1; k--)
            if (comb.Amplitude(k) > Shows * Math.Sqrt(2 * comb.Noise.Near(k * comb.Model.Frequency).Variance / comb.Inspected))
                return k;
        return 0;
    }

    // Rms noise of a sample, were it white and as it is near the harmonics: each counts by the square of its slope.
    private static double Noise(Comb comb, int harmonics, out double degreesOfFreedom)
    {
        double sum = 0, weights = 0;
        degreesOfFreedom = 0;
        for (int k = 1; k <= harmonics; k++)
        {
            double slope = k * comb.Amplitude(k);
            (double variance, double freedom) = comb.Noise.Near(k * comb.Model.Frequency);
            (sum, weights, degreesOfFreedom) = (sum + slope * slope * variance, weights + slope * slope, Math.Max(degreesOfFreedom, freedom));
        }
        return Math.Sqrt(sum / weights);
    }

    // A straight line through the parts' phases, each weighing by its certainty.
    private sealed record Line(double Slope, double Variance, double MeanSquare, int DegreesOfFreedom)
    {
        public static Line Through(PartFit[] parts)
        {
            double weights = 0, instant = 0, phase = 0, across = 0, along = 0, squares = 0;
            foreach (PartFit part in parts)
            {
                double w = Weight(part);
                (weights, instant, phase) = (weights + w, instant + w * part.Instant, phase + w * part.Phase);
            }
            (instant, phase) = (instant / weights, phase / weights);
            foreach (PartFit part in parts)
            {
                double w = Weight(part), t = part.Instant - instant;
                (across, along) = (across + w * t * t, along + w * t * (part.Phase - phase));
            }
            double slope = along / across;
            foreach (PartFit part in parts)
            {
                double distance = part.Phase - phase - slope * (part.Instant - instant);
                squares += Weight(part) * distance * distance;
            }
            return new Line(slope, 1 / across, squares / (parts.Length - 2), parts.Length - 2);
        }

        private static double Weight(PartFit part) => part.Gain * part.Gain / (part.PhaseFactor * part.PhaseFactor);
    }
}
