using ScopeReader.Numerics;

namespace ScopeReader.Edges;

/// <summary>How far the straight line between two samples is from a Gaussian edge.</summary>
public static class InterpolationError
{
    private const int Phases = 256;

    /// <summary>Largest error of the 50 % instant by straight line, over all sampling phases.</summary>
    /// <param name="duration">10 to 90 % of the edge, samples, above 0.</param>
    /// <returns>Samples; at most 0.5.</returns>
    /// <remarks>A Gaussian edge is Φ(t/s) with 10 to 90 % in 2.5631 s. Exact to the grid of 256 phases and a parabola over them.</remarks>
    public static double LinearAtMiddle(double duration)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(duration);
        double sigma = duration / GaussianEdge.DurationOverSigma, before = 0, best = 0, worst = 0;
        // The error is odd about the middle phase, so half of the phases hold the peak.
        for (int i = 1; i <= Phases / 2; i++)
        {
            double error = Math.Abs(ErrorAt((double)i / Phases, sigma));
            double after = Math.Abs(ErrorAt((double)(i + 1) / Phases, sigma));
            if (error >= worst)
            {
                double bend = before - 2 * error + after;
                worst = error;
                best = bend < 0 ? error - (after - before) * (after - before) / (8 * bend) : error;
            }
            before = error;
        }
        return best;
    }

    // The edge's middle lies a fraction f after the first of two samples.
    private static double ErrorAt(double f, double sigma)
    {
        double a = BoundedNormal.NormalCumulative(-f / sigma), b = BoundedNormal.NormalCumulative((1 - f) / sigma);
        return (0.5 - a) / (b - a) - f;
    }
}
