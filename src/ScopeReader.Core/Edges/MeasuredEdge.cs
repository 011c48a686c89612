namespace ScopeReader.Edges;

/// <summary>An averaged edge, and what the readings and the ringing fit need to know of it; times in samples from its 50 % instant.</summary>
public sealed class MeasuredEdge
{
    internal MeasuredEdge(AveragedEdge edge, double duration, EdgeInstant middle, EdgeCrossing? low, EdgeCrossing? high,
        double interpolation, double beforeUncertainty, double afterUncertainty)
    {
        (Edge, Middle, Low, High, Interpolation) = (edge, middle, low, high, interpolation);
        (BeforeUncertainty, AfterUncertainty) = (beforeUncertainty, afterUncertainty);
        // Edges laid over each other that are not quite in place broaden it as a Gaussian filter would: variances add.
        double smear = GaussianEdge.DurationOverSigma * edge.Smear;
        Duration = smear < duration ? Math.Sqrt(duration * duration - smear * smear) : duration;
        Broadening = duration - Duration;
    }

    /// <summary>The averaged edge.</summary>
    public AveragedEdge Edge { get; }

    /// <summary>Between the reference levels, samples; an upper bound where the edge is not resolved.</summary>
    public double Duration { get; }

    /// <summary>True where the samples show the edge's course between the reference levels.</summary>
    public bool IsResolved => Low is not null;

    /// <summary>Time from one level to another, each passed where it is nearest to the 50 % instant.</summary>
    /// <param name="lowPercent">% of the step, below 50.</param>
    /// <param name="highPercent">% of the step, above 50.</param>
    /// <returns>Samples; null where the edge's points do not show it.</returns>
    public double? Between(double lowPercent, double highPercent)
    {
        if (!IsResolved)
            return null;
        return EdgeCrossing.Find(Edge, highPercent / 100, 0, forward: true, Duration)?.Instant
            - EdgeCrossing.Find(Edge, lowPercent / 100, 0, forward: false, Duration)?.Instant;
    }

    /// <summary>What was taken off the duration for edges laid over each other imperfectly, samples.</summary>
    internal double Broadening { get; }

    /// <summary>Bound on the error that the gaps between the points leave in the duration, samples.</summary>
    internal double Interpolation { get; }

    /// <summary>How well the 50 % instant is known.</summary>
    internal EdgeInstant Middle { get; }

    /// <summary>The lower reference level's crossing.</summary>
    internal EdgeCrossing? Low { get; }

    /// <summary>The upper reference level's crossing.</summary>
    internal EdgeCrossing? High { get; }

    /// <summary>Standard uncertainty of the state before the edge, of the step.</summary>
    internal double BeforeUncertainty { get; }

    /// <summary>Standard uncertainty of the state after the edge, of the step.</summary>
    internal double AfterUncertainty { get; }

    /// <summary>Standard uncertainty that the states give a value in the middle of the step, of the step.</summary>
    /// <param name="value">The value, of the step.</param>
    internal double StateUncertainty(double value) => double.Hypot(value * AfterUncertainty, (1 - value) * BeforeUncertainty);
}
