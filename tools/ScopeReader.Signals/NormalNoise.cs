namespace ScopeReader.Signals;

/// <summary>Seeded random numbers that are the same on every machine and runtime.</summary>
/// <remarks>Bits: SplitMix64 (Steele, Lea and Flood 2014; constants from memory). Normal values: Box and Muller 1958.</remarks>
public sealed class NormalNoise(ulong seed)
{
    private ulong _state = seed;
    private double? _spare;

    /// <summary>A value in [0, 1).</summary>
    public double Uniform() => (Bits() >> 11) * (1.0 / (1UL << 53));

    /// <summary>A value in [low, high).</summary>
    public double Uniform(double low, double high) => low + (high - low) * Uniform();

    /// <summary>A value of the standard normal distribution.</summary>
    public double Normal()
    {
        if (_spare is { } spare)
        {
            _spare = null;
            return spare;
        }
        double radius = Math.Sqrt(-2 * Math.Log(1 - Uniform())), angle = 2 * Math.PI * Uniform();
        _spare = radius * Math.Sin(angle);
        return radius * Math.Cos(angle);
    }

    private ulong Bits()
    {
        _state += 0x9E3779B97F4A7C15;
        ulong z = _state;
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EB;
        return z ^ (z >> 31);
    }
}
