namespace ScopeReader.Captures;

/// <summary>What a chain's stated bandwidth means.</summary>
public enum BandwidthBasis
{
    /// <summary>A catalogue figure: the bandwidth is at least this.</summary>
    Catalogue,

    /// <summary>Measured on this chain.</summary>
    Measured,
}

/// <summary>Shape of the chain's frequency response.</summary>
public enum ChainResponse
{
    /// <summary>Not stated.</summary>
    Unknown,

    /// <summary>Rolls off gently, no overshoot.</summary>
    Gaussian,

    /// <summary>Flat and then steep, with a few percent of overshoot.</summary>
    Flat,
}

/// <summary>What stood between the circuit and the numbers. Null means not stated: unknown, never zero.</summary>
public sealed record MeasuringChain
{
    /// <summary>Nothing is known of the chain.</summary>
    public static MeasuringChain Unknown { get; } = new();

    /// <summary>The instrument, in the person's words.</summary>
    public string? Instrument { get; init; }

    /// <summary>The day its calibration runs out.</summary>
    public DateOnly? CalibrationDue { get; init; }

    /// <summary>Data-sheet bound of the timebase, ± ppm, rectangular.</summary>
    public double? TimebaseTolerancePpm { get; init; }

    /// <summary>Indicated minus true frequency, ppm: an instrument that reads high is positive.</summary>
    public double? TimebaseReadsPpm { get; init; }

    /// <summary>Standard uncertainty of <see cref="TimebaseReadsPpm"/>, ppm.</summary>
    public double? TimebaseUncertaintyPpm { get; init; }

    /// <summary>The day the timebase was calibrated.</summary>
    public DateOnly? TimebaseCalibrated { get; init; }

    /// <summary>Ageing bound of the timebase, ± ppm/year, rectangular.</summary>
    public double? TimebaseAgeingPpmPerYear { get; init; }

    /// <summary>Bound of the gain error, ± % of the value, rectangular.</summary>
    public double? GainTolerancePercent { get; init; }

    /// <summary>Bound of the offset error, ± in the channel's unit, rectangular.</summary>
    public double? OffsetTolerance { get; init; }

    /// <summary>Bound of the level error between two frequencies, ± dB, rectangular.</summary>
    public double? FlatnessDb { get; init; }

    /// <summary>Bits of the converter.</summary>
    public int? Bits { get; init; }

    /// <summary>Multiplies the file's values.</summary>
    public double Scale { get; init; } = 1;

    /// <summary>Division of the probe, for loading, causes and cautions; it multiplies nothing.</summary>
    public double? ProbeFactor { get; init; }

    /// <summary>Input capacitance of the probe, F.</summary>
    public double? ProbeCapacitance { get; init; }

    /// <summary>-3 dB bandwidth of the probe, Hz.</summary>
    public double? ProbeBandwidth { get; init; }

    /// <summary>Length of the probe's ground lead, m.</summary>
    public double? GroundLead { get; init; }

    /// <summary>-3 dB bandwidth of the instrument's input, Hz.</summary>
    public double? InputBandwidth { get; init; }

    /// <summary>What the bandwidths are.</summary>
    public BandwidthBasis BandwidthBasis { get; init; }

    /// <summary>Shape of the response.</summary>
    public ChainResponse Response { get; init; }

    /// <summary>Level below which lines may be the instrument's own, dBc.</summary>
    public double? DistortionFloorDbc { get; init; }

    /// <summary>Impedance that powers refer to, ohm; without it there is no dBm of a voltage.</summary>
    public double? Impedance { get; init; }
}
