using ScopeReader.Numerics;

namespace ScopeReader.Edges;

/// <summary>Where an averaged edge passes a level, and how well that is known; times in samples.</summary>
/// <param name="Level">The level, of the step.</param>
/// <param name="Instant">From the 50 % instant.</param>
/// <param name="Slope">Of the step per sample, above 0.</param>
/// <param name="Noise">Standard uncertainty from noise.</param>
/// <param name="Rounding">Standard uncertainty from the converter's rounding.</param>
/// <param name="Curve">The local curve that it was read from.</param>
internal sealed record EdgeCrossing(double Level, double Instant, double Slope, double Noise, double Rounding, LocalCurve Curve)
{
    /// <summary>Half-width of the window, of the transition duration: bends a Gaussian edge by less than 1e-4 of its duration.</summary>
    private const double Window = 0.1;

    /// <summary>Samples to either side that four single samples need.</summary>
    private const double SparseWindow = 2.6;

    /// <summary>The same crossing on a time scale whose zero lies elsewhere.</summary>
    public EdgeCrossing From(double origin) => this with { Instant = Instant - origin };

    /// <summary>The crossing nearest to a start, walking outward.</summary>
    /// <param name="edge">The averaged edge.</param>
    /// <param name="level">The level, of the step.</param>
    /// <param name="start">Where the walk starts, samples.</param>
    /// <param name="forward">True to walk to later times.</param>
    /// <param name="duration">About the transition duration, samples: the scale of the windows.</param>
    /// <returns>Null where the edge does not pass the level, or its points do not hold a curve there.</returns>
    public static EdgeCrossing? Find(AveragedEdge edge, double level, double start, bool forward, double duration)
    {
        if (Walk(edge, level, start, forward, duration / 20) is not { } centre)
            return null;
        double widest = Math.Max(0.35 * duration, SparseWindow), narrow = Window * duration;
        if (Refine(edge, level, centre, narrow, widest) is not { } crossing)
            return null;
        // A kink near the level bends a wide window: where half of it differs by more than noise, the half is right.
        if (Refine(edge, level, crossing.Instant, narrow / 2, narrow / 2) is { } half
            && Math.Abs(half.Instant - crossing.Instant) > 3 * double.Hypot(half.Noise, half.Rounding))
            return half;
        return crossing;
    }

    /// <summary>Largest error that the gaps between the points can leave on a Gaussian edge, samples.</summary>
    /// <param name="edge">The averaged edge that the crossing was found on.</param>
    /// <param name="sigma">Standard deviation of the Gaussian edge, samples.</param>
    /// <remarks>The same fit to a Gaussian edge at the same points, moved about by up to half the widest gap.</remarks>
    public double Interpolation(AveragedEdge edge, double sigma)
    {
        double quantile = BoundedNormal.NormalQuantile(Level), gap = 0, worst = 0;
        for (int i = Curve.First + 1; i < Curve.First + Curve.Count; i++)
            gap = Math.Max(gap, edge.Times[i] - edge.Times[i - 1]);
        for (int k = -2; k <= 2; k++)
        {
            double origin = Curve.Centre + k * gap / 4;
            double error = Curve.Refit(edge, t => GaussianEdge.At(t - origin, sigma, quantile)) - GaussianEdge.At(Curve.Centre - origin, sigma, quantile);
            worst = Math.Max(worst, Math.Abs(error));
        }
        return worst / GaussianEdge.Slope(sigma, quantile);
    }

    private static EdgeCrossing? Refine(AveragedEdge edge, double level, double centre, double halfWidth, double widest)
    {
        LocalCurve? curve = null;
        for (int i = 0; i < 6; i++)
        {
            curve = LocalCurve.About(edge, centre, halfWidth, widest);
            if (curve is not { Slope: > 0 })
                return null;
            double step = Math.Clamp((level - curve.Value) / curve.Slope, -curve.HalfWidth, curve.HalfWidth);
            centre += step;
            // A few steps settle on a smooth curve; points that enter and leave the window keep the last bits moving.
            if (Math.Abs(step) < 1e-4 * curve.HalfWidth)
                break;
        }
        double smear = edge.Smear * curve!.Averaging;
        return new EdgeCrossing(level, centre, curve.Slope, double.Hypot(curve.Noise / curve.Slope, smear), curve.Rounding / curve.Slope, curve);
    }

    // Steps from point to point, each the mean of its close neighbours, so that noise does not end the walk early.
    private static double? Walk(AveragedEdge edge, double level, double start, bool forward, double reach)
    {
        int n = edge.Times.Length, i = edge.IndexAt(start);
        i = forward ? i : Math.Min(i, n - 1);
        double before = double.NaN, beforeTime = start;
        for (; i >= 0 && i < n; i += forward ? 1 : -1)
        {
            double value = Mean(edge, i, reach);
            if (forward ? value >= level : value <= level)
                return double.IsNaN(before) || before == value ? edge.Times[i]
                    : beforeTime + (level - before) / (value - before) * (edge.Times[i] - beforeTime);
            (before, beforeTime) = (value, edge.Times[i]);
        }
        return null;
    }

    private static double Mean(AveragedEdge edge, int index, double reach)
    {
        double time = edge.Times[index], sum = 0, count = 0;
        int first = index, last = index;
        while (first > 0 && time - edge.Times[first - 1] <= reach)
            first--;
        while (last + 1 < edge.Times.Length && edge.Times[last + 1] - time <= reach)
            last++;
        for (int i = first; i <= last; i++)
        {
            sum += edge.Values[i] * edge.Counts[i];
            count += edge.Counts[i];
        }
        return sum / count;
    }
}
