using ScopeReader.Numerics;
using ScopeReader.Readings;

namespace ScopeReader.Frequency;

/// <summary>A sine fitted by least squares: y = offset + amplitude · cos(2π·frequency·t + phase), t in samples from the middle of the record.</summary>
/// <remarks>
/// <para>The three- and the four-parameter fit of IEEE Std 1057 (clauses from memory, not quoted). The four-parameter fit reaches the bound
/// (Händel 2000): u(f) = √(6σ²/(π²A²N³)) cycles per sample in white noise.</para>
/// <para>σ² is not the variance of the whole residual, which harmonics fill and a front end's bandwidth thins out, but the
/// residual's density near the tone. Harmonics that the sine leaves unfitted pull it; that is a term of its own.</para>
/// </remarks>
/// <param name="Frequency">Cycles per sample.</param>
/// <param name="Amplitude">Peak, in the samples' unit, 0 or more.</param>
/// <param name="Phase">At the middle of the record, rad, -π to π.</param>
/// <param name="Offset">In the samples' unit.</param>
/// <param name="ResidualRms">Root mean square of the samples less the sine.</param>
public sealed record SineFit(double Frequency, double Amplitude, double Phase, double Offset, double ResidualRms)
{
    /// <summary>The method's name in readings.</summary>
    public const string Method = "sine-fit";

    private const double FewestCycles = 3;
    private const int FewestSamples = 16, ShortRecord = 1 << 16, Longer = 16;

    /// <summary>The three-parameter fit: amplitude, phase and offset at a known frequency.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="frequency">Cycles per sample, above 0 and below 0.5.</param>
    /// <returns>The fit, or null where the record is too short to tell the sine from its offset.</returns>
    public static SineFit? At(ReadOnlySpan<double> samples, double frequency) =>
        HarmonicFit.At(samples, frequency, 1) is { } fit ? Of(samples, fit.Model) : null;

    /// <summary>The four-parameter fit.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="start">Cycles per sample, within 0.6 cycles a record of the tone.</param>
    /// <returns>The fit, or null where it does not settle near the start.</returns>
    public static SineFit? From(ReadOnlySpan<double> samples, double start) =>
        HarmonicFit.From(samples, start, 1) is { } fit ? Of(samples, fit.Model) : null;

    /// <summary>Estimates the frequency of the fundamental.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="start">Cycles per sample.</param>
    /// <returns>The estimate, or null: fewer than 16 samples or 3 cycles, or the fit does not settle near the start.</returns>
    public static FrequencyEstimate? Estimate(ReadOnlySpan<double> samples, double start)
    {
        int count = samples.Length;
        if (count < FewestSamples || !(start > 0 && start < 0.5) || start * count < FewestCycles || Settle(samples, start) is not { } fit)
            return null;
        double frequency = fit.Model.Frequency;
        if (Comb.Find(samples, frequency) is not { } comb)
            return null;
        (double variance, double degreesOfFreedom) = comb.Noise.Near(frequency);
        double pull = 0;
        foreach (Comb.Neighbour line in comb.Around(1).Skip(2)) // The sine's own images are fitted with it.
            pull += line.Ratio * Pull(line.Distance) * Math.Cos(line.Phase);
        double folded = comb.Folded(1).Sum(line => Math.Abs(line.Ratio * Pull(line.Distance)));
        return new FrequencyEstimate(Method, frequency,
            [
                BudgetTerm.Normal("noise", Math.Sqrt(variance * fit.FrequencyVariance), degreesOfFreedom: degreesOfFreedom),
                // The pull is known but left in, for the fit is what its name says: an error of that size.
                BudgetTerm.Rectangular("harmonics", Math.Sqrt(3) * Math.Abs(pull) / count),
                BudgetTerm.Rectangular("folding", folded / count),
            ],
            (int)(frequency * count));
    }

    // A start that is good enough for a short record gives one that is good enough for a record sixteen times as long; each length costs
    // a sixteenth of the next, and the whole record is then gone through twice.
    private static HarmonicFit? Settle(ReadOnlySpan<double> samples, double start)
    {
        double frequency = start;
        for (long length = ShortRecord; length < samples.Length; length *= Longer)
        {
            int n = (int)length;
            if (HarmonicFit.From(samples.Slice((samples.Length - n) / 2, n), frequency, 1) is not { } fit)
                return null;
            frequency = fit.Model.Frequency;
        }
        return HarmonicFit.From(samples, frequency, 1);
    }

    // Error that a tone as strong as the sine, a distance away and in phase with it at the middle, gives the fitted frequency, both in cycles a record:
    // 12/T³ ∫ t sin(2πdt/T) dt over the record, in turns.
    private static double Pull(double distance)
    {
        double x = Math.PI * distance;
        return Math.Abs(x) < 1e-3 ? distance : 6 / Math.PI * (Math.Sin(x) / (2 * x * x) - Math.Cos(x) / (2 * x));
    }

    private static SineFit Of(ReadOnlySpan<double> samples, HarmonicModel model)
    {
        double sum = 0;
        foreach (double v in model.Residual(samples))
            sum += v * v;
        return new SineFit(model.Frequency, model.Amplitude(1), model.Phase(1), model.Offset, Math.Sqrt(sum / samples.Length));
    }
}
