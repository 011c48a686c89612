using System.Runtime.InteropServices;

namespace ScopeReader.Files.Axes;

/// <summary>Samples that look held at the edge of the instrument's range.</summary>
internal static class Clipping
{
    private const int Run = 3, Fewest = 20;

    // A sine spends 29 % of its time within 5 % of the range from its peaks, a two-state waveform nearly all of it.
    private const double NearShare = 0.05, MostNear = 0.6;

    // Of the step that follows; a peak that levels out leaves its top by far less, a two-state waveform by far more.
    private const double LeastStep = 0.2, MostStep = 2;

    // Enough samples to see how they are spread.
    private const int Spread = 100_000;

    /// <summary>How many samples lie on an extreme value that they are held at, and the index of the first of them: three or more in a row there, and more than
    /// twice as many as on the value next to it, while other values are spread out.</summary>
    /// <remarks>A two-state waveform without noise rests on its extremes without being clipped: so values in between must be
    /// many, and the way to the extreme must be cut off and not level out.</remarks>
    /// <param name="memory">Shape [n].</param>
    /// <param name="range">Their extremes.</param>
    public static (int Count, int First) Find(ReadOnlyMemory<double> memory, SampleRange range)
    {
        ReadOnlySpan<double> samples = memory.Span;
        (double minimum, double maximum) = (range.Minimum, range.Maximum);
        // Most captures are settled here: a free peak is a value or two.
        if (samples.Length < Fewest || minimum == maximum || (range.AtMinimum < Run && range.AtMaximum < Run))
            return (0, 0);
        double band = NearShare * (maximum - minimum);
        int near = 0;
        int stride = Math.Max(1, samples.Length / Spread), seen = 0;
        for (int i = 0; i < samples.Length; i += stride, seen++)
            if (samples[i] < minimum + band || samples[i] > maximum - band)
                near++;
        if (near > MostNear * seen)
            return (0, 0);
        (int Count, int First) high = (0, 0), low = (0, 0);
        Parallel.Invoke(() => high = At(memory.Span, maximum, 1), () => low = At(memory.Span, minimum, -1));
        return (high.Count + low.Count, high.Count == 0 ? low.First : low.Count == 0 ? high.First : Math.Min(high.First, low.First));
    }

    private static (int Count, int First) At(ReadOnlySpan<double> samples, double extreme, int sign)
    {
        ReadOnlySpan<long> bits = MemoryMarshal.Cast<double, long>(samples);
        long wanted = BitConverter.DoubleToInt64Bits(extreme);
        int held = 0, longest = 0, corners = 0, first = 0;
        double steps = 0;
        for (int at = 0, found; (found = bits[at..].IndexOf(wanted)) >= 0;)
        {
            at += found;
            int run = bits[at..].IndexOfAnyExcept(wanted);
            run = run < 0 ? bits.Length - at : run;
            (held, longest, at) = (held + run, Math.Max(longest, run), at + run);
            if (run >= Run && first == 0)
                first = at - run;
            if (run < Run || at + 1 >= samples.Length)
                continue;
            // The step off the edge against the one after it: a clipped wave leaves the edge at full speed.
            steps += sign * (extreme - samples[at]) / Math.Max(double.Epsilon, Math.Abs(samples[at] - samples[at + 1]));
            corners++;
        }
        bool isCutOff = corners > 0 && steps / corners is > LeastStep and < MostStep;
        return longest >= Run && isCutOff && held > 2 * Beside(samples, extreme, sign) ? (held, first) : (0, 0);
    }

    // How many samples lie on the value next to the extreme one.
    private static int Beside(ReadOnlySpan<double> samples, double extreme, int sign)
    {
        double next = double.NegativeInfinity;
        foreach (double v in samples)
            if (v != extreme)
                next = Math.Max(next, sign * v);
        return SampleRange.CountOf(samples, sign * next);
    }
}
