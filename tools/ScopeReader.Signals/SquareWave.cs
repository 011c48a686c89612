using System.Numerics;
using ScopeReader.Levels;

namespace ScopeReader.Signals;

/// <summary>A two-state wave with Gaussian edges, seen through an optional resonance: exactly periodic and band-limited.</summary>
/// <remarks>
/// The rising edge's middle is at time 0, the falling edge's at <see cref="DutyFactor"/> of the period, before the
/// resonance delays them. Coefficients: A/(j2πk)·(G_r − e^(−j2πkd) G_f)·H(kf), with G = exp(−2π²k²s²), s the standard
/// deviation of the edge in cycles; an edge takes 2.5631 s from 10 to 90 %.
/// </remarks>
public sealed record SquareWave
{
    /// <summary>10 to 90 % of a Gaussian edge over its standard deviation: 2 Φ⁻¹(0.9).</summary>
    public const double RiseTimeOverSigma = 2.5631031310892007;

    /// <summary>Where the coefficients are cut off: below the resolution of a double.</summary>
    private const double Negligible = 1e-18;

    private readonly Lazy<PeriodicSignal> _signal;

    /// <summary>A wave of 1 V at 455 kHz with edges of 50 ns.</summary>
    public SquareWave() => _signal = new(Build);

    // A changed copy must not carry the table of the wave that it was copied from.
    private SquareWave(SquareWave other)
    {
        (Frequency, Low, High, DutyFactor) = (other.Frequency, other.Low, other.High, other.DutyFactor);
        (RiseTime, FallTime, Resonance) = (other.RiseTime, other.FallTime, other.Resonance);
        _signal = new(Build);
    }

    /// <summary>Repetition frequency, Hz.</summary>
    public double Frequency { get; init; } = 455e3;

    /// <summary>Settled low level, V.</summary>
    public double Low { get; init; }

    /// <summary>Settled high level, V.</summary>
    public double High { get; init; } = 1;

    /// <summary>Time high over the period, 0 to 1.</summary>
    public double DutyFactor { get; init; } = 0.5;

    /// <summary>10 to 90 % of the rising edge before the resonance, s.</summary>
    public double RiseTime { get; init; } = 50e-9;

    /// <summary>90 to 10 % of the falling edge before the resonance, s; null for the rise time.</summary>
    public double? FallTime { get; init; }

    /// <summary>What rings; null for nothing.</summary>
    public Resonance? Resonance { get; init; }

    /// <summary>High minus low, V.</summary>
    public double Amplitude => High - Low;

    /// <summary>Standard deviation of the rising edge, s.</summary>
    public double RiseSigma => RiseTime / RiseTimeOverSigma;

    /// <summary>Standard deviation of the falling edge, s.</summary>
    public double FallSigma => (FallTime ?? RiseTime) / RiseTimeOverSigma;

    /// <summary>The wave, noise-free.</summary>
    public PeriodicSignal Signal => _signal.Value;

    /// <summary>
    /// Every quantity of it, by identifier, in the quantity's base unit; where methods rightly differ, also by
    /// identifier/method.
    /// </summary>
    /// <param name="settings">Reference levels and regions; null for the defaults.</param>
    public IReadOnlyDictionary<string, double> Truth(LevelSettings? settings = null) => SquareWaveTruth.Of(this, settings ?? LevelSettings.Default);

    private PeriodicSignal Build()
    {
        double rise = RiseSigma * Frequency, fall = FallSigma * Frequency, finest = Math.Min(rise, fall);
        int count = (int)Math.Ceiling(Math.Sqrt(-Math.Log(Negligible) / (2 * Math.PI * Math.PI)) / finest) + 2;
        var coefficients = new Complex[count];
        coefficients[0] = Low + Amplitude * DutyFactor;
        for (int k = 1; k < count; k++)
        {
            Complex edges = Gauss(k * rise) - Gauss(k * fall) * Complex.FromPolarCoordinates(1, -2 * Math.PI * k * DutyFactor);
            coefficients[k] = Amplitude * edges / new Complex(0, 2 * Math.PI * k) * (Resonance?.At(k * Frequency) ?? 1);
        }
        return new PeriodicSignal(Frequency, new FourierSeries(coefficients), finest);
    }

    private static double Gauss(double x) => Math.Exp(-2 * Math.PI * Math.PI * x * x);
}
