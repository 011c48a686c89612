namespace ScopeReader.Files.Axes;

/// <summary>Samples that look held at the edge of the instrument's range.</summary>
internal static class Clipping
{
    private const int Run = 3;

    // A sine spends 29 % of its time within 5 % of the range from its peaks, a two-state waveform nearly all of it.
    private const double NearShare = 0.05, MostNear = 0.6;

    /// <summary>How many samples lie on an extreme value that they are held at: three or more in a row there, and more than
    /// twice as many as on the value next to it, while other values are spread out.</summary>
    /// <remarks>A two-state waveform without noise rests on its extremes without being clipped: so values in between must be
    /// many, and the way to the extreme must be cut off and not level out.</remarks>
    public static int Count(ReadOnlySpan<double> samples, double minimum, double maximum)
    {
        if (samples.Length < 20 || minimum == maximum)
            return 0;
        double band = NearShare * (maximum - minimum);
        int near = 0;
        foreach (double v in samples)
            if (v < minimum + band || v > maximum - band)
                near++;
        if (near > MostNear * samples.Length)
            return 0;
        return CountAt(samples, maximum, 1) + CountAt(samples, minimum, -1);
    }

    private static int CountAt(ReadOnlySpan<double> samples, double extreme, int sign)
    {
        int held = 0, run = 0, longest = 0, inner = 0;
        double next = double.NegativeInfinity, steps = 0;
        int corners = 0;
        for (int i = 0; i < samples.Length; i++)
        {
            double v = sign * samples[i];
            if (samples[i] == extreme)
            {
                held++;
                run++;
                longest = Math.Max(longest, run);
                continue;
            }
            if (run >= Run && i + 1 < samples.Length)
            {
                // The slope on leaving the edge against the one after it: a clipped wave leaves it at full speed.
                steps += (sign * extreme - v) / Math.Max(double.Epsilon, Math.Abs(v - sign * samples[i + 1]));
                corners++;
            }
            run = 0;
            inner++;
            next = Math.Max(next, v);
        }
        if (longest < Run || held > samples.Length * 3 / 4 || inner == 0)
            return 0;
        int beside = 0;
        foreach (double v in samples)
            if (sign * v == next)
                beside++;
        bool isCutOff = corners > 0 && steps / corners is > 0.2 and < 2;
        return held > 2 * beside && isCutOff ? held : 0;
    }
}
