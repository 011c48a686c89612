using ScopeReader.Edges;
using ScopeReader.Levels;
using ScopeReader.Readings;

namespace ScopeReader.Frequency;

/// <summary>The frequency of a wave from the instants at which it crosses its mid level.</summary>
/// <remarks>
/// Transitions with hysteresis, a time stamp each, a number each, least squares over all of them (<see cref="EdgeRegression"/>).
/// Terms: the edges' distance to the grid (named jitter where it is more than the noise explains); where the sampling is so
/// near a whole number of samples per cycle that interpolation errors do not average, their bound.
/// </remarks>
public sealed record CrossingFrequency
{
    /// <summary>The method's name as readings have it.</summary>
    public const string Method = "crossings";

    /// <summary>Name of the term that bounds errors of interpolation.</summary>
    internal const string InterpolationTerm = "interpolation";

    // Fewer degrees of freedom than this say less about the timing noise than the noise on the states does.
    private const int FewestDegreesOfFreedom = 5;
    // An edge of any shorter duration looks like one of up to 1.6 samples, by the lines between them.
    private const double Resolved = 1.8;
    private const double SineWindow = 0.11, EdgeWindow = 0.4, LargestSpread = 0.1, LeftByInterpolation = 0.2;

    private CrossingFrequency() { }

    /// <summary>The frequency, cycles per sample, with its terms.</summary>
    public required FrequencyEstimate Estimate { get; init; }

    /// <summary>Where the regression puts the edges.</summary>
    public required PeriodGrid Grid { get; init; }

    /// <summary>Rough 10 to 90 % duration of the edges, samples.</summary>
    public required double EdgeDuration { get; init; }

    /// <summary>False where any shorter edge would look the same.</summary>
    public bool IsResolved => EdgeDuration > Resolved;

    /// <summary>Bound of the error that interpolation leaves in one instant, samples.</summary>
    public required double InterpolationBound { get; init; }

    /// <summary>
    /// 1 where the crossings stay at one place between two samples throughout the record, 2 to 4 where they stay at as many
    /// places, 0 where they spread.
    /// </summary>
    public required int CommensurateMultiple { get; init; }

    /// <summary>Slope of the rising edges at the mid level, per sample; 0 where it could not be read.</summary>
    public required double RisingSlope { get; init; }

    /// <summary>Slope of the falling edges there, without its sign.</summary>
    public required double FallingSlope { get; init; }

    /// <summary>Standard uncertainty of a mean width for noise and jitter, samples.</summary>
    public required double WidthNoise { get; init; }

    /// <summary>Bound of the interpolation error of one direction's mean instant, samples, where it does not average.</summary>
    public required double WidthBound { get; init; }

    /// <summary>What the digitiser itself makes of one edge's timing: its noise over the slope, and what interpolation leaves; rms, samples.</summary>
    public required double TimingFloor { get; init; }

    /// <summary>The edges and their grid.</summary>
    public required EdgeRegression Regression { get; init; }

    /// <summary>Edges that were left out as strays.</summary>
    public required int Outliers { get; init; }

    /// <summary>Rising and falling edges, counted.</summary>
    public required (int Rising, int Falling) Edges { get; init; }

