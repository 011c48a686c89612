namespace ScopeReader.Levels;

/// <summary>Takes a first look at a waveform.</summary>
public static class WaveShapeAnalyser
{
    private const int Differences = 20001;

    // Shares of the samples near the two levels, and in the middle third between them. Sines: 0.49 and 0.19; triangles less
    // and more; a wave that ramps a quarter of the time 0.8 and 0.08; strong ringing leaves the levels but not for the middle.
    private const double MostlyNear = 0.55, LargelyNear = 0.35, SeldomBetween = 0.08;
    private const double LeastSeparation = 5, FewestOnState = 3;

    /// <summary>Classifies a waveform and finds its rough levels.</summary>
    /// <param name="samples">Shape [n], any unit, n of 1 or more.</param>
    public static WaveShape Look(ReadOnlySpan<double> samples)
    {
        double minimum = double.PositiveInfinity, maximum = double.NegativeInfinity;
        foreach (double value in samples)
            (minimum, maximum) = (Math.Min(minimum, value), Math.Max(maximum, value));
        if (minimum == maximum)
            return new WaveShape(WaveKind.Flat, minimum, maximum, 0, minimum, maximum, 0);

        double step = QuantisationStep.Find(samples);
        var histogram = new LevelHistogram(samples, minimum, maximum, step);
        int middle = histogram.Divide();
        double low = histogram.Shorth(0, middle), high = histogram.Shorth(middle + 1, histogram.Bins - 1);
        double scatter = 1.4826 * Math.Min(histogram.MedianDistance(0, middle, low), histogram.MedianDistance(middle + 1, histogram.Bins - 1, high));
        double noise = Math.Min(scatter, FromDifferences(samples));
        if (!(high > low))
            return new WaveShape(WaveKind.Other, minimum, maximum, step, minimum, maximum, noise);

        if (SineCheck.Fit(samples, low, high, noise) is { } sine)
            return new WaveShape(WaveKind.Sinusoidal, minimum, maximum, step, sine.Offset - sine.Amplitude, sine.Offset + sine.Amplitude, sine.Noise);

        double swing = high - low, near = Math.Max(0.6 * step, Math.Clamp(2.5 * noise, 0.1 * swing, 0.3 * swing));
        double onLow = histogram.Between(low - near, low + near), onHigh = histogram.Between(high - near, high + near);
        double onStates = (onLow + onHigh) / samples.Length, between = (double)histogram.Between(low + swing / 3, high - swing / 3) / samples.Length;
        bool twoStates = swing > LeastSeparation * scatter && Math.Min(onLow, onHigh) >= FewestOnState
            && (onStates >= MostlyNear || (onStates >= LargelyNear && between <= SeldomBetween));
        if (twoStates && StateLevelAnalyser.AreApart(samples, low, high, noise))
            return new WaveShape(WaveKind.TwoState, minimum, maximum, step, low, high, noise);
        return SineCheck.FitLine(samples) is { } fast
            ? new WaveShape(WaveKind.Sinusoidal, minimum, maximum, step, fast.Offset - fast.Amplitude, fast.Offset + fast.Amplitude, fast.Noise)
            : new WaveShape(WaveKind.Other, minimum, maximum, step, minimum, maximum, noise);
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
