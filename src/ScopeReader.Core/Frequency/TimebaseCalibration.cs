using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader.Frequency;

/// <summary>What a capture of a known source says of the timebase.</summary>
/// <param name="ReadsPpm">Indicated minus true frequency, ppm of the true one: an instrument that reads high is positive.</param>
/// <param name="UncertaintyPpm">Its standard uncertainty, ppm: the capture's own and the reference's.</param>
/// <param name="CapturePpm">The capture's own part.</param>
/// <param name="Indicated">The frequency that the instrument shows, Hz.</param>
public sealed record TimebaseCalibration(double ReadsPpm, double UncertaintyPpm, double CapturePpm, double Indicated)
{
    private const double Million = 1e6;

    /// <summary>More than any instrument's timebase errs, ppm: the capture is of something else.</summary>
    public const double MostPpm = 1000;

    /// <summary>A chain that shows frequencies as they are indicated, without any correction.</summary>
    public static MeasuringChain Uncorrected(MeasuringChain chain)
    {
        ArgumentNullException.ThrowIfNull(chain);
        return chain with { TimebaseReadsPpm = null, TimebaseUncertaintyPpm = null, TimebaseCalibrated = null, TimebaseAgeingPpmPerYear = null, TimebaseTolerancePpm = 0 };
    }

    /// <summary>Compares.</summary>
    /// <param name="indicated">The frequency that was read with an uncorrected chain, Hz.</param>
    /// <param name="reference">The true frequency, Hz, above 0.</param>
    /// <param name="referencePpm">Its standard uncertainty, ppm, 0 or more.</param>
    public static TimebaseCalibration Of(Reading indicated, double reference, double referencePpm)
    {
        ArgumentNullException.ThrowIfNull(indicated);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(reference);
        ArgumentOutOfRangeException.ThrowIfNegative(referencePpm);
        double own = indicated.Budget.StandardUncertainty / reference * Million;
        return new TimebaseCalibration((indicated.Value - reference) / reference * Million, double.Hypot(own, referencePpm), own, indicated.Value);
    }
}
