using ScopeReader.Numerics;

namespace ScopeReader.Comparing;

/// <summary>A quantity against a varied condition: a straight line, and a parabola where the curvature is significant.</summary>
/// <remarks>Ordinary least squares. Errors that all the readings share (one instrument's timebase) leave the slope alone; the
/// scatter of the points about the curve is what its uncertainty comes from.</remarks>
public sealed class ConditionFit
{
    private const int FewestForCurvature = 5, Steps = 2000;

    private readonly double _from, _to;

    private ConditionFit(PolynomialFit line, PolynomialFit? parabola, double from, double to) => (Line, Parabola, _from, _to) = (line, parabola, from, to);

    /// <summary>The straight line.</summary>
    public PolynomialFit Line { get; }

    /// <summary>The parabola; null with fewer than five points or three settings.</summary>
    public PolynomialFit? Parabola { get; }

    /// <summary>True where the parabola's curvature differs from zero at 95 %.</summary>
    public bool CurvatureIsSignificant => Parabola is { } p && Math.Abs(p.Coefficients[2]) > StudentT.Quantile95(p.DegreesOfFreedom) * p.StandardUncertainties[2];

    /// <summary>The parabola where its curvature is significant, otherwise the line.</summary>
    public PolynomialFit Best => CurvatureIsSignificant ? Parabola! : Line;

    /// <summary>Half the 95 % interval of the line's slope, Student's t; NaN for two points.</summary>
    public double SlopeExpandedUncertainty => Line.DegreesOfFreedom > 0 ? StudentT.Quantile95(Line.DegreesOfFreedom) * Line.StandardUncertainties[1] : double.NaN;

    /// <summary>Fits readings.</summary>
    /// <param name="settings">The condition, shape [n], n of 2 or more, not all equal.</param>
    /// <param name="values">The readings, shape [n].</param>
    /// <exception cref="ArgumentException">Fewer than two different settings.</exception>
    public static ConditionFit Of(ReadOnlySpan<double> settings, ReadOnlySpan<double> values)
    {
        bool curve = settings.Length >= FewestForCurvature && settings.ToArray().Distinct().Count() > 2;
        double from = double.PositiveInfinity, to = double.NegativeInfinity;
        foreach (double setting in settings)
            (from, to) = (Math.Min(from, setting), Math.Max(to, setting));
        return new ConditionFit(PolynomialFit.Of(settings, values, 1), curve ? PolynomialFit.Of(settings, values, 2) : null, from, to);
    }

    /// <summary>Half the 95 % interval of one more reading at a setting, Student's t; 0 for two points, whose scatter nobody knows.</summary>
    public double ExpandedPrediction(double setting) =>
        Best.DegreesOfFreedom > 0 ? StudentT.Quantile95(Best.DegreesOfFreedom) * Best.PredictionUncertaintyAt(setting) : 0;

    /// <summary>Settings, inside those measured, at which the curve keeps within bounds.</summary>
    /// <param name="low">Lower bound of the quantity; -∞ for none.</param>
    /// <param name="high">Upper bound; +∞ for none.</param>
    /// <param name="guard">Distance to keep from the bounds at a setting; null for none.</param>
    public IReadOnlyList<(double From, double To)> SettingsWithin(double low, double high, Func<double, double>? guard = null)
    {
        bool Inside(double x) => Best.At(x) is var y && (guard?.Invoke(x) ?? 0) is var g && y >= low + g && y <= high - g;
        var ranges = new List<(double, double)>();
        double? begun = Inside(_from) ? _from : null;
        for (int i = 1; i <= Steps; i++)
        {
            double before = Setting(i - 1), x = Setting(i);
            if (Inside(x) == begun.HasValue)
                continue;
            double edge = Edge(before, x, Inside);
            if (begun is { } start)
                ranges.Add((start, edge));
            begun = begun is null ? edge : null;
        }
        if (begun is { } open)
            ranges.Add((open, _to));
        return ranges;
    }

    /// <summary>The setting, inside those measured, at which the curve comes closest to a value.</summary>
    public double Closest(double value)
    {
        double best = _from;
        for (int i = 1; i <= Steps; i++)
            if (Math.Abs(Best.At(Setting(i)) - value) < Math.Abs(Best.At(best) - value))
                best = Setting(i);
        return best;
    }

    private double Setting(int step) => _from + (_to - _from) * step / Steps;

    private static double Edge(double from, double to, Func<double, bool> inside)
    {
        bool at = inside(from);
        for (int i = 0; i < 50; i++)
        {
            double middle = (from + to) / 2;
            if (inside(middle) == at)
                from = middle;
            else
                to = middle;
        }
        return (from + to) / 2;
    }
}
