namespace ScopeReader.Captures;

/// <summary>What a spectrum trace averages, or takes of each stretch of its sweep.</summary>
public enum TraceAveraging
{
    /// <summary>Not stated.</summary>
    Unknown,

    /// <summary>Power: noise reads right.</summary>
    Power,

    /// <summary>Voltage: noise reads 1.05 dB low.</summary>
    Voltage,

    /// <summary>Levels in dB, as a video filter on a logarithmic scale does: noise reads 2.51 dB low.</summary>
    Level,

    /// <summary>The highest value: noise reads high.</summary>
    Peak,
}
