using ScopeReader.Harmonics;
using ScopeReader.Readings;

namespace ScopeReader.Limits;

/// <summary>How far a trace is inside a limit line at one place.</summary>
/// <param name="Frequency">Hz.</param>
/// <param name="Level">The trace's, on the line's scale.</param>
/// <param name="LineLevel">The line's.</param>
/// <param name="Margin">dB, positive inside.</param>
/// <param name="Terms">Uncertainty of the margin, dB, without the chain's.</param>
/// <param name="IsNoise">True where no line stands out there.</param>
internal sealed record LineMargin(double Frequency, double Level, double LineLevel, double Margin, IReadOnlyList<BudgetTerm> Terms, bool IsNoise)
{
    // The top of a line lies up to this above its highest point, or it would be too sharp to be read.
    private const double TopAbovePoint = 0.9;

    /// <summary>The least margin over the frequencies that line and trace share.</summary>
    public static LineMargin Worst(LimitLine line, TraceLevels levels, LineScale scale)
    {
        int worst = -1;
        double least = double.PositiveInfinity;
        for (int i = 0; i < levels.Count; i++)
            if (Distance(line, levels.Frequency(i), levels.Level(i) + scale.Offset) is { } margin && margin < least)
                (worst, least) = (i, margin);
        if (worst < 0)
            worst = levels.Nearest(Math.Clamp((line.Start + line.Stop) / 2, levels.Start, levels.Stop));
        LineMargin found = AtPoint(line, levels, scale, worst);
        if (line.Side == LineSide.Lower)
            return found;
        // Between points a line is higher than at any: every top that may come nearer is read as a line.
        for (int i = 1; i < levels.Count - 1; i++)
            if (levels.IsTop(i) && Distance(line, levels.Frequency(i), levels.Level(i) + scale.Offset) < least + TopAbovePoint
                && levels.StandsOut(i) && levels.Line(i) is { } top && AtTop(line, levels, scale, top) is { } better && (better.Margin < found.Margin || i == worst))
                found = better;
        return found;
    }

    private static double? Distance(LimitLine line, double frequency, double level) =>
        line.LevelAt(frequency) is { } bound ? line.Side == LineSide.Upper ? bound - level : level - bound : null;

    private static LineMargin AtPoint(LimitLine line, TraceLevels levels, LineScale scale, int index)
    {
        double frequency = levels.Frequency(index), level = levels.Level(index) + scale.Offset;
        // A trace whose points all miss the line is held against the line's nearest end.
        double bound = line.LevelAt(Math.Clamp(frequency, line.Start, line.Stop))!.Value;
        return new LineMargin(frequency, level, bound, line.Side == LineSide.Upper ? bound - level : level - bound,
            [.. levels.PointTerms(index), Slope(line, frequency, levels.Spacing / 2)], !levels.StandsOut(index));
    }

    private static LineMargin? AtTop(LimitLine line, TraceLevels levels, LineScale scale, TraceLine top)
    {
        double level = top.LevelDb + scale.Offset, width = Math.Sqrt(top.FrequencyTerms.Sum(t => t.Contribution * t.Contribution) * 3);
        return line.LevelAt(top.Frequency) is { } bound
            ? new LineMargin(top.Frequency, level, bound, bound - level, [.. top.LevelTerms, Slope(line, top.Frequency, Math.Min(width, levels.Spacing))], IsNoise: false)
            : null;
    }

    // Where the frequency may be off by so much, the line may have another level.
    private static BudgetTerm Slope(LimitLine line, double frequency, double width)
    {
        double low = line.LevelAt(Math.Clamp(frequency - width, line.Start, line.Stop))!.Value, high = line.LevelAt(Math.Clamp(frequency + width, line.Start, line.Stop))!.Value;
        return BudgetTerm.Rectangular("frequency", Math.Abs(high - low) / 2);
    }
}
