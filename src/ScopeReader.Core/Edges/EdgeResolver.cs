using ScopeReader.Levels;
using ScopeReader.Numerics;

namespace ScopeReader.Edges;

/// <summary>Finds the reference-level instants of an averaged edge, or says why its samples do not show them.</summary>
internal static class EdgeResolver
{
    /// <summary>Points that must lie between the reference levels, each in a place of its own.</summary>
    private const int FewestPoints = 3;

    /// <summary>Measures an averaged edge.</summary>
    /// <param name="edge">The averaged edge, its time 0 near the 50 % instant.</param>
    /// <param name="levels">The state levels.</param>
    /// <param name="settings">The reference levels.</param>
    /// <param name="problem">Why the edge is not resolved; null where it is.</param>
    /// <param name="describe">Writes a time in samples for people.</param>
    /// <returns>Null where not even a bound on the duration is known.</returns>
    public static MeasuredEdge? Resolve(AveragedEdge edge, StateLevels levels, LevelSettings settings, Func<double, string> describe, out EdgeProblem? problem)
    {
        double before = (edge.IsRising ? levels.LowUncertainty : levels.HighUncertainty) / levels.Amplitude;
        double after = (edge.IsRising ? levels.HighUncertainty : levels.LowUncertainty) / levels.Amplitude;
        // A falling edge passes the upper reference level first: seen as a step from 0 to 1 that is the lower one.
        double lowPercent = edge.IsRising ? settings.ReferenceLowPercent : 100 - settings.ReferenceHighPercent;
        double highPercent = edge.IsRising ? settings.ReferenceHighPercent : 100 - settings.ReferenceLowPercent;
        (double low, double high) = (lowPercent / 100, highPercent / 100);

        int last = LastAtMost(edge, low), first = FirstAtLeast(edge, high);
        if (last < 0 || first >= edge.Times.Length)
        {
            problem = new EdgeProblem("edge-incomplete", Text($"the record does not hold the whole edge from {lowPercent:0.##} to {highPercent:0.##} % of the step; move the trigger or take a longer record"));
            return null;
        }
        double bound = edge.Times[first] - edge.Times[last];
        if (Places(edge, last, first) < FewestPoints)
        {
            problem = first == last + 1
                ? new EdgeProblem("too-few-samples", $"the whole edge lies between two samples {describe(bound)} apart; sample faster")
                : new EdgeProblem("too-few-samples", $"fewer than 3 samples lie on the edge, which takes at most {describe(bound)}; sample faster");
            double middle = edge.Times[last] + bound / 2;
            // The 50 % instant is somewhere between the two points.
            return new MeasuredEdge(edge.Shifted(middle), bound, new EdgeInstant(bound / 2 / Math.Sqrt(3), 1 / bound), null, null, 0, before, after);
        }

        var at50 = EdgeCrossing.Find(edge, 0.5, edge.Times[last], forward: true, bound);
        var atLow = at50 is null ? null : EdgeCrossing.Find(edge, low, at50.Instant, forward: false, bound);
        var atHigh = at50 is null ? null : EdgeCrossing.Find(edge, high, at50.Instant, forward: true, bound);
        if (at50 is null || atLow is null || atHigh is null || atHigh.Instant <= atLow.Instant)
        {
            problem = new EdgeProblem("edge-not-smooth", "the edge does not pass its reference levels in one smooth sweep; lower the noise or look for a reflection");
            return null;
        }
        problem = null;
        double duration = atHigh.Instant - atLow.Instant, sigma = duration / (BoundedNormal.NormalQuantile(high) - BoundedNormal.NormalQuantile(low));
        return new MeasuredEdge(edge.Shifted(at50.Instant), duration, new EdgeInstant(double.Hypot(at50.Noise, at50.Rounding), at50.Slope),
            atLow.From(at50.Instant), atHigh.From(at50.Instant),
            atLow.Interpolation(edge, sigma) + atHigh.Interpolation(edge, sigma), before, after);
    }

    private static int LastAtMost(AveragedEdge edge, double level)
    {
        int i = edge.IndexAt(0) - 1;
        while (i >= 0 && edge.Values[i] > level)
            i--;
        return i;
    }

    private static int FirstAtLeast(AveragedEdge edge, double level)
    {
        int i = edge.IndexAt(0);
        while (i < edge.Times.Length && edge.Values[i] < level)
            i++;
        return i;
    }

    // Points between, those closer than a tenth of the way counted once: samples of many edges at one phase are one place.
    private static int Places(AveragedEdge edge, int last, int first)
    {
        double apart = (edge.Times[first] - edge.Times[last]) / 10, before = double.NegativeInfinity;
        int places = 0;
        for (int i = last + 1; i < first; i++)
        {
            if (edge.Times[i] - before < apart)
                continue;
            before = edge.Times[i];
            places++;
        }
        return places;
    }

    private static string Text(FormattableString text) => FormattableString.Invariant(text);
}
