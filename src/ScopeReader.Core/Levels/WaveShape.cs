namespace ScopeReader.Levels;

/// <summary>A first look at a waveform: enough to choose the methods that suit it.</summary>
/// <param name="Kind">What kind of wave it is.</param>
/// <param name="Minimum">Smallest sample, in the channel's unit.</param>
/// <param name="Maximum">Largest sample.</param>
/// <param name="Step">Quantisation step found in the values; 0 where there is none.</param>
/// <param name="Lower">Rough lower level that transitions start from.</param>
/// <param name="Upper">Rough upper level.</param>
/// <param name="Noise">Rough rms noise of one sample.</param>
public sealed record WaveShape(WaveKind Kind, double Minimum, double Maximum, double Step, double Lower, double Upper, double Noise)
{
    /// <summary>The level half-way between the rough levels: the mean level of a sine.</summary>
    public double Middle => (Lower + Upper) / 2;

    /// <summary>Upper minus lower rough level.</summary>
    public double Swing => Upper - Lower;
}