    /// <summary>Finds the frequency.</summary>
    /// <param name="samples">Shape [n], equally spaced.</param>
    /// <param name="transitions">Its transitions about the mid level, in order.</param>
    /// <param name="low">Lower level.</param>
    /// <param name="high">Upper level.</param>
    /// <param name="noise">Rms noise of one sample.</param>
    /// <param name="shape">What kind of wave it is, and the quantisation step.</param>
    /// <returns>Null where no two edges of one direction are there, or the edges keep no steady period.</returns>
    public static CrossingFrequency? Measure(ReadOnlySpan<double> samples, IReadOnlyList<Transition> transitions, double low, double high, double noise, WaveShape shape)
    {
        ArgumentNullException.ThrowIfNull(transitions);
        ArgumentNullException.ThrowIfNull(shape);
        if (transitions.Count < 3)
            return null;
        double duration = ScopeReader.Edges.SingleEdge.Median(samples, transitions, low, high) ?? 0;
        double halfWindow = shape.Kind == WaveKind.Sinusoidal ? SineWindow * RoughPeriod(transitions) : EdgeWindow * duration;
        EdgeInstants instants = EdgeInstants.Read(samples, transitions, (low + high) / 2, halfWindow);
        if (EdgeRegression.Fit(instants.Rising, instants.Falling) is not { } fit || fit.Spread > LargestSpread * fit.Period || fit.Outliers > transitions.Count / 5)
            return null;

        double slope = 0.8 * (high - low) / Math.Max(duration, 0.8);
        double expected = instants.NoiseFactor * Math.Sqrt(noise * noise + shape.Step * shape.Step / 12) / slope;
        double bound = duration > Resolved ? ScopeReader.Edges.InterpolationError.LinearAtMiddle(duration) : 0.5;
        // The states' noise hides the steps of the converter from 0.3 step on.
        if (noise < 0.3 * shape.Step)
            bound = Math.Min(0.5, bound + shape.Step / 2 / slope);

        double frequency = 1 / fit.Period;
        var terms = new List<BudgetTerm>();
        if (fit.DegreesOfFreedom >= FewestDegreesOfFreedom)
            terms.Add(BudgetTerm.Normal(fit.Spread > 2 * expected + LeftByInterpolation * bound ? "jitter" : "noise", fit.PeriodUncertainty, frequency * frequency, fit.DegreesOfFreedom));
        else
            terms.Add(BudgetTerm.Normal("noise", Math.Max(expected, fit.Spread) * fit.UncertaintyFactor, frequency * frequency));
        int multiple = EdgeInterpolation.CommensurateMultiple(fit.Period, samples.Length / fit.Period);
        double relative = multiple == 0 ? 0 : EdgeInterpolation.RelativeBound(bound / OfHarmonic(duration, multiple), samples.Length);
        if (multiple != 0)
            terms.Add(BudgetTerm.Rectangular(InterpolationTerm, relative * fit.Period, frequency * frequency));

        double spread = fit.DegreesOfFreedom >= FewestDegreesOfFreedom ? fit.Spread : Math.Max(expected, fit.Spread);
        FoldedEdge.Crossing? rising = Fold(samples, fit, fit.RisingOrigin, true, low, high, duration, multiple), falling = Fold(samples, fit, fit.FallingOrigin, false, low, high, duration, multiple);
        (int Rising, int Falling) edges = (instants.Rising.Length, instants.Falling.Length);
        // What the edges scatter beyond noise is jitter, and averages with the edges only.
        double jitter = Math.Max(0, spread * spread - expected * expected) * (1.0 / Math.Max(1, edges.Rising) + 1.0 / Math.Max(1, edges.Falling));
        double ur = rising?.Uncertainty ?? expected, uf = falling?.Uncertainty ?? expected;
        return new CrossingFrequency
        {
            Estimate = new FrequencyEstimate(Method, frequency, terms, fit.Edges),
            Grid = new PeriodGrid(fit.Period, fit.PeriodUncertainty, fit.RisingOrigin + (rising?.Offset ?? 0), fit.FallingOrigin + (falling?.Offset ?? 0), spread),
            EdgeDuration = duration,
            InterpolationBound = bound,
            CommensurateMultiple = multiple,
            RisingSlope = rising?.Slope ?? slope,
            FallingSlope = falling?.Slope ?? slope,
            WidthNoise = Math.Sqrt(ur * ur + uf * uf + jitter),
            WidthBound = multiple == 0 ? 0 : bound / OfHarmonic(duration, multiple),
            // Of the fitted slope, where there is one: the rough one is that of a straight edge, and overstates the noise's part.
            TimingFloor = double.Hypot(expected * slope / (rising?.Slope ?? falling?.Slope ?? slope), (duration > Resolved ? LeftByInterpolation : 1 / Math.Sqrt(3)) * bound),
            Regression = fit,
            Outliers = fit.Outliers,
            Edges = edges,
        };
    }

    private static FoldedEdge.Crossing? Fold(ReadOnlySpan<double> samples, EdgeRegression fit, double? origin, bool isRising, double low, double high, double duration, int places) =>
        origin is { } instant ? FoldedEdge.Find(samples, instant, fit.Period, isRising, (low + high) / 2, high - low, duration, places) : null;

    // Harmonics of the interpolation error over the place between samples: 1/m³ for its cubic form, 1/m for unresolved edges.
    private static double OfHarmonic(double duration, int multiple) => Math.Pow(multiple, duration > Resolved ? 3 : 1);

    private static double RoughPeriod(IReadOnlyList<Transition> transitions)
    {
        int count = Math.Min(501, transitions.Count - 2);
        var periods = new double[count];
        for (int i = 0; i < count; i++)
            periods[i] = transitions[i + 2].Instant - transitions[i].Instant;
        Array.Sort(periods);
        return periods[count / 2];
    }
}
