using ScopeReader.Numerics;

namespace ScopeReader.Frequency;

/// <summary>The lines of a periodic wave, as far as a frequency estimate is disturbed by them.</summary>
internal sealed class Comb
{
    private const int FewestHarmonics = 20, MostHarmonics = 64, HighestFolded = 1000, LongestPart = 1 << 17;
    private const double MostWork = 3e7, FewestCycles = 64;

    private readonly HarmonicModel _model;
    private readonly int _count;

    private Comb(HarmonicModel model, NoiseSpectrum noise, int count, int inspected) => (_model, Noise, _count, Inspected) = (model, noise, count, inspected);

    /// <summary>How many samples in the middle of the record the lines are fitted to.</summary>
    public int Inspected { get; }

    /// <summary>The fitted lines; of a long record those in its middle.</summary>
    public HarmonicModel Model => _model;

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
        ReadOnlySpan<double> part = Middle(samples, fundamental);
        int affordable = (int)Math.Clamp(MostWork / part.Length, FewestHarmonics, MostHarmonics);
        int wanted = Math.Min(most, Math.Max(atLeast, Math.Min(affordable, part.Length / 16)));
        for (int harmonics = wanted; harmonics >= atLeast && harmonics > 0; harmonics = harmonics == wanted ? atLeast : 0)
            if (HarmonicFit.At(part, fundamental, harmonics) is { } fit)
                return new Comb(fit.Model, new NoiseSpectrum(fit.Model.Residual(part), fundamental, fit.Unknowns), samples.Length, part.Length);
        return null;
    }

    /// <summary>The middle of a long record: enough to know its lines and its noise by. Its middle is that of the record.</summary>
    public static ReadOnlySpan<double> Middle(ReadOnlySpan<double> samples, double fundamental)
    {
        int length = (int)Math.Max(LongestPart, Math.Min(samples.Length, Math.Ceiling(FewestCycles / fundamental)));
        if (length >= samples.Length)
            return samples;
        length -= (samples.Length - length) % 2;
        return samples.Slice((samples.Length - length) / 2, length);
    }

    /// <summary>Every line but one, images at negative frequencies too.</summary>
    /// <param name="order">The line that is left out.</param>
    public IEnumerable<Neighbour> Around(int order)
    {
        double cycles = _model.Frequency * _count, one = _model.Amplitude(order), phase = _model.Phase(order);
        yield return new Neighbour(-2 * order * cycles, 1, -2 * phase);
        // Its next image, a sample rate up: half-integer instants of an even record change sign from one to the other.
        yield return new Neighbour(_count - 2 * order * cycles, _count % 2 == 0 ? -1 : 1, -2 * phase);
        for (int k = 1; k <= _model.Harmonics; k++)
            if (k != order)
            {
                double ratio = _model.Amplitude(k) / one;
                yield return new Neighbour((k - order) * cycles, ratio, _model.Phase(k) - phase);
                yield return new Neighbour(-(k + order) * cycles, ratio, -_model.Phase(k) - phase);
            }
    }

    /// <summary>Harmonics that are not modelled and fold close to one that is, where the sample rate is nearly commensurate.</summary>
    /// <param name="order">The line they fold onto.</param>
    /// <remarks>They are taken to fall off as those of a step do, 1/k, from the strongest of the last two that are modelled. Their phases are not known.</remarks>
    public IEnumerable<Neighbour> Folded(int order)
    {
        int seen = _model.Harmonics;
        double last = Math.Max(_model.Amplitude(seen), _model.Amplitude(Math.Max(1, seen - 1))) / _model.Amplitude(order);
        for (int k = seen + 1; k <= Math.Min(HighestFolded, 2 / _model.Frequency + 2); k++)
        {
            double frequency = k * _model.Frequency;
            double distance = (Math.Abs(frequency - Math.Round(frequency)) - order * _model.Frequency) * _count;
            if (Math.Abs(distance) < 0.4 * _model.Frequency * _count)
                yield return new Neighbour(distance, last * seen / k, 0);
        }
    }

    /// <summary>Another line beside the one that is measured.</summary>
    /// <param name="Distance">Its place from that one, cycles a record.</param>
    /// <param name="Ratio">Its amplitude over that one's.</param>
    /// <param name="Phase">Its phase less that one's at the middle of the record, rad.</param>
    public readonly record struct Neighbour(double Distance, double Ratio, double Phase);
}
