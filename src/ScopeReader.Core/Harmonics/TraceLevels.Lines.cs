using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

internal sealed partial class TraceLevels
{
    // A neighbour this far down on both sides: points are half of a resolution bandwidth apart, and three barely lie on the line.
    private const double SharpestBend = 6.5;

    // What a filter that is not Gaussian does to the parabola, by four synchronously tuned poles: 0.03 dB at three points in its
    // -3 dB width, 0.13 at two, as the square of the bend; and under a tenth of a point in frequency, sweep asymmetry included.
    private const double LevelBiasPerSquareBend = 0.005, OffsetBias = 0.1;

    /// <summary>True where a point is higher than its neighbours.</summary>
    public bool IsTop(int index) => index > 0 && index < _levels.Length - 1 && _levels[index] >= _levels[index - 1] && _levels[index] >= _levels[index + 1];

    /// <summary>True where a point is higher than noise alone would be anywhere on the trace.</summary>
    public bool StandsOut(int index) => _levels[index] > Noise(index).Threshold(_levels.Length);

    /// <summary>The strongest line after the start of the span; null where none stands out or too few points lie on it.</summary>
    public TraceLine? Strongest()
    {
        int from = AfterFeedThrough(), top = Highest(Math.Min(from, Count - 2), Count - 2);
        return StandsOut(top) ? Line(top) : null;
    }

    /// <summary>Uncertainty of one point's level as it stands, dB.</summary>
    public IEnumerable<BudgetTerm> PointTerms(int index)
    {
        TraceNoise noise = Noise(index);
        yield return BudgetTerm.Normal("noise", noise.Of(Math.Max(noise.MeanDb, _levels[index])));
        yield return BudgetTerm.Rectangular("level-resolution", _step / 2);
    }

    /// <summary>The line whose highest point is known; null where too few points lie on it.</summary>
    public TraceLine? Line(int top)
    {
        if (top < 1 || top > _levels.Length - 2)
            return null;
        double before = _levels[top - 1], middle = _levels[top], after = _levels[top + 1];
        PeakParabola peak = PeakParabola.Through(before, middle, after);
        if (peak.Bend == 0 || peak.Bend < -SharpestBend)
            return null;
        TraceNoise noise = Noise(top);
        double level = noise.MeanDb < peak.Level ? Decibels.WithoutNoise(peak.Level, noise.MeanDb) : peak.Level;
        double spacing = (_frequencies[top + 1] - _frequencies[top - 1]) / 2, rounding = _step / Math.Sqrt(12);
        double u = noise.Of(level), ub = Side(before), ua = Side(after);
        return new TraceLine(_frequencies[top] + peak.Offset * spacing, level,
            [
                BudgetTerm.Normal("noise", spacing * peak.OffsetUncertainty(ub, u, ua)),
                BudgetTerm.Normal("level-resolution", spacing * peak.OffsetUncertainty(rounding, rounding, rounding)),
                BudgetTerm.Rectangular("point-spacing", OffsetBias * spacing),
            ],
            [
                BudgetTerm.Normal("noise", peak.LevelUncertainty(ub, u, ua)),
                BudgetTerm.Normal("level-resolution", peak.LevelUncertainty(rounding, rounding, rounding)),
                BudgetTerm.Rectangular("point-spacing", LevelBiasPerSquareBend * peak.Bend * peak.Bend),
            ]);

        double Side(double read) => noise.Of(Math.Max(noise.MeanDb, read));
    }
}
