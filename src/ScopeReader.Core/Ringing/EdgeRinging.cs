using ScopeReader.Edges;

namespace ScopeReader.Ringing;

/// <summary>The ringing after the edges of one polarity: the fit, and how much it depends on where it starts. Times in samples.</summary>
/// <param name="Fit">The fit.</param>
/// <param name="Start">Where it starts, from the 50 % instant.</param>
/// <param name="FrequencyShift">Change of the frequency with a later start, beyond noise; 0 where there is none.</param>
/// <param name="DecayShift">Change of the decay with a later start, beyond noise.</param>
/// <param name="AmplitudeShift">Change of the amplitude at the 50 % instant with a later start, beyond noise.</param>
/// <param name="Correlation">Factor that residuals which follow each other put on the uncertainties, 1 or more.</param>
internal sealed record EdgeRinging(DampedSinusoidFit Fit, double Start, double FrequencyShift, double DecayShift, double AmplitudeShift, double Correlation)
{
    // The decision between curves by the Bayesian information criterion: a difference of 10 is strong evidence.
    private const double StrongEvidence = 10;

    private const double AmplitudeOverUncertainty = 4, LargestDampingRatio = 0.7, SmallestAmplitude = 1e-5;

    private const int MostPoints = 20_000;

    /// <summary>Looks for ringing.</summary>
    /// <returns>Null where there is none that these points show.</returns>
    public static EdgeRinging? Find(MeasuredEdge edge)
    {
        double duration = edge.Duration, end = edge.Edge.Times[^1];
        // A Gaussian driving edge of this duration has died away to 1e-4 by then.
        double start = AfterTransition(edge);
        if (First(edge, start, end) is not { } found)
            return null;
        for (int move = 0; ; move++)
        {
            if (Refined(edge, found.Curve, start, end) is not { } fit)
                return null;
            start = FirstTime(edge, start);
            double later = FirstTime(edge, start + Math.Max(duration / 2, 0.25 / fit.Curve.Frequency));
            // What a fit from a later start does not find again was the end of the edge, not ringing.
            if (Refined(edge, fit.Curve, later, end) is not { } check)
                return null;
            var (all, again) = WithMore(edge, fit, check, start, later, end);
            double f = Shift(all, again, start, later, Of.Frequency), a = Shift(all, again, start, later, Of.Decay), r = Shift(all, again, start, later, Of.Amplitude);
            if ((f == 0 && a == 0 && r == 0) || move == 3)
                return new EdgeRinging(all, start, f, a, r, Follow(edge, all, start));
            (found, start) = (check, later);
        }
    }

    /// <summary>A quantity of the ringing and its change with the fit's unknowns.</summary>
    public enum Of
    {
        /// <summary>Cycles per sample.</summary>
        Frequency,

        /// <summary>Decay, 1/sample.</summary>
        Decay,

        /// <summary>Damping ratio.</summary>
        DampingRatio,

        /// <summary>Envelope at the 50 % instant, of the step.</summary>
        Amplitude,
    }

    /// <summary>Value and standard uncertainty of a quantity.</summary>
    /// <param name="quantity">Which.</param>
    /// <param name="mode">Of which of the fit's modes; 0 for the largest.</param>
    public (double Value, double Uncertainty) Read(Of quantity, int mode = 0)
    {
        var (value, uncertainty) = Read(Fit, Start, quantity, mode);
        return (value, uncertainty * Math.Sqrt(Fit.ReducedChiSquare) * Correlation);
    }

    /// <summary>Smallest envelope, of the step, that could have been told from noise after this edge.</summary>
    public static double Floor(MeasuredEdge edge)
    {
        double start = AfterTransition(edge), weights = 0;
        int first = edge.Edge.IndexAt(start), end = edge.Edge.IndexAt(start + 3 * edge.Duration);
        for (int i = first; i < end; i++)
            weights += 1 / edge.Edge.Variance(i);
        return weights > 0 ? Math.Max(SmallestAmplitude, AmplitudeOverUncertainty * Math.Sqrt(2 / weights)) : 1;
    }

    private static double AfterTransition(MeasuredEdge edge) => (edge.High?.Instant ?? edge.Duration / 2) + edge.Duration;

    // A fit counts its time from the first point in its window.
    private static double FirstTime(MeasuredEdge edge, double from) => edge.Edge.Times[Math.Min(edge.Edge.IndexAt(from), edge.Edge.Times.Length - 1)];

    private static (double Value, double Uncertainty) Read(DampedSinusoidFit fit, double start, Of quantity, int mode = 0)
    {
        DampedSinusoid c = fit.Modes[mode];
        Span<double> gradient = stackalloc double[DampedSinusoid.Unknowns];
        double value;
        switch (quantity)
        {
            case Of.Frequency:
                (value, gradient[0]) = (c.Frequency, 1);
                break;
            case Of.Decay:
                (value, gradient[1]) = (c.Decay, 1);
                break;
            case Of.DampingRatio:
                double angular = 2 * Math.PI * c.Frequency, cube = Math.Pow(double.Hypot(c.Decay, angular), 3);
                value = SecondOrder.DampingRatio(c.Frequency, c.Decay);
                (gradient[0], gradient[1]) = (-2 * Math.PI * c.Decay * angular / cube, angular * angular / cube);
                break;
            default:
                double back = Math.Exp(c.Decay * start);
                value = c.Amplitude * back;
                (gradient[1], gradient[2], gradient[3]) = (start * value, c.Cosine / c.Amplitude * back, c.Sine / c.Amplitude * back);
                break;
        }
        return (value, fit.Uncertainty(gradient, mode));
    }

