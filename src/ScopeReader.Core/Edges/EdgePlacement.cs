using ScopeReader.Frequency;
using ScopeReader.Levels;

namespace ScopeReader.Edges;

/// <summary>Where each edge of one polarity is taken to lie.</summary>
/// <param name="Origin">The grid's origin for this polarity, samples; null without a grid.</param>
/// <param name="Period">The grid's period, samples.</param>
/// <param name="Share">Share of an edge's own distance from the grid that is followed, 0 to 1.</param>
/// <param name="Smear">Rms of what then remains between places and edges, samples.</param>
internal readonly record struct EdgePlacement(double? Origin, double Period, double Share, double Smear)
{
    /// <summary>How the edges of one polarity are placed.</summary>
    public static EdgePlacement Of(StateLevels levels, double codeStep, IReadOnlyList<Transition> transitions, PeriodGrid? grid, bool rising, double duration)
    {
        int edges = transitions.Count(t => t.IsRising == rising);
        double own = OwnTimingNoise(levels, codeStep, duration);
        double? origin = rising ? grid?.RisingOrigin : grid?.FallingOrigin;
        if (grid is null || origin is null || edges < 3)
            return new EdgePlacement(null, 0, 1, edges > 1 ? own : 0);
        // The straight line between two samples of so short an edge says nothing of jitter.
        if (EquivalentTime.IsNeeded(duration))
            return new EdgePlacement(origin, grid.Period, 0, 0);

        double spread = 0;
        foreach (Transition t in transitions)
        {
            if (t.IsRising != rising)
                continue;
            double d = Distance(t.Instant, origin.Value, grid.Period);
            spread += d * d;
        }
        spread /= Math.Max(1, edges - 1);
        double noise = own * own, jitter = spread - noise;
        // A variance from n edges is itself uncertain by √(2/n) of its size: three of those, and the model's own third.
        if (jitter < spread * Math.Min(0.9, 3 * Math.Sqrt(2.0 / edges)) || jitter < 0.3 * noise)
            return new EdgePlacement(origin, grid.Period, 0, 0);
        double share = jitter / spread;
        return new EdgePlacement(origin, grid.Period, share, Math.Sqrt(share * noise));
    }

    /// <summary>Where an edge lies, samples from the first sample.</summary>
    public double Place(Transition edge) =>
        Origin is { } origin ? edge.Instant - (1 - Share) * Distance(edge.Instant, origin, Period) : edge.Instant;

    private static double Distance(double instant, double origin, double period)
    {
        double cycles = (instant - origin) / period;
        return (cycles - Math.Round(cycles)) * period;
    }

    // Rms error of a 50 % instant by straight line: noise (variance factor 2/3 over the phases), and the line itself.
    private static double OwnTimingNoise(StateLevels levels, double codeStep, double duration)
    {
        double slope = levels.Amplitude / Math.Max(duration, 1);
        double noise = Math.Sqrt(2.0 / 3 * (levels.Noise * levels.Noise + codeStep * codeStep / 12)) / slope;
        return double.Hypot(noise, InterpolationError.LinearAtMiddle(duration) / Math.Sqrt(2));
    }
}
