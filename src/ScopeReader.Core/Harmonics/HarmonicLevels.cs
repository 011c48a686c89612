using ScopeReader.Levels;
using ScopeReader.Numerics;

namespace ScopeReader.Harmonics;

/// <summary>The levels of fundamental and harmonics of a wave of known frequency.</summary>
/// <remarks>
/// A joint least-squares fit of offset and every harmonic below half of the sample rate: neither leakage nor scalloping, at
/// any record length. u(A) = σ√(2/N), σ² the residual's density near the harmonic.
/// </remarks>
internal sealed class HarmonicLevels
{
    private const double MostWork = 4e8, WellKnown = 0.02, Rounding = 1e-13;
    private const int MostModelled = 200;

    private readonly HarmonicFit _fit;
    private readonly NoiseSpectrum _noise;
    private readonly double[] _steps;
    private readonly int _count;

    private HarmonicLevels(HarmonicFit fit, ReadOnlySpan<double> samples, double frequencyUncertainty, int harmonics)
    {
        double[] residual = fit.Model.Residual(samples);
        (_fit, _count, FrequencyUncertainty) = (fit, samples.Length, frequencyUncertainty);
        _noise = new NoiseSpectrum(residual, fit.Model.Frequency, fit.Unknowns);
        double step = QuantisationStep.Find(samples), variance = 0;
        foreach (double v in residual)
            variance += v * v / residual.Length;
        _steps = StepLines.Rms(fit.Model, harmonics, step, Math.Sqrt(Math.Max(0, variance - step * step / 12)));
    }

    /// <summary>The fundamental's frequency, cycles per sample.</summary>
    public double Frequency => _fit.Model.Frequency;

    /// <summary>Its standard uncertainty.</summary>
    public double FrequencyUncertainty { get; }

    /// <summary>Highest harmonic that lies below half of the sample rate by a cycle a record or more.</summary>
    public static int InBand(double frequency, int count) => (int)((0.5 - 1.0 / count) / frequency);

    /// <summary>Fits.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="frequency">Cycles per sample.</param>
    /// <param name="uncertainty">Its standard uncertainty.</param>
    /// <param name="harmonics">How many are asked for, all in band.</param>
    /// <returns>The levels, or null where two harmonics cannot be told apart.</returns>
    public static HarmonicLevels? Fit(ReadOnlySpan<double> samples, double frequency, double uncertainty, int harmonics)
    {
        // A harmonic a fraction x of a cycle off over the record reads low by π²x²/6 of itself: a frequency not known that well is fitted too.
        if (uncertainty * harmonics * samples.Length > WellKnown && HarmonicFit.From(samples, frequency, harmonics) is { } free)
        {
            var noise = new NoiseSpectrum(free.Model.Residual(samples), free.Model.Frequency, free.Unknowns);
            (frequency, uncertainty) = (free.Model.Frequency, Math.Sqrt(noise.Near(frequency).Variance * free.FrequencyVariance));
        }
        int affordable = (int)Math.Min(MostModelled, MostWork / samples.Length);
        int modelled = Math.Min(InBand(frequency, samples.Length), Math.Max(harmonics, Math.Min(affordable, samples.Length / 8)));
        HarmonicFit? fit = HarmonicFit.At(samples, frequency, modelled) ?? HarmonicFit.At(samples, frequency, harmonics);
        return fit is null ? null : new HarmonicLevels(fit, samples, uncertainty, harmonics);
    }

    /// <summary>One of them.</summary>
    public HarmonicLevel this[int order]
    {
        get
        {
            HarmonicModel model = _fit.Model;
            double amplitude = model.Amplitude(order), fundamental = model.Amplitude(1);
            (double cosine, double sine) = _fit.Variances(order);
            (double variance, double degreesOfFreedom) = _noise.Near(order * model.Frequency);
            // What arithmetic leaves of a wave without any noise is no line.
            double noise = Math.Max(Math.Sqrt(variance * Math.Max(cosine, sine)), Rounding * fundamental);
            return new HarmonicLevel(order, amplitude, noise, degreesOfFreedom, _steps[order - 1], Folded(order));
        }
    }

    // Harmonics that are not modelled: those beyond half of the sample rate come down, where the rates are nearly commensurate,
    // within a cycle a record of others. They are taken to fall off as those of a step do, from the strongest of the last two modelled.
    private double Folded(int order)
    {
        HarmonicModel model = _fit.Model;
        int last = model.Harmonics;
        double amplitude = Math.Max(model.Amplitude(last), model.Amplitude(Math.Max(1, last - 1))), square = 0;
        for (int k = last + 1; k <= 4 * last; k++)
        {
            double distance = Math.PI * (Folding.Apparent(k * model.Frequency, 1) - order * model.Frequency) * _count;
            double share = Math.Abs(distance) < 1e-3 ? 1 : Math.Sin(distance) / distance;
            square += Math.Pow(share * amplitude * last / k, 2) / 2;
        }
        return Math.Sqrt(square);
    }
}
