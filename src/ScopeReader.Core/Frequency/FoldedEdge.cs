using ScopeReader.Numerics;

namespace ScopeReader.Frequency;

/// <summary>The 50 % instant of all edges of one direction laid over each other on the grid.</summary>
/// <remarks>
/// A polynomial through the folded samples about the crossing: a straight line through a curved edge crosses the mid level
/// beside it by the same amount in every cycle, which leaves the period alone but not the widths.
/// </remarks>
internal static class FoldedEdge
{
    private const int MostEdges = 20000, HighestDegree = 5;
    private const double HalfWindow = 0.45, LeastHalfWindow = 1.2, LeastSlopeShare = 0.3;

    /// <summary>The instant relative to the grid, its uncertainty for noise alone, and the slope there; in samples.</summary>
    public readonly record struct Crossing(double Offset, double Uncertainty, double Slope);

    /// <summary>Finds it.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="origin">Instant of edge 0 on the grid.</param>
    /// <param name="period">The period, samples.</param>
    /// <param name="isRising">Direction of the edges.</param>
    /// <param name="level">The mid level.</param>
    /// <param name="swing">High minus low.</param>
    /// <param name="duration">10 to 90 % duration, samples.</param>
    /// <param name="places">Places between two samples that the crossings keep to; 0 where they spread.</param>
    /// <returns>Null where the folded samples do not make an edge.</returns>
    public static Crossing? Find(ReadOnlySpan<double> samples, double origin, double period, bool isRising, double level, double swing, double duration, int places)
    {
        double half = Math.Min(Math.Max(HalfWindow * duration, LeastHalfWindow), period / 4);
        int degree = places == 0 ? HighestDegree : Math.Clamp((int)(2 * half * places) - 1, 1, HighestDegree);
        var fit = new SummedPolynomial(degree);
        // A grid origin can lie a period or more before the first sample.
        int edges = (int)Math.Min(MostEdges, Math.Ceiling(samples.Length / period) + 2);
        double first = origin - Math.Floor(origin / period) * period - period;
        for (int k = 0; k < edges; k++)
        {
            double centre = first + k * period;
            for (int i = Math.Max(0, (int)Math.Ceiling(centre - half)); i <= centre + half && i < samples.Length; i++)
                fit.Add((i - centre) / half, samples[i] - level);
        }
        if (!fit.Solve())
            return null;
        double x = 0;
        for (int i = 0; i < 20; i++)
            x = Math.Clamp(x - fit.At(x) / fit.SlopeAt(x), -1, 1);
        double slope = fit.SlopeAt(x) / half;
        if (!(Math.Abs(x) < 1) || slope > 0 != isRising || Math.Abs(slope) < LeastSlopeShare * swing / Math.Max(duration, 1))
            return null;
        return new Crossing(x * half, fit.UncertaintyAt(x) / Math.Abs(slope), Math.Abs(slope));
    }
}
