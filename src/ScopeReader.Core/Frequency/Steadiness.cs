namespace ScopeReader.Frequency;

/// <summary>Whether a record is one steady wave, from its parts laid beside the whole.</summary>
/// <param name="Kind">The strongest way in which it is not, or that it is.</param>
public sealed record Steadiness(SteadinessKind Kind)
{
    /// <summary>Largest distance of a part's phase from that of a constant frequency, cycles; 0 where noise explains it.</summary>
    public double PhaseExcursion { get; init; }

    /// <summary>Largest distance of a part's frequency from the mean, of the mean; 0 where noise explains it.</summary>
    public double FrequencyExcursion { get; init; }

    /// <summary>Largest less smallest amplitude of the parts, over their mean; 0 where noise explains it.</summary>
    public double AmplitudeRange { get; init; }

    /// <summary>Share of the record in which the wave is absent.</summary>
    public double Absent { get; init; }

    /// <summary>The strongest line that is no harmonic: its amplitude (two sidebands: their sum) over the strongest harmonic's; 0 without one.</summary>
    public double SecondToneRatio { get; init; }

    /// <summary>Where that line lies, cycles per sample.</summary>
    public double SecondTone { get; init; }

    /// <summary>Distance of that line from the harmonic, cycles per sample, where another lies as far on the other side; else 0.</summary>
    public double Modulation { get; init; }

    /// <summary>Change of frequency over the record, of the frequency, where it drifts; else 0.</summary>
    public double Drift { get; init; }

    /// <summary>Change of frequency by the sample, of the frequency, by a parabola through the parts' phases; with its standard uncertainty.</summary>
    public (double Rate, double Uncertainty, int DegreesOfFreedom)? Curvature { get; init; }
}
