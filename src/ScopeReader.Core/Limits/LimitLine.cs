namespace ScopeReader.Limits;

/// <summary>On which side of a limit line levels are forbidden.</summary>
public enum LineSide
{
    /// <summary>The line is the most that is allowed.</summary>
    Upper,

    /// <summary>The line is the least that is asked for.</summary>
    Lower,
}

/// <summary>How a limit line runs between its points.</summary>
public enum LineInterpolation
{
    /// <summary>Straight over the frequency.</summary>
    Linear,

    /// <summary>Straight over the logarithm of the frequency.</summary>
    Logarithmic,
}

/// <summary>A bound on the levels of a spectrum trace that depends on the frequency.</summary>
public sealed record LimitLine
{
    /// <summary>Units that a line may have.</summary>
    public static IReadOnlyList<string> Units { get; } = ["dBm", "dBc", "dBµV", "dBV"];

    private readonly (double Frequency, double Level)[] _points;

    /// <param name="name">What the person calls it.</param>
    /// <param name="unit">One of <see cref="Units"/>.</param>
    /// <param name="points">Frequencies in Hz that do not fall, and levels; two points at one frequency make a step.</param>
    /// <param name="interpolation">How it runs between them; over the logarithm, every frequency is above 0.</param>
    /// <exception cref="ArgumentException">Under two points, one that is not finite, frequencies that fall, or another unit.</exception>
    public LimitLine(string name, string unit, IEnumerable<(double Frequency, double Level)> points, LineInterpolation interpolation = LineInterpolation.Linear)
    {
        ArgumentException.ThrowIfNullOrEmpty(name);
        ArgumentNullException.ThrowIfNull(points);
        (Name, Unit, Interpolation, _points) = (name, unit, interpolation, [.. points]);
        if (!Units.Contains(unit) || _points.Length < 2 || Problem(_points, interpolation) is not null)
            throw new ArgumentException($"not a limit line: {name}", nameof(points));
    }

    /// <summary>What the person calls it.</summary>
    public string Name { get; }

    /// <summary>Unit of the levels.</summary>
    public string Unit { get; }

    /// <summary>How it runs between its points.</summary>
    public LineInterpolation Interpolation { get; }

    /// <summary>The points: Hz, and levels in <see cref="Unit"/>.</summary>
    public IReadOnlyList<(double Frequency, double Level)> Points => _points;

    /// <summary>The forbidden side.</summary>
    public LineSide Side { get; init; }

    /// <summary>The rule.</summary>
    public DecisionRule Rule { get; init; } = DecisionRule.Guarded;

    /// <summary>Guard band over expanded uncertainty, 0 or more.</summary>
    public double Guard { get; init; } = 1;

    /// <summary>First frequency, Hz.</summary>
    public double Start => _points[0].Frequency;

    /// <summary>Last frequency, Hz.</summary>
    public double Stop => _points[^1].Frequency;

    /// <summary>What is wrong with points of a line, after "point N"; null where nothing is.</summary>
    /// <returns>Number of the point, from 1, and the problem.</returns>
    public static (int Number, string Problem)? Problem(IReadOnlyList<(double Frequency, double Level)> points, LineInterpolation interpolation)
    {
        ArgumentNullException.ThrowIfNull(points);
        for (int i = 0; i < points.Count; i++)
            if (!double.IsFinite(points[i].Frequency) || !double.IsFinite(points[i].Level))
                return (i + 1, "is not finite");
            else if (points[i].Frequency < 0 || (points[i].Frequency == 0 && interpolation == LineInterpolation.Logarithmic))
                return (i + 1, interpolation == LineInterpolation.Logarithmic ? "needs a frequency above zero, for the interpolation is log" : "has a frequency below zero");
            else if (i > 0 && points[i].Frequency < points[i - 1].Frequency)
                return (i + 1, "has a lower frequency than the one before");
        return null;
    }

    /// <summary>The line's level.</summary>
    /// <param name="frequency">Hz, from <see cref="Start"/> to <see cref="Stop"/>.</param>
    /// <returns>In <see cref="Unit"/>; at a step the stricter one; null outside the line.</returns>
    public double? LevelAt(double frequency)
    {
        double? found = null;
        for (int i = 1; i < _points.Length; i++)
        {
            ((double f0, double level0), (double f1, double level1)) = (_points[i - 1], _points[i]);
            if (frequency < f0 || frequency > f1)
                continue;
            if (f0 == f1)
            {
                found = Stricter(found, Stricter(level0, level1));
                continue;
            }
            double share = Interpolation == LineInterpolation.Linear ? (frequency - f0) / (f1 - f0) : Math.Log(frequency / f0) / Math.Log(f1 / f0);
            found = Stricter(found, level0 + share * (level1 - level0));
        }
        return found;
    }

    private double Stricter(double? a, double b) => a is not { } other ? b : Side == LineSide.Upper ? Math.Min(other, b) : Math.Max(other, b);
}
