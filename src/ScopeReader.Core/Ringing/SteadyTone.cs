using System.Numerics;

namespace ScopeReader.Ringing;

/// <summary>A sine that goes on through the edges, found in windows of the levels.</summary>
/// <param name="Frequency">Cycles per sample.</param>
/// <param name="Low">Complex amplitude on the low level, phase counted from the record's first sample.</param>
/// <param name="High">On the high level.</param>
/// <param name="Share">Share of the windows' power that it explains, 0 to 1.</param>
/// <param name="AnewFrequency">Frequency of the sine that explains most where it may start anew on each level.</param>
/// <param name="AnewShare">Share of power that such a one explains.</param>
internal sealed record SteadyTone(double Frequency, Complex Low, Complex High, double Share, double AnewFrequency, double AnewShare)
{
    private const int PerBin = 4;

    // Share of the windows' power that must be left of a sine without its mean over the edges.
    private const double LeastTurn = 0.005;

    /// <summary>The sine that explains most.</summary>
    /// <param name="windows">Where the windows lie.</param>
    /// <param name="values">What is in them.</param>
    public static SteadyTone Of(BandWindows windows, Complex[] values)
    {
        // First within the levels, each for itself: that is coarse and cannot be led astray by the gaps between them.
        double[] local = [windows.Steps[0] * windows.Slots(false), windows.Steps[1] * windows.Slots(true)];
        double length = Math.Max(windows.Width, Math.Max(local[0], local[1])), reach = 1.5 / windows.Width;
        double coarse = Highest(-reach, reach, 1 / (PerBin * length), offset => WithinLevels(windows, values, offset));
        double anew = Sharpened(coarse, 0.5 / (PerBin * length), offset => WithinLevels(windows, values, offset));
        // Then over all of them.
        double first = double.PositiveInfinity, last = double.NegativeInfinity;
        for (int i = 0; i < windows.Count; i++)
            (first, last) = (Math.Min(first, windows.Centre(i)), Math.Max(last, windows.Centre(i)));
        double step = 1 / (PerBin * Math.Max(last - first, windows.Width)), range = 1 / length;
        double fine = Highest(coarse - range, coarse + range, step, offset => OverLevels(windows, values, offset));
        fine = Sharpened(fine, step / 2, offset => OverLevels(windows, values, offset));
        double power = values.Sum(Square);
        var (low, high) = Amplitudes(windows, values, fine);
        return new SteadyTone(windows.Frequency + fine, low, high, power > 0 ? Explained(windows, low, high, apart: true) / power : 0,
            windows.Frequency + anew, power > 0 ? WithinLevels(windows, values, anew) / power : 0);
    }

    /// <summary>Its value in a window.</summary>
    public Complex In(BandWindows windows, int i) =>
        (windows.IsHigh(i) ? High : Low) * BandWindows.Turned((Frequency - windows.Frequency) * windows.Centre(i));

    /// <summary>The amplitudes where the edges have anything at all in common beside the sine; null where every edge finds it in about the same phase.</summary>
    /// <param name="windows">Windows at this frequency.</param>
    /// <param name="rest">What is in them less what the edges have in common.</param>
    /// <remarks>Least squares of both at once: the sine, too, is held against what it is less its own mean over the edges.</remarks>
    public SteadyTone? Beside(BandWindows windows, Complex[] rest)
    {
        var sine = new Complex[windows.Count];
        for (int i = 0; i < sine.Length; i++)
            sine[i] = BandWindows.Turned((Frequency - windows.Frequency) * windows.Centre(i));
        sine = windows.Without(sine, windows.Mean(sine));
        var product = new Complex[2];
        double[] power = new double[2];
        for (int i = 0; i < sine.Length; i++)
        {
            int level = windows.IsHigh(i) ? 1 : 0;
            product[level] += rest[i] * Complex.Conjugate(sine[i]);
            power[level] += Square(sine[i]);
        }
        if (power[0] + power[1] < LeastTurn * windows.Count)
            return null;
        return this with { Low = power[0] > 0 ? product[0] / power[0] : 0, High = power[1] > 0 ? product[1] / power[1] : 0 };
    }

    private static (Complex Low, Complex High) Amplitudes(BandWindows windows, Complex[] values, double offset)
    {
        Complex low = 0, high = 0;
        int lows = 0, highs = 0;
        for (int i = 0; i < windows.Count; i++)
        {
            Complex v = values[i] * Complex.Conjugate(BandWindows.Turned(offset * windows.Centre(i)));
            if (windows.IsHigh(i))
                (high, highs) = (high + v, highs + 1);
            else
                (low, lows) = (low + v, lows + 1);
        }
        return (lows > 0 ? low / lows : 0, highs > 0 ? high / highs : 0);
    }

    // A sine on both levels is one sine: with a phase for each, frequencies an edge rate away would do nearly as well.
    private static double OverLevels(BandWindows windows, Complex[] values, double offset)
    {
        var (low, high) = Amplitudes(windows, values, offset);
        return Explained(windows, low, high, apart: false);
    }

    // Power explained with an amplitude for each level, or else with one for both or for one alone.
    private static double Explained(BandWindows windows, Complex low, Complex high, bool apart)
    {
        int highs = windows.Edges(true) * windows.Slots(true), lows = windows.Count - highs;
        double onLow = lows * Square(low), onHigh = highs * Square(high);
        return apart ? onLow + onHigh : Math.Max(Square(lows * low + highs * high) / windows.Count, Math.Max(onLow, onHigh));
    }

    // Power explained with an amplitude of its own for each level.
    private static double WithinLevels(BandWindows windows, Complex[] values, double offset)
    {
        double power = 0;
        for (int i = 0; i < windows.Count;)
        {
            Complex sum = 0;
            int first = i;
            for (; i < windows.Count && windows.Span(i) == windows.Span(first); i++)
                sum += values[i] * Complex.Conjugate(BandWindows.Turned(offset * windows.Centre(i)));
            power += Square(sum) / (i - first);
        }
        return power;
    }

    private static double Square(Complex z) => z.Real * z.Real + z.Imaginary * z.Imaginary;

    // On a grid, and by a parabola between its points.
    private static double Highest(double from, double to, double step, Func<double, double> height)
    {
        int steps = Math.Max(2, (int)Math.Ceiling((to - from) / step)), best = 0;
        var heights = new double[steps + 1];
        for (int i = 0; i <= steps; i++)
        {
            heights[i] = height(from + i * (to - from) / steps);
            best = heights[i] > heights[best] ? i : best;
        }
        double place = best;
        if (best > 0 && best < steps)
        {
            double bend = heights[best - 1] - 2 * heights[best] + heights[best + 1];
            place += bend < 0 ? (heights[best - 1] - heights[best + 1]) / (2 * bend) : 0;
        }
        return from + place * (to - from) / steps;
    }

    // A parabola is exact in the limit of close points.
    private static double Sharpened(double place, double step, Func<double, double> height)
    {
        for (int i = 0; i < 5; i++, step /= 4)
        {
            double before = height(place - step), here = height(place), after = height(place + step), bend = before - 2 * here + after;
            if (bend < 0)
                place += Math.Clamp((before - after) / (2 * bend), -1, 1) * step;
        }
        return place;
    }
}
