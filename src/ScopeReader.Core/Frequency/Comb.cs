using ScopeReader.Numerics;

namespace ScopeReader.Frequency;

/// <summary>The lines of a periodic wave, as far as a frequency estimate is disturbed by them.</summary>
internal sealed class Comb
{
    private const int MostHarmonics = 20;

    private readonly HarmonicModel _model;
    private readonly int _count;

    private Comb(HarmonicModel model, NoiseSpectrum noise, int count) => (_model, Noise, _count) = (model, noise, count);

    /// <summary>What is left when the lines are taken out.</summary>
    public NoiseSpectrum Noise { get; }

    /// <summary>Amplitude of the harmonic of an order, peak, in the samples' unit.</summary>
    public double Amplitude(int order) => _model.Amplitude(order);

    /// <summary>Fits the lines at a known fundamental.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="fundamental">Cycles per sample.</param>
    /// <param name="atLeast">The order that has to be among them.</param>
    public static Comb? Find(ReadOnlySpan<double> samples, double fundamental, int atLeast = 1)
    {
        // A harmonic within a cycle a record of half the sample rate cannot be told from its own image.
        int most = (int)((0.5 - 1.0 / samples.Length) / fundamental);
        int wanted = Math.Min(most, Math.Max(atLeast, Math.Min(MostHarmonics, samples.Length / 16)));
        for (int harmonics = wanted; harmonics >= atLeast && harmonics > 0; harmonics = harmonics == wanted ? atLeast : 0)
            if (HarmonicFit.At(samples, fundamental, harmonics) is { } fit)
                return new Comb(fit.Model, new NoiseSpectrum(fit.Model.Residual(samples), fundamental, fit.Unknowns), samples.Length);
        return null;
    }

    /// <summary>Every line but one, images at negative frequencies and folded harmonics too: its place from that one, cycles a record, and its amplitude over that one's.</summary>
    /// <param name="order">The line that is left out.</param>
    public IEnumerable<(double Distance, double Ratio)> Around(int order)
    {
        double cycles = _model.Frequency * _count, one = _model.Amplitude(order);
        yield return (-2 * order * cycles, 1);
        yield return (_count - 2 * order * cycles, 1);
        for (int k = 1; k <= _model.Harmonics; k++)
            if (k != order)
            {
                double ratio = _model.Amplitude(k) / one;
                yield return ((k - order) * cycles, ratio);
                yield return (-(k + order) * cycles, ratio);
            }
        foreach ((double distance, double ratio) in Folded(order))
            yield return (distance, ratio / one);
    }

    // Harmonics above half the sample rate are not seen but fold onto the comb where the two rates are nearly commensurate.
    // They are taken to fall off as those of a step do, 1/k, from the strongest of the last two that are seen.
    private IEnumerable<(double Distance, double Amplitude)> Folded(int order)
    {
        int seen = _model.Harmonics;
        if ((seen + 1) * _model.Frequency < 0.5 - 1.0 / _count)
            yield break;
        double last = Math.Max(_model.Amplitude(seen), _model.Amplitude(Math.Max(1, seen - 1)));
        for (int k = seen + 1; k <= 4 * seen; k++)
        {
            double frequency = k * _model.Frequency;
            double distance = (Math.Abs(frequency - Math.Round(frequency)) - order * _model.Frequency) * _count;
            if (Math.Abs(distance) < 0.4 * _model.Frequency * _count)
                yield return (distance, last * seen / k);
        }
    }
}
