using System.Numerics;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace ScopeReader.Edges;

/// <summary>Finds the passages of a wave from state to state.</summary>
/// <remarks>
/// A passage counts once the wave has gone from beyond one threshold to beyond the other (a Schmitt trigger), so that noise
/// and ringing about the mid level do not. Its instant is that of the mid level inside it, not of the thresholds; where
/// noise crosses the mid level several times, the mean of the first and the last.
/// </remarks>
public static class Transitions
{
    // Four sigma of noise seldom crosses back; a fifth of the swing keeps ringing out; more than 0.35 would lose runts.
    private const double NoiseMultiple = 4, LeastOfSwing = 0.2, MostOfSwing = 0.35;

    /// <summary>Half the distance between the thresholds.</summary>
    /// <param name="swing">Upper minus lower level.</param>
    /// <param name="noise">Rms noise of one sample, in the same unit.</param>
    public static double Hysteresis(double swing, double noise) =>
        Math.Clamp(NoiseMultiple * noise, LeastOfSwing * swing, MostOfSwing * swing);

    /// <summary>Every qualified transition, in order.</summary>
    /// <param name="samples">Shape [n], equally spaced.</param>
    /// <param name="low">Lower level, in the samples' unit.</param>
    /// <param name="high">Upper level, above <paramref name="low"/>.</param>
    /// <param name="noise">Rms noise of one sample.</param>
    /// <exception cref="ArgumentException"><paramref name="high"/> is not above <paramref name="low"/>.</exception>
    public static IReadOnlyList<Transition> Find(ReadOnlySpan<double> samples, double low, double high, double noise)
    {
        if (!(high > low))
            throw new ArgumentException($"the high level {high} is not above the low level {low}", nameof(high));
        double middle = (low + high) / 2, half = Hysteresis(high - low, noise);
        double above = middle + half, below = middle - half;
        var found = new List<Transition>();

        // Before the first sample beyond a threshold the state is unknown, and a passage out of it proves nothing.
        int i = 0;
        while (i < samples.Length && samples[i] < above && samples[i] > below)
            i++;
        if (i == samples.Length)
            return found;
        bool isHigh = samples[i] >= above;
        while (i < samples.Length)
        {
            int from = i;
            i = isHigh ? FirstAtMost(samples, i, below) : FirstAtLeast(samples, i, above);
            if (i == samples.Length)
                break;
            int left = i; // The last sample beyond the threshold that the wave leaves.
            while (left > from && (isHigh ? samples[left] < above : samples[left] > below))
                left--;
            double instant = Crossing(samples, left, i, middle);
            found.Add(new Transition(!isHigh, (int)Math.Floor(instant), instant));
            isHigh = !isHigh;
        }
        return found;
    }

    // Four samples at a time: most of a record is far from any transition.
    private static int FirstAtMost(ReadOnlySpan<double> samples, int i, double level)
    {
        ref double first = ref MemoryMarshal.GetReference(samples);
        Vector256<double> levels = Vector256.Create(level);
        for (; i + 4 <= samples.Length; i += 4)
            if (Vector256.LessThanOrEqual(Vector256.LoadUnsafe(ref first, (nuint)i), levels).ExtractMostSignificantBits() is var found and not 0)
                return i + BitOperations.TrailingZeroCount(found);
        while (i < samples.Length && samples[i] > level)
            i++;
        return i;
    }

    private static int FirstAtLeast(ReadOnlySpan<double> samples, int i, double level)
    {
        ref double first = ref MemoryMarshal.GetReference(samples);
        Vector256<double> levels = Vector256.Create(level);
        for (; i + 4 <= samples.Length; i += 4)
            if (Vector256.GreaterThanOrEqual(Vector256.LoadUnsafe(ref first, (nuint)i), levels).ExtractMostSignificantBits() is var found and not 0)
                return i + BitOperations.TrailingZeroCount(found);
        while (i < samples.Length && samples[i] < level)
            i++;
        return i;
    }

    // From the first and from the last pair of samples that straddle the level between two samples on either side of it.
    private static double Crossing(ReadOnlySpan<double> samples, int from, int to, double level)
    {
        bool rises = samples[to] > samples[from];
        int first = from + 1, last = to;
        while (first < to && rises == samples[first] < level)
            first++;
        while (last - 1 > from && rises != samples[last - 1] < level)
            last--;
        double late = Interpolate(samples, last, level);
        return first == last ? late : (Interpolate(samples, first, level) + late) / 2;
    }

    private static double Interpolate(ReadOnlySpan<double> samples, int after, double level) =>
        after - 1 + (level - samples[after - 1]) / (samples[after] - samples[after - 1]);
}
