namespace ScopeReader.Ringing;

/// <summary>A damped sinusoid on a level: Offset + e^(−αt)·(Cosine cos 2πft + Sine sin 2πft).</summary>
/// <param name="Frequency">f, cycles per unit of time, above 0.</param>
/// <param name="Decay">α, 1 per unit of time.</param>
/// <param name="Cosine">Cosine part at time 0.</param>
/// <param name="Sine">Sine part at time 0.</param>
/// <param name="Offset">What it dies away to.</param>
public readonly record struct DampedSinusoid(double Frequency, double Decay, double Cosine, double Sine, double Offset)
{
    /// <summary>How many unknowns it has.</summary>
    public const int Unknowns = 5;

    /// <summary>Envelope at time 0.</summary>
    public double Amplitude => double.Hypot(Cosine, Sine);

    /// <summary>Value at a time.</summary>
    public double At(double time) => Offset + Swing(time);

    /// <summary>Change of the value with f, α, Cosine, Sine and Offset, in that order.</summary>
    internal void Gradient(double time, Span<double> row)
    {
        double envelope = Math.Exp(-Decay * time);
        (double sin, double cos) = Math.SinCos(2 * Math.PI * Frequency * time);
        row[0] = 2 * Math.PI * time * envelope * (Sine * cos - Cosine * sin);
        row[1] = -time * envelope * (Cosine * cos + Sine * sin);
        row[2] = envelope * cos;
        row[3] = envelope * sin;
        row[4] = 1;
    }

    private double Swing(double time)
    {
        (double sin, double cos) = Math.SinCos(2 * Math.PI * Frequency * time);
        return Math.Exp(-Decay * time) * (Cosine * cos + Sine * sin);
    }
}
