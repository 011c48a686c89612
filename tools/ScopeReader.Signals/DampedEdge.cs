namespace ScopeReader.Signals;

/// <summary>One step from low to high at time 0 with a damped sinusoid on what follows.</summary>
/// <remarks>After time 0: High + Ringing·(High − Low)·e^(−t/DecayTime)·cos(2πft + phase); before it: Low.</remarks>
public sealed record DampedEdge : ISignal
{
    /// <summary>Level before the edge, V.</summary>
    public double Low { get; init; }

    /// <summary>Settled level after it, V.</summary>
    public double High { get; init; } = 1;

    /// <summary>Envelope at time 0, of amplitude.</summary>
    public double Ringing { get; init; } = 0.2;

    /// <summary>Frequency of the ringing, Hz.</summary>
    public double Frequency { get; init; } = 10e6;

    /// <summary>Time to 1/e, s.</summary>
    public double DecayTime { get; init; } = 200e-9;

    /// <summary>Phase of the cosine at time 0.</summary>
    public double PhaseDegrees { get; init; } = 180;

    /// <inheritdoc/>
    public double At(double time) => time < 0 ? Low : High + Ringing * (High - Low) * Math.Exp(-time / DecayTime)
        * Math.Cos(2 * Math.PI * Frequency * time + PhaseDegrees * Math.PI / 180);

    /// <summary>What is known of it, by quantity identifier.</summary>
    public IReadOnlyDictionary<string, double> Truth()
    {
        double decay = 1 / DecayTime, angular = 2 * Math.PI * Frequency, ratio = decay / double.Hypot(decay, angular);
        return new Dictionary<string, double>
        {
            ["high-level"] = High,
            ["low-level"] = Low,
            ["amplitude"] = High - Low,
            ["ringing-frequency"] = Frequency,
            ["ringing-damping-ratio"] = ratio,
            ["ringing-q"] = 1 / (2 * ratio),
            ["ringing-decay-time"] = DecayTime,
            ["ringing-amplitude"] = 100 * Ringing,
        };
    }
}