    // Six time constants hold all but 0.25 % of it; three cycles and two transitions fix the level that it dies away to.
    private static RingingWindow Window(MeasuredEdge edge, DampedSinusoid curve, double start, double end)
    {
        double length = Math.Max(Math.Max(6 / curve.Decay, 3 / curve.Frequency), 2 * edge.Duration);
        return RingingWindow.Of(edge.Edge, start, Math.Min(end, start + length), MostPoints);
    }

    // With what else rings beside it, and the same from the later start.
    private static (DampedSinusoidFit All, DampedSinusoidFit Again) WithMore(MeasuredEdge edge, DampedSinusoidFit fit, DampedSinusoidFit check, double start, double later, double end)
    {
        RingingWindow window = Window(edge, fit.Curve, start, end), after = Window(edge, fit.Curve, later, end);
        DampedSinusoidFit all = RingingModes.Extended(window, fit, after);
        return all.Modes.Count > 1 && RingingModes.Again(after, all) is { } again ? (all, again) : (fit, check);
    }

    // The best of several windows, each twice to four times as long as the one before: the ringing may die at once or last.
    private static DampedSinusoidFit? First(MeasuredEdge edge, double start, double end)
    {
        (DampedSinusoidFit? Fit, double Gain) best = (null, 0);
        for (double length = 8 * edge.Duration; ; length *= 4)
        {
            bool isWhole = length >= end - start;
            var window = RingingWindow.Of(edge.Edge, start, isWhole ? end : start + length, 512);
            if (RingingSearch.One(window) is { } fit && window.WithoutRinging().ChiSquare - fit.ChiSquare is var gain && gain > best.Gain)
                best = (fit, gain);
            if (isWhole)
                return best.Fit;
        }
    }

    // The fit over the time in which the ringing lives, if it is ringing.
    private static DampedSinusoidFit? Refined(MeasuredEdge edge, DampedSinusoid curve, double start, double end)
    {
        if (!(curve.Decay > 0))
            curve = curve with { Decay = 1 / (end - start) };
        RingingWindow window = Window(edge, curve, start, end);
        if (window.Times.Length < 3 * DampedSinusoid.Unknowns || window.Fit(curve.Frequency, curve.Decay) is not { } fit)
            return null;
        var (chiSquare, unknowns) = window.WithoutRinging();
        double n = fit.Points, evidence = n * Math.Log(chiSquare / fit.ChiSquare) - (DampedSinusoid.Unknowns - unknowns) * Math.Log(n);
        double amplitude = fit.Curve.Amplitude, u = Read(fit, 0, Of.Amplitude).Uncertainty * Math.Sqrt(fit.ReducedChiSquare);
        bool rings = evidence > StrongEvidence && fit.Curve.Decay > 0 && amplitude > AmplitudeOverUncertainty * u && amplitude > SmallestAmplitude
            && SecondOrder.DampingRatio(fit.Curve.Frequency, fit.Curve.Decay) < LargestDampingRatio;
        return rings ? fit : null;
    }

    // A later start leaves information out, so by itself it moves the result by what that information was worth.
    private static double Shift(DampedSinusoidFit early, DampedSinusoidFit late, double start, double later, Of quantity)
    {
        var (a, ua) = Read(early, start, quantity);
        var (b, ub) = Read(late, later, quantity);
        ua *= Math.Sqrt(early.ReducedChiSquare);
        ub *= Math.Sqrt(late.ReducedChiSquare);
        double expected = Math.Sqrt(Math.Max(ub * ub - ua * ua, 0.1 * ub * ub)), shift = Math.Abs(b - a);
        return shift > 3 * expected ? shift : 0;
    }

    // Residuals that follow each other count as fewer: (1 + ρ)/(1 − ρ) of the variance, ρ their correlation at one point apart.
    private static double Follow(MeasuredEdge edge, DampedSinusoidFit fit, double start)
    {
        var window = RingingWindow.Of(edge.Edge, start, edge.Edge.Times[^1], int.MaxValue);
        int n = Math.Min(fit.Points, window.Times.Length);
        double sum = 0, product = 0, before = 0;
        for (int i = 0; i < n; i++)
        {
            double r = (window.Values[i] - fit.At(window.Times[i] - window.Times[0])) / Math.Sqrt(window.Variances[i]);
            sum += r * r;
            product += r * before;
            before = r;
        }
        double correlation = sum > 0 ? product / sum : 0;
        return correlation > 3 / Math.Sqrt(n) ? Math.Sqrt((1 + correlation) / (1 - Math.Min(correlation, 0.98))) : 1;
    }
}
