namespace ScopeReader.Ringing;

/// <summary>Looks for a second and a third mode beside one that was found.</summary>
/// <remarks>
/// A mode counts where the Bayesian information criterion falls by more than 10 through it, it stands four of its own standard
/// uncertainties out of the noise, and a fit from a later start finds it at the same frequency. Starts: the matrix pencil on up to
/// 60 values, and the highest line of what the modes so far leave.
/// </remarks>
internal static class RingingModes
{
    /// <summary>Most modes.</summary>
    public const int Most = 3;

    private const double StrongEvidence = 10, AmplitudeOverUncertainty = 4, LargestDampingRatio = 0.7, Stable = 0.05;

    /// <summary>The fit with as many modes as the window shows, the largest first.</summary>
    /// <param name="window">The points.</param>
    /// <param name="fit">The fit of one mode.</param>
    /// <param name="later">The points from a later start.</param>
    public static DampedSinusoidFit Extended(RingingWindow window, DampedSinusoidFit fit, RingingWindow later)
    {
        while (fit.Modes.Count < Most && More(window, fit) is { } more && IsStable(more, later))
            fit = more;
        if (fit.Modes.Count == 1)
            return fit;
        (double, double)[] starts = [.. fit.Modes.OrderByDescending(m => m.Amplitude).Select(m => (m.Frequency, m.Decay))];
        return window.Fit(starts) ?? fit;
    }

    /// <summary>The same modes from another start; null where they are not found again.</summary>
    public static DampedSinusoidFit? Again(RingingWindow window, DampedSinusoidFit fit) => window.Fit([.. fit.Modes.Select(m => (m.Frequency, m.Decay))]);

    private static DampedSinusoidFit? More(RingingWindow window, DampedSinusoidFit fit)
    {
        DampedSinusoidFit? best = null;
        foreach ((double Frequency, double Decay) start in Starts(window, fit))
            if (window.Fit([.. fit.Modes.Select(m => (m.Frequency, m.Decay)), start]) is { } more && more.ChiSquare < (best?.ChiSquare ?? double.PositiveInfinity))
                best = more;
        return best is not null && IsBetter(fit, best, window) ? best : null;
    }

    private static bool IsBetter(DampedSinusoidFit fewer, DampedSinusoidFit more, RingingWindow window)
    {
        double n = more.Points, evidence = n * Math.Log(fewer.ChiSquare / more.ChiSquare) - (more.Unknowns - fewer.Unknowns) * Math.Log(n);
        if (!(evidence > StrongEvidence) || more.DegreesOfFreedom < n / 2)
            return false;
        double span = window.Times[^1] - window.Times[0], scale = Math.Sqrt(more.ReducedChiSquare);
        for (int m = 0; m < more.Modes.Count; m++)
        {
            DampedSinusoid mode = more.Modes[m];
            double u = scale * more.Uncertainty([0, 0, mode.Cosine / mode.Amplitude, mode.Sine / mode.Amplitude], m);
            // Closer than a cycle over the window, two modes are one whose decay is no exponential.
            bool isApart = more.Modes.Where((_, k) => k != m).All(o => Math.Abs(o.Frequency - mode.Frequency) > 1 / span);
            if (!(mode.Decay > 0) || !(mode.Amplitude > AmplitudeOverUncertainty * u) || !isApart || mode.Frequency < 1 / span
                || SecondOrder.DampingRatio(mode.Frequency, mode.Decay) > LargestDampingRatio)
                return false;
        }
        return true;
    }

    private static bool IsStable(DampedSinusoidFit fit, RingingWindow later)
    {
        if (Again(later, fit) is not { } check)
            return false;
        for (int m = 0; m < fit.Modes.Count; m++)
        {
            double u = 3 * Math.Sqrt(check.ReducedChiSquare) * check.Uncertainty([1, 0, 0, 0], m), f = fit.Modes[m].Frequency;
            if (Math.Abs(check.Modes[m].Frequency - f) > Math.Max(u, 0.005 * f) || u > Stable * f)
                return false;
        }
        return true;
    }

    private static List<(double Frequency, double Decay)> Starts(RingingWindow window, DampedSinusoidFit fit)
    {
        var starts = new List<(double, double)>();
        double span = window.Times[^1] - window.Times[0];
        if (RingingStart.Frequency(window.Less(fit)) is { } highest)
            starts.Add((highest, fit.Curve.Decay));
        // What is there already is no start.
        foreach ((double frequency, double decay) in RingingSearch.OfPencil(window, 2 * (fit.Modes.Count + 1) + 1))
            if (fit.Modes.All(m => Math.Abs(m.Frequency - frequency) > 1 / span))
                starts.Add((frequency, decay));
        return starts;
    }
}
