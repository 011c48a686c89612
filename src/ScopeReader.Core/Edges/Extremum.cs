namespace ScopeReader.Edges;

/// <summary>The highest or lowest value of an averaged edge in a region, by a local curve, so that noise does not raise it.</summary>
/// <param name="Time">Where, samples from the 50 % instant.</param>
/// <param name="Value">Of the step.</param>
/// <param name="Noise">Standard uncertainty from noise.</param>
/// <param name="Rounding">Standard uncertainty from the converter's rounding.</param>
/// <param name="Bend">Bound on what the cubic cuts off a cosine of that curvature.</param>
/// <param name="Slope">Of the step per sample; other than 0 only at an end of the region.</param>
/// <param name="Floor">What noise alone would show as an excursion: σ √(2 ln m) for m independent places.</param>
internal sealed record Extremum(double Time, double Value, double Noise, double Rounding, double Bend, double Slope, double Floor)
{
    // Half-widths of the window, of the transition duration. A wider one is better while what it bends is small beside noise.
    private static readonly double[] Windows = [0.2, 0.3, 0.42, 0.6];

    private const double BendOverNoise = 0.2;

    /// <summary>Looks for it.</summary>
    /// <param name="edge">The averaged edge.</param>
    /// <param name="from">Start of the region, samples.</param>
    /// <param name="to">Its end.</param>
    /// <param name="highest">True for the highest value.</param>
    /// <param name="duration">Transition duration, samples: the scale of the windows.</param>
    /// <param name="level">The state that the excursion is seen from.</param>
    /// <returns>Null where the points hold no curve in the region.</returns>
    public static Extremum? Find(AveragedEdge edge, double from, double to, bool highest, double duration, double level)
    {
        Extremum? found = null;
        foreach (double window in Windows)
        {
            if (Find(edge, from, to, highest, window * duration, Math.Max(window * duration, Math.Max(0.6 * duration, 3)), level) is not { } next)
                continue;
            if (found is not null && next.Bend > BendOverNoise * next.Noise)
                break;
            found = next;
        }
        return found;
    }

    private static Extremum? Find(AveragedEdge edge, double from, double to, bool highest, double narrow, double widest, double level)
    {
        double sign = highest ? 1 : -1;
        LocalCurve? best = null;
        double highestScore = double.NegativeInfinity;
        // Half a window apart no top is missed; both ends count.
        int steps = Math.Max(1, (int)Math.Ceiling((to - from) / (narrow / 2)));
        for (int i = 0; i <= steps; i++)
        {
            var curve = LocalCurve.About(edge, from + i * (to - from) / steps, narrow, widest);
            if (curve is null)
                continue;
            // Where a kink bends the cubic the excursion is not real: what the bend may be is taken off before comparing.
            double score = sign * (curve.Value - level) - 2 * BendOf(curve, level);
            if (score > highestScore)
                (best, highestScore) = (curve, score);
        }
        if (best is null)
            return null;
        for (int i = 0; i < 4 && sign * best.Curvature < 0; i++)
        {
            double time = Math.Clamp(best.Centre + Math.Clamp(-best.Slope / best.Curvature, -narrow, narrow), from, to);
            if (Math.Abs(time - best.Centre) < 1e-3 * narrow || LocalCurve.About(edge, time, narrow, widest) is not { } next)
                break;
            best = next;
        }
        bool atEnd = best.Centre <= from || best.Centre >= to;
        double places = Math.Max(2, (to - from) / (2 * best.HalfWidth) + 1);
        double floor = double.Hypot(best.Noise, best.Rounding) * Math.Sqrt(2 * Math.Log(places));
        return new Extremum(best.Centre, best.Value, best.Noise, best.Rounding, BendOf(best, level), atEnd ? best.Slope : 0, floor);
    }

    // A cubic misses 3/35 of the fourth-order term at its centre; for a cosine that term is (y'')² over its amplitude.
    private static double BendOf(LocalCurve curve, double level)
    {
        double excursion = Math.Max(Math.Abs(curve.Value - level), double.Epsilon), h2 = curve.HalfWidth * curve.HalfWidth;
        return Math.Min(1, 3.0 / 35 / 24 * h2 * h2 * curve.Curvature * curve.Curvature / excursion);
    }
}
