using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using ScopeReader.Edges;
using ScopeReader.Frequency;

namespace ScopeReader.Levels;

/// <summary>Takes a first look at a waveform.</summary>
public static class WaveShapeAnalyser
{
    private const int Differences = 20001;

    // Shares of the samples near the two levels, and in the middle third between them. Sines: 0.49 and 0.19; triangles less
    // and more; a wave that ramps a quarter of the time 0.8 and 0.08; strong ringing leaves the levels but not for the middle.
    private const double MostlyNear = 0.55, LargelyNear = 0.35, SeldomBetween = 0.08;
    private const double LeastSeparation = 5, FewestOnState = 3;
    private const double FewCodes = 4.5, LeastOfNoise = 0.2, SteadySpread = 0.1, SpikeShare = 0.0005, SpikedRange = 0.8;

    /// <summary>Classifies a waveform and finds its rough levels.</summary>
    /// <param name="samples">Shape [n], any unit, n of 1 or more.</param>
    public static WaveShape Look(ReadOnlySpan<double> samples)
    {
        (double minimum, double maximum) = Range(samples);
        if (minimum == maximum)
            return new WaveShape(WaveKind.Flat, minimum, maximum, 0, minimum, maximum, 0);

        double step = QuantisationStep.Find(samples);
        var histogram = new LevelHistogram(samples, minimum, maximum, step);
        WaveShape whole = Classify(samples, histogram, minimum, maximum, step, 0, histogram.Bins - 1);
        // A few spikes can take one side of the wave for themselves.
        (int first, int last) = histogram.Within(SpikeShare);
        return whole.Kind == WaveKind.Other && last - first < SpikedRange * histogram.Bins && last > first
            && Classify(samples, histogram, minimum, maximum, step, first, last) is { Kind: not WaveKind.Other } without ? without : whole;
    }

    private static WaveShape Classify(ReadOnlySpan<double> samples, LevelHistogram histogram, double minimum, double maximum, double step, int first, int last)
    {
        int middle = histogram.Divide(first, last);
        double low = histogram.Shorth(first, middle), high = histogram.Shorth(middle + 1, last);
        double scatter = 1.4826 * Math.Min(histogram.MedianDistance(first, middle, low), histogram.MedianDistance(middle + 1, last, high));
        double noise = Math.Min(scatter, FromDifferences(samples));
        if (!(high > low))
            return new WaveShape(WaveKind.Other, minimum, maximum, step, minimum, maximum, noise);

        if (SineCheck.Fit(samples, low, high, noise) is { } sine)
            return new WaveShape(WaveKind.Sinusoidal, minimum, maximum, step, sine.Offset - sine.Amplitude, sine.Offset + sine.Amplitude, sine.Noise);

        double swing = high - low, near = Math.Max(0.6 * step, Math.Clamp(2.5 * noise, 0.1 * swing, 0.3 * swing));
        double onLow = histogram.Between(low - near, low + near), onHigh = histogram.Between(high - near, high + near);
        double onStates = (onLow + onHigh) / histogram.Counted, between = (double)histogram.Between(low + swing / 3, high - swing / 3) / histogram.Counted;
        bool twoStates = swing > LeastSeparation * scatter && Math.Min(onLow, onHigh) >= FewestOnState
            && (onStates >= MostlyNear || (onStates >= LargelyNear && between <= SeldomBetween));
        if (twoStates && swing < FewCodes * step && TogglesLikeNoise(samples, low, high, noise, onHigh / (onLow + onHigh)))
            return new WaveShape(WaveKind.Other, minimum, maximum, step, minimum, maximum, noise);
        if (twoStates && StateLevelAnalyser.AreApart(samples, low, high, noise))
            return new WaveShape(WaveKind.TwoState, minimum, maximum, step, low, high, noise);
        return SineCheck.FitLine(samples) is { } fast
            ? new WaveShape(WaveKind.Sinusoidal, minimum, maximum, step, fast.Offset - fast.Amplitude, fast.Offset + fast.Amplitude, fast.Noise)
            : new WaveShape(WaveKind.Other, minimum, maximum, step, minimum, maximum, noise);
    }

    private static (double Minimum, double Maximum) Range(ReadOnlySpan<double> samples)
    {
        Vector256<double> least = Vector256.Create(samples[0]), most = least;
        ref double first = ref MemoryMarshal.GetReference(samples);
        int i = 0;
        for (; i + 4 <= samples.Length; i += 4)
        {
            Vector256<double> four = Vector256.LoadUnsafe(ref first, (nuint)i);
            (least, most) = (Vector256.Min(least, four), Vector256.Max(most, four));
        }
        double minimum = samples[0], maximum = samples[0];
        for (int k = 0; k < 4; k++)
            (minimum, maximum) = (Math.Min(minimum, least[k]), Math.Max(maximum, most[k]));
        for (; i < samples.Length; i++)
            (minimum, maximum) = (Math.Min(minimum, samples[i]), Math.Max(maximum, samples[i]));
        return (minimum, maximum);
    }

    // Noise about a level between two codes looks like two states. It toggles 2p(1 - p) times a sample, p the share of the upper code,
    // and so less where it is slow; a logic signal toggles seldom, or in step with a period.
    private static bool TogglesLikeNoise(ReadOnlySpan<double> samples, double low, double high, double noise, double share)
    {
        samples = Scattered.Stretch(samples, low, high, noise);
        IReadOnlyList<Transition> transitions = Transitions.Find(samples, low, high, noise);
        if (transitions.Count < LeastOfNoise * 2 * share * (1 - share) * samples.Length)
            return false;
        double[] rising = [.. transitions.Where(t => t.IsRising).Select(t => t.Instant)], falling = [.. transitions.Where(t => !t.IsRising).Select(t => t.Instant)];
        return EdgeRegression.Fit(rising, falling, samplePhase: false) is not { } fit || fit.Spread > SteadySpread * fit.Period;
    }

    // Second differences pass over slopes; their median over the few that are edges. White noise gives them √6 sigma.
    private static double FromDifferences(ReadOnlySpan<double> samples)
    {
        if (samples.Length < 3)
            return 0;
        int count = Math.Min(Differences, samples.Length - 2);
        var differences = new double[count];
        for (int i = 0; i < count; i++)
        {
            int at = Scattered.Index(i, count, samples.Length - 2);
            differences[i] = Math.Abs(samples[at] - 2 * samples[at + 1] + samples[at + 2]);
        }
        Array.Sort(differences);
        return 1.4826 * differences[count / 2] / Math.Sqrt(6);
    }
}
