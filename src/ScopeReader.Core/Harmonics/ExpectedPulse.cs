using ScopeReader.Numerics;
using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>The pulse that a measured wave would be, were it ideal: its duty factor, and Gaussian edges of its rise and fall times.</summary>
/// <param name="Duty">High time over period.</param>
/// <param name="RiseSigma">Standard deviation of the rising edge, periods.</param>
/// <param name="FallSigma">Of the falling edge.</param>
internal sealed record ExpectedPulse(double Duty, double RiseSigma, double FallSigma)
{
    // Edges that fill the period leave no states: a sine's take 0.59 of it.
    private const double LongestEdges = 0.5;

    /// <summary>The pulse of what the sheet has; null where the wave is none.</summary>
    public static ExpectedPulse? Of(WaveformJob job)
    {
        if (job.Sheet.Primary(Quantities.DutyFactor) is not { Value: > 0 and < 100 } duty || job.Sheet.Primary(Quantities.Period) is not { Value: > 0 } period
            || job.Sheet.Primary(Quantities.RiseTime) is not { } rise || job.Sheet.Primary(Quantities.FallTime) is not { } fall
            || (rise.Value + fall.Value) / period.Value > LongestEdges)
            return null;
        // A Gaussian edge takes 2.563 of its standard deviations from 10 to 90 %.
        double widths = BoundedNormal.NormalQuantile(job.Plan.Levels.ReferenceHighPercent / 100) - BoundedNormal.NormalQuantile(job.Plan.Levels.ReferenceLowPercent / 100);
        return new ExpectedPulse(duty.Value / 100, rise.Value / period.Value / widths, fall.Value / period.Value / widths);
    }

    /// <summary>Level of a harmonic of it, dBc; null where it has none to speak of.</summary>
    public double? LevelDbc(int order) => IdealPulse.EdgedLevelDbc(Duty, RiseSigma, FallSigma, order) is var level && double.IsFinite(level) ? level : null;
}
