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
    /// <summary>Half-width of the window, of the transition duration.</summary>
    private const double Window = 0.2;

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
        double narrow = Window * duration, widest = Math.Max(0.6 * duration, 3), sign = highest ? 1 : -1;
        LocalCurve? best = null;
        // Half a window apart no top is missed; both ends count.
        int steps = Math.Max(1, (int)Math.Ceiling((to - from) / (narrow / 2)));
        for (int i = 0; i <= steps; i++)
        {
            var curve = LocalCurve.About(edge, from + i * (to - from) / steps, narrow, widest);
            if (curve is not null && (best is null || sign * curve.Value > sign * best.Value))
                best = curve;
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
        // A cubic misses 3/35 of the fourth-order term at its centre; for a cosine that term is (y'')² over its amplitude.
        double excursion = Math.Max(Math.Abs(best.Value - level), double.Epsilon), h2 = best.HalfWidth * best.HalfWidth;
        double bend = 3.0 / 35 / 24 * h2 * h2 * best.Curvature * best.Curvature / excursion;
        bool atEnd = best.Centre <= from || best.Centre >= to;
        double places = Math.Max(2, (to - from) / (2 * best.HalfWidth) + 1);
        double floor = double.Hypot(best.Noise, best.Rounding) * Math.Sqrt(2 * Math.Log(places));
        return new Extremum(best.Centre, best.Value, best.Noise, best.Rounding, bend, atEnd ? best.Slope : 0, floor);
    }
}
