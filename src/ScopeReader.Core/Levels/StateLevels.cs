namespace ScopeReader.Levels;

/// <summary>The two states of a two-state waveform (IEEE Std 181), without the chain's gain and offset terms.</summary>
/// <param name="Low">Low state level, in the channel's unit.</param>
/// <param name="High">High state level, above <paramref name="Low"/>.</param>
/// <param name="LowUncertainty">Standard uncertainty of the low level, the capture's own part.</param>
/// <param name="HighUncertainty">Standard uncertainty of the high level.</param>
/// <param name="Noise">Rms noise of one sample on the states.</param>
public sealed record StateLevels(double Low, double High, double LowUncertainty, double HighUncertainty, double Noise)
{
    /// <summary>High minus low.</summary>
    public double Amplitude => High - Low;

    /// <summary>The level at a fraction of amplitude: 0 is low, 1 high.</summary>
    public double At(double fraction) => Low + fraction * (High - Low);
}
