using System.Numerics;
using ScopeReader.Levels;

namespace ScopeReader.Signals;

/// <summary>A sine with harmonics: Offset + Amplitude·(cos 2πφ + Σ r_k cos(2πkφ + p_k)).</summary>
public sealed record HarmonicSine
{
    /// <summary>Frequency of the fundamental, Hz.</summary>
    public double Frequency { get; init; } = 455e3;

    /// <summary>Peak amplitude of the fundamental, V.</summary>
    public double Amplitude { get; init; } = 1;

    /// <summary>Mean, V.</summary>
    public double Offset { get; init; }

    /// <summary>The harmonics, each number once.</summary>
    public IReadOnlyList<HarmonicLine> Harmonics { get; init; } = [];

    /// <summary>The wave, noise-free; built at each call.</summary>
    public PeriodicSignal Build()
    {
        int highest = Harmonics.Select(h => h.Number).DefaultIfEmpty(1).Max();
        var coefficients = new Complex[highest + 1];
        coefficients[0] = Offset;
        coefficients[1] = Amplitude / 2;
        foreach (HarmonicLine h in Harmonics)
            coefficients[h.Number] = Complex.FromPolarCoordinates(Amplitude / 2 * Math.Pow(10, h.LevelDbc / 20), h.PhaseDegrees * Math.PI / 180);
        // A sine's shortest feature is one radian of its highest harmonic.
        return new PeriodicSignal(Frequency, new FourierSeries(coefficients), 1 / (2 * Math.PI * highest));
    }

    /// <summary>Every quantity of it, by identifier, in the quantity's base unit.</summary>
    /// <param name="settings">How far harmonics count; null for the defaults.</param>
    public IReadOnlyDictionary<string, double> Truth(LevelSettings? settings = null) => HarmonicTruth.Of(Build(), settings ?? LevelSettings.Default);
}
