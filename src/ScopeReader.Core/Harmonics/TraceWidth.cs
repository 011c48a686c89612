using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>The width of a line of a trace some dB below its top.</summary>
/// <param name="Width">Hz.</param>
/// <param name="Terms">Its own uncertainty, Hz.</param>
internal sealed record TraceWidth(double Width, IReadOnlyList<BudgetTerm> Terms)
{
    // A straight line in dB between two points of a Gaussian skirt is off by an eighth of the second difference, under this share of a spacing.
    private const double Interpolation = 0.1;

    /// <summary>Walks out from the top to the first crossings.</summary>
    /// <param name="levels">The trace.</param>
    /// <param name="top">Index of the line's highest point.</param>
    /// <param name="line">The line.</param>
    /// <param name="down">dB.</param>
    /// <returns>The width; null where the span ends before, or noise comes first.</returns>
    public static TraceWidth? Of(TraceLevels levels, int top, TraceLine line, double down)
    {
        double level = line.LevelDb - down;
        if (Crossing(levels, top, level, -1) is not { } low || Crossing(levels, top, level, +1) is not { } high)
            return null;
        TraceNoise noise = levels.Noise(top);
        double u = noise.Of(Math.Max(level, noise.MeanDb)), slopes = 1 / low.Slope + 1 / high.Slope;
        double uTop = Math.Sqrt(line.LevelTerms.Sum(t => t.Contribution * t.Contribution));
        return new TraceWidth(high.Frequency - low.Frequency,
        [
            BudgetTerm.Normal("noise", u * double.Hypot(1 / low.Slope, 1 / high.Slope)),
            BudgetTerm.Normal("level of the top", uTop * slopes),
            BudgetTerm.Rectangular("point-spacing", Interpolation * levels.Spacing * Math.Sqrt(2)),
        ]);
    }

    // Frequency, and dB a hertz there.
    private static (double Frequency, double Slope)? Crossing(TraceLevels levels, int top, double level, int step)
    {
        for (int i = top + step; i >= 0 && i < levels.Count; i += step)
        {
            if (levels.Level(i) > level)
                continue;
            double inner = levels.Level(i - step), outer = levels.Level(i), f0 = levels.Frequency(i - step), f1 = levels.Frequency(i);
            return (f0 + (inner - level) / (inner - outer) * (f1 - f0), (inner - outer) / Math.Abs(f1 - f0));
        }
        return null;
    }
}
