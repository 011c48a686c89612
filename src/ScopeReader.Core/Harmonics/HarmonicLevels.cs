using ScopeReader.Levels;
using ScopeReader.Numerics;

namespace ScopeReader.Harmonics;

/// <summary>The levels of fundamental and harmonics of a wave of known frequency, and what is left beside them.</summary>
/// <remarks>
/// A joint least-squares fit of offset and every harmonic below half of the sample rate: neither leakage nor scalloping, at
/// any record length. u(A) = σ√(2/N), σ² the residual's density near the harmonic. The residual is looked at in the middle of a
/// long record, 2^20 samples of it.
/// </remarks>
internal sealed class HarmonicLevels
{
    private const double MostWork = 4e8, WellKnown = 0.02, Rounding = 1e-13;
    private const int MostModelled = 200, MostInspected = 1 << 20, HighestFolded = 4;

    private readonly HarmonicFit _fit;
    private readonly NoiseSpectrum _noise;
    private readonly StepError[] _steps;
    private readonly int _count;

    private HarmonicLevels(HarmonicFit fit, NoiseSpectrum noise, double[] residual, ReadOnlySpan<double> samples, double frequencyUncertainty, int harmonics)
    {
        (_fit, _noise, _count, FrequencyUncertainty) = (fit, noise, samples.Length, frequencyUncertainty);
        Rest = new NoiseLines(noise);
        Floor = NoiseFloor.Of(residual, fit.Model.Frequency, fit.Model.Harmonics, Rest);
        double variance = 0;
        foreach (double v in residual)
            variance += v * v / residual.Length;
        Step = QuantisationStep.Find(samples);
        NoiseBeforeConverter = Math.Sqrt(Math.Max(0, variance - Step * Step / 12));
        _steps = StepLines.Of(fit.Model, harmonics, Step, NoiseBeforeConverter);
    }

    /// <summary>The fundamental's frequency, cycles per sample.</summary>
    public double Frequency => _fit.Model.Frequency;

    /// <summary>Its standard uncertainty.</summary>
    public double FrequencyUncertainty { get; }

    /// <summary>How many harmonics the fit has, the fundamental among them.</summary>
    public int Modelled => _fit.Model.Harmonics;

    /// <summary>Number of samples.</summary>
    public int Count => _count;

    /// <summary>The converter's step in the samples' unit; 0 where none shows.</summary>
    public double Step { get; }

    /// <summary>σ of one sample before the converter.</summary>
    public double NoiseBeforeConverter { get; }

    /// <summary>Noise and lines beside the harmonics.</summary>
    public NoiseLines Rest { get; }

    /// <summary>The noise between all lines.</summary>
    public NoiseFloor Floor { get; }

    /// <summary>Mean square of what the fit leaves over the whole record.</summary>
    public double RestVariance => _fit.RestSquares / Math.Max(1, _count - _fit.Unknowns);

    /// <summary>Power of every fitted harmonic but the fundamental.</summary>
    public double HarmonicPower => Enumerable.Range(2, Modelled - 1).Sum(k => _fit.Model.Amplitude(k) * _fit.Model.Amplitude(k) / 2);

    /// <summary>Highest harmonic that lies below half of the sample rate by a cycle a record or more.</summary>
    public static int InBand(double frequency, int count) => (int)((0.5 - 1.0 / count) / frequency);

