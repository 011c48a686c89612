namespace ScopeReader.Harmonics;

/// <summary>The top of a line between its points: a parabola through three levels in dB, exact for a Gaussian resolution filter.</summary>
/// <param name="Offset">Place of the top from the middle point, points; -0.5 to 0.5 where the middle point is the highest.</param>
/// <param name="Level">Level of the top, dB.</param>
/// <param name="Bend">Second difference of the levels, dB, negative.</param>
public readonly record struct PeakParabola(double Offset, double Level, double Bend)
{
    /// <summary>The parabola through three equally spaced levels.</summary>
    /// <param name="before">Level of the point before, dB.</param>
    /// <param name="middle">Level of the highest point, dB.</param>
    /// <param name="after">Level of the point after, dB.</param>
    public static PeakParabola Through(double before, double middle, double after)
    {
        double bend = before - 2 * middle + after;
        if (bend >= 0)
            return new PeakParabola(0, middle, 0);
        double offset = (before - after) / (2 * bend);
        return new PeakParabola(offset, middle - (before - after) * offset / 4, bend);
    }

    /// <summary>Standard uncertainty of the offset, points, for independent ones of the three levels in dB.</summary>
    public double OffsetUncertainty(double before, double middle, double after) =>
        Root((0.5 - Offset) * before, 2 * Offset * middle, (0.5 + Offset) * after) / Math.Abs(Bend);

    /// <summary>Standard uncertainty of the level, dB, for independent ones of the three levels.</summary>
    public double LevelUncertainty(double before, double middle, double after) =>
        Root((Offset * Offset - Offset) / 2 * before, (1 - Offset * Offset) * middle, (Offset * Offset + Offset) / 2 * after);

    private static double Root(double a, double b, double c) => Math.Sqrt(a * a + b * b + c * c);
}
