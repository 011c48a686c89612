namespace ScopeReader.Edges;

/// <summary>A rough transition duration, to size windows by; the measured one is a reading of its own.</summary>
internal static class EdgeDuration
{
    private const int Inspected = 501;

    /// <summary>Median 10 to 90 % duration of the transitions, samples; 0 without transitions.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="transitions">The transitions.</param>
    /// <param name="low">Lower level.</param>
    /// <param name="high">Upper level.</param>
    public static double Rough(ReadOnlySpan<double> samples, IReadOnlyList<Transition> transitions, double low, double high)
    {
        int count = Math.Min(Inspected, transitions.Count);
        if (count == 0)
            return 0;
        double lower = low + 0.1 * (high - low), upper = low + 0.9 * (high - low);
        var durations = new double[count];
        for (int i = 0; i < count; i++)
        {
            Transition transition = transitions[(int)((long)i * transitions.Count / count)];
            durations[i] = Outward(samples, transition, +1, transition.IsRising ? upper : lower)
                + Outward(samples, transition, -1, transition.IsRising ? lower : upper);
        }
        Array.Sort(durations);
        return durations[count / 2];
    }

    // Distance from the crossing to the nearest passage of a level, walking one way.
    private static double Outward(ReadOnlySpan<double> samples, Transition transition, int direction, double level)
    {
        bool upwards = transition.IsRising == direction > 0;
        int i = direction > 0 ? transition.Index + 1 : transition.Index;
        while (i >= 0 && i < samples.Length && (upwards ? samples[i] < level : samples[i] > level))
            i += direction;
        if (i < 0 || i >= samples.Length)
            return Math.Abs(i - transition.Instant);
        int before = Math.Clamp(i - direction, 0, samples.Length - 1);
        double step = samples[i] - samples[before];
        double part = step == 0 ? 0 : Math.Clamp((level - samples[before]) / step, 0, 1);
        return Math.Abs(before + direction * part - transition.Instant);
    }
}
