namespace ScopeReader.Levels;

/// <summary>Reference levels and regions that edge quantities are read at.</summary>
public sealed record LevelSettings
{
    /// <summary>10 and 90 %, ±2 %, three transition durations, harmonics to 10.</summary>
    public static LevelSettings Default { get; } = new();

    /// <summary>Lower reference level, % of amplitude.</summary>
    public double ReferenceLowPercent { get; init; } = 10;

    /// <summary>Upper reference level, % of amplitude.</summary>
    public double ReferenceHighPercent { get; init; } = 90;

    /// <summary>High state level fixed by the person, in the channel's unit.</summary>
    public double? High { get; init; }

    /// <summary>Low state level fixed by the person.</summary>
    public double? Low { get; init; }

    /// <summary>Half-width of the settling band, % of amplitude.</summary>
    public double SettlingBandPercent { get; init; } = 2;

    /// <summary>Length of the region in which aberrations count, in transition durations.</summary>
    public double OvershootRegion { get; init; } = 3;

    /// <summary>Highest harmonic that is looked for.</summary>
    public int Harmonics { get; init; } = 10;
}
