using System.Numerics;

namespace ScopeReader.Signals;

/// <summary>A second-order response, or a wave of which a share passes through one.</summary>
/// <param name="UndampedFrequency">ω_n/2π, Hz.</param>
/// <param name="DampingRatio">ζ, above 0 and below 1.</param>
/// <param name="Share">The part of the wave that passes through it, above 0; the rest goes straight. 1 for all of it.</param>
public sealed record Resonance(double UndampedFrequency, double DampingRatio, double Share = 1)
{
    /// <summary>ω_n, rad/s.</summary>
    public double AngularFrequency => 2 * Math.PI * UndampedFrequency;

    /// <summary>The frequency at which it rings, Hz.</summary>
    public double DampedFrequency => UndampedFrequency * Math.Sqrt(1 - DampingRatio * DampingRatio);

    /// <summary>Time to 1/e, s.</summary>
    public double DecayTime => 1 / (DampingRatio * AngularFrequency);

    /// <summary>The pole in the upper half plane, 1/s.</summary>
    public Complex Pole => new(-1 / DecayTime, 2 * Math.PI * DampedFrequency);

    /// <summary>Response to a sine.</summary>
    /// <param name="frequency">Hz.</param>
    public Complex At(double frequency)
    {
        double r = frequency / UndampedFrequency;
        return 1 - Share + Share / new Complex(1 - r * r, 2 * DampingRatio * r);
    }

    /// <summary>The ringing after a unit step with Gaussian edge, well after it: Re(this · e^(pole·t)), t from the middle of the step.</summary>
    /// <remarks>
    /// The unit step gives 1 − Re((1 − jα/ω_d) e^(pt)); convolved with a Gaussian of standard deviation s, e^(pt) becomes
    /// e^(p²s²/2) e^(pt).
    /// </remarks>
    /// <param name="edgeSigma">s, seconds.</param>
    public Complex Ringing(double edgeSigma)
    {
        Complex p = Pole;
        return -Share * new Complex(1, p.Real / p.Imaginary) * Complex.Exp(p * p * edgeSigma * edgeSigma / 2);
    }
}
