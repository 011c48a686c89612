namespace ScopeReader.Harmonics;

/// <summary>Where sampling shows frequencies above half of the sample rate.</summary>
public static class Folding
{
    /// <summary>The frequency that samples show.</summary>
    /// <param name="frequency">True frequency, 0 or more.</param>
    /// <param name="sampleRate">In the same unit, above 0.</param>
    /// <returns>0 to half of the sample rate: |f - fs·round(f/fs)|.</returns>
    public static double Apparent(double frequency, double sampleRate) =>
        Math.Abs(frequency - sampleRate * Math.Round(frequency / sampleRate));
}
