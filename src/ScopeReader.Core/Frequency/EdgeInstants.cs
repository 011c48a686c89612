using ScopeReader.Edges;

namespace ScopeReader.Frequency;

/// <summary>The 50 % instants of the transitions, as well as the samples allow.</summary>
/// <remarks>
/// A straight line is fitted through the samples about each crossing, those further off weighing less (1 − d²/w²), so that
/// samples entering the window make no jump. Where the window holds fewer than four samples, the straight line between
/// the two about the crossing is as good and has no window to choose.
/// </remarks>
internal sealed class EdgeInstants
{
    private const int FewestForLine = 4;

    private EdgeInstants(double[] rising, double[] falling, double noiseFactor, double halfWindow) =>
        (Rising, Falling, NoiseFactor, HalfWindow) = (rising, falling, noiseFactor, halfWindow);

    /// <summary>Instants of the rising edges, samples from the first.</summary>
    public double[] Rising { get; }

    /// <summary>Instants of the falling edges.</summary>
    public double[] Falling { get; }

    /// <summary>Standard deviation of an instant over noise divided by slope.</summary>
    public double NoiseFactor { get; }

    /// <summary>Half-width of the line's window, samples; 0 where two points made do.</summary>
    public double HalfWindow { get; }

    /// <summary>Reads every transition's instant.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="transitions">The transitions, in order.</param>
    /// <param name="level">The mid level.</param>
    /// <param name="halfWindow">Half-width of the window about each crossing, samples.</param>
    public static EdgeInstants Read(ReadOnlySpan<double> samples, IReadOnlyList<Transition> transitions, double level, double halfWindow)
    {
        bool line = 2 * halfWindow >= FewestForLine;
        int risingCount = 0;
        foreach (Transition transition in transitions)
            risingCount += transition.IsRising ? 1 : 0;
        var rising = new double[risingCount];
        var falling = new double[transitions.Count - risingCount];
        int r = 0, f = 0;
        foreach (Transition transition in transitions)
        {
            double instant = line ? Line(samples, transition, level, halfWindow) : transition.Instant;
            if (transition.IsRising)
                rising[r++] = instant;
            else
                falling[f++] = instant;
        }
        // Two points: a² + (1 − a)² averages 2/3. The weighted line: Σw²/(Σw)² with Σw = 4w/3 and Σw² = 16w/15.
        return new EdgeInstants(rising, falling, Math.Sqrt(line ? 0.6 / halfWindow : 2.0 / 3), line ? halfWindow : 0);
    }

    private static double Line(ReadOnlySpan<double> samples, Transition transition, double level, double halfWindow)
    {
        double centre = transition.Instant, perWindow = 1 / (halfWindow * halfWindow);
        int first = Math.Max(0, (int)Math.Ceiling(centre - halfWindow)), last = Math.Min(samples.Length - 1, (int)Math.Floor(centre + halfWindow));
        double s0 = 0, s1 = 0, s2 = 0, sy = 0, sxy = 0;
        for (int i = first; i <= last; i++)
        {
            double x = i - centre, w = 1 - x * x * perWindow, y = samples[i] - level;
            s0 += w;
            s1 += w * x;
            s2 += w * x * x;
            sy += w * y;
            sxy += w * x * y;
        }
        double slope = s0 * sxy - s1 * sy, shift = -(s2 * sy - s1 * sxy) / slope;
        // Noise as large as the edge can turn the line over; the two points about the crossing never do.
        return last - first >= 2 && slope > 0 == transition.IsRising && Math.Abs(shift) <= halfWindow ? centre + shift : transition.Instant;
    }
}