    /// <summary>Fits.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="frequency">Cycles per sample.</param>
    /// <param name="uncertainty">Its standard uncertainty.</param>
    /// <param name="harmonics">How many are asked for; those above half of the sample rate must not collide.</param>
    /// <returns>The levels, or null where two harmonics cannot be told apart.</returns>
    public static HarmonicLevels? Fit(ReadOnlySpan<double> samples, double frequency, double uncertainty, int harmonics)
    {
        int inspected = Math.Min(samples.Length, MostInspected);
        // A harmonic a fraction x of a cycle off over the record reads low by π²x²/6 of itself: a frequency not known that well is fitted too.
        int inBand = InBand(frequency, samples.Length), free = Math.Min(harmonics, inBand);
        if (uncertainty * free * samples.Length > WellKnown && HarmonicFit.From(samples, frequency, free) is { } found)
        {
            var around = new NoiseSpectrum(found.Model.Residual(samples, inspected), found.Model.Frequency, found.Unknowns);
            (frequency, uncertainty) = (found.Model.Frequency, Math.Sqrt(around.Near(frequency).Variance * found.FrequencyVariance));
        }
        if (HarmonicFit.At(samples, frequency, harmonics) is not { } fit)
            return null;
        double[] residual = fit.Model.Residual(samples, inspected);
        var noise = new NoiseSpectrum(residual, frequency, fit.Unknowns);
        int affordable = Math.Min((int)Math.Min(MostModelled, MostWork / samples.Length), samples.Length / 8), more = Math.Min(inBand, affordable);
        if (more > harmonics && HasMore(noise, frequency, harmonics, more) && HarmonicFit.At(samples, frequency, more) is { } whole)
        {
            fit = whole;
            residual = fit.Model.Residual(samples, inspected);
            noise = new NoiseSpectrum(residual, frequency, fit.Unknowns);
        }
        return new HarmonicLevels(fit, noise, residual, samples, uncertainty, harmonics);
    }

    /// <summary>One of them.</summary>
    public HarmonicLevel this[int order]
    {
        get
        {
            HarmonicModel model = _fit.Model;
            double amplitude = model.Amplitude(order), fundamental = model.Amplitude(1);
            (double cosine, double sine) = _fit.Variances(order);
            (double variance, double degreesOfFreedom) = _noise.Near(Folding.Apparent(order * model.Frequency, 1));
            // What arithmetic leaves of a wave without any noise is no line.
            double noise = Math.Max(Math.Sqrt(variance * Math.Max(cosine, sine)), Rounding * fundamental);
            return new HarmonicLevel(order, amplitude, noise, degreesOfFreedom, _steps[order - 1], double.Hypot(Folded(order), Leaked(order)));
        }
    }

    /// <summary>Rms amplitude of what harmonics beyond the fit, folded, add to one of it.</summary>
    /// <remarks>
    /// Those beyond half of the sample rate come down, where the rates are nearly commensurate, within a cycle a record of others.
    /// They are taken to fall off as those of a step do, from the strongest of the last two modelled.
    /// </remarks>
    public double Folded(int order)
    {
        HarmonicModel model = _fit.Model;
        int last = model.Harmonics;
        double amplitude = Math.Max(model.Amplitude(last), model.Amplitude(Math.Max(1, last - 1))), square = 0;
        for (int k = last + 1; k <= HighestFolded * last; k++)
            square += Math.Pow(Share(Folding.Apparent(k * model.Frequency, 1), order) * amplitude * last / k, 2) / 2;
        return Math.Sqrt(square);
    }

    // A line at another frequency adds a share of itself, in a phase that is anyone's guess.
    private double Leaked(int order)
    {
        double square = 0;
        foreach (NoiseLine line in Rest.Lines)
            square += Math.Pow(Share(line.Frequency, order) * line.Amplitude, 2) / 2;
        return Math.Sqrt(square);
    }

    private double Share(double frequency, int order)
    {
        double distance = Math.PI * (frequency - Folding.Apparent(order * Frequency, 1)) * _count;
        return Math.Abs(distance) < 1e-3 ? 1 : Math.Sin(distance) / distance;
    }

    private static bool HasMore(NoiseSpectrum noise, double frequency, int from, int to)
    {
        for (int k = from + 1; k <= to; k++)
        {
            int bin = (int)Math.Round(k * frequency * noise.Length);
            if (bin + 1 < noise.Power.Length && Math.Max(noise.Power[bin], Math.Max(noise.Power[bin - 1], noise.Power[bin + 1])) > Math.Log(1000) * noise.Near(k * frequency).Variance)
                return true;
        }
        return false;
    }
}
