using ScopeReader.Captures;
using ScopeReader.Numerics;
using ScopeReader.Readings;

namespace ScopeReader.Comparing;

/// <summary>The spectra of two captures, laid over each other: the highest level in each of many equal stretches of frequency.</summary>
internal static class SpectrumOverlay
{
    private const int Cells = 400, Harmonics = 12, FewestCells = 40;

    // A longer record shows finer lines than a plot of this many cells can.
    private const int MostSamples = 1 << 18;

    /// <summary>The overlay; null where the two have no common frequencies or units.</summary>
    public static Overlay? Of(ChannelPair pair) => (pair.Reference[0].Channel, pair.Compared[0].Channel) switch
    {
        (SpectrumTrace a, SpectrumTrace b) when a.Unit == b.Unit => OfTraces(a, b, pair.File),
        (Waveform a, Waveform b) when a.Unit == b.Unit && a.Axis.IsTimed == b.Axis.IsTimed => OfWaveforms(pair, a, b),
        _ => null,
    };

    private static Overlay? OfTraces(SpectrumTrace a, SpectrumTrace b, string file)
    {
        double start = Math.Max(a.Frequencies[0], b.Frequencies[0]), end = Math.Min(a.Frequencies[^1], b.Frequencies[^1]), step = (end - start) / Cells;
        return step > 0
            ? new Overlay("spectrum", file, "Hz", a.Unit, start + step / 2, step, Highest(a.Frequencies, a.Levels, start, step, Cells), Highest(b.Frequencies, b.Levels, start, step, Cells))
            : null;
    }

    private static Overlay? OfWaveforms(ChannelPair pair, Waveform a, Waveform b)
    {
        double end = Math.Min(0.5 / a.Interval, 0.5 / b.Interval), wanted = 0;
        foreach (ChannelMeasurement channel in (ReadOnlySpan<ChannelMeasurement>)[pair.Reference[0], pair.Compared[0]])
            wanted = Math.Max(wanted, Math.Max(2.5 * Value(channel, Quantities.RingingFrequency), Harmonics * Value(channel, Quantities.Frequency)));
        if (wanted == 0 || Math.Min(a.Count, b.Count) < 16)
            return null;
        // Two harmonics a cell show the envelope, which the ringing lifts; with fewer, each line stands for itself.
        double fundamental = Math.Max(Value(pair.Reference[0], Quantities.Frequency), Value(pair.Compared[0], Quantities.Frequency));
        int most = fundamental > 0 ? (int)(Math.Min(end, wanted) / (2 * fundamental)) : 0;
        int cells = most >= FewestCells ? Math.Min(most, Cells) : Cells;
        double step = Math.Min(end, wanted) / cells;
        string unit = a.Unit == "V" ? "dBV" : "dB";
        return new Overlay("spectrum, rms in a Hann window", pair.File, a.Axis.FrequencyUnit, unit, step / 2, step, Levels(a, step, cells), Levels(b, step, cells));
    }

    private static double Value(ChannelMeasurement channel, Quantity quantity) => channel.Primary(quantity)?.Value ?? 0;

    private static double[] Levels(Waveform waveform, double step, int cells)
    {
        int n = RealTransform.FastLengthAtMost(Math.Min(waveform.Count, MostSamples));
        ReadOnlySpan<double> samples = waveform.Samples[..n];
        double mean = SampleSummary.Of(samples).Mean;
        double[] windowed = Window.Hann.Values(n);
        for (int i = 0; i < n; i++)
            windowed[i] *= samples[i] - mean;
        var transform = new RealTransform(n);
        double[] re = new double[transform.Bins], im = new double[transform.Bins], frequencies = new double[transform.Bins];
        transform.Forward(windowed, re, im);
        for (int k = 0; k < re.Length; k++)
        {
            frequencies[k] = k / (n * waveform.Interval);
            // A line of amplitude A makes A·n/2 times the window's gain; far below anything that an instrument shows there is no level.
            re[k] = Decibels.OfAmplitudes(Math.Max(1e-10, double.Hypot(re[k], im[k]) * Math.Sqrt(2) / (n * Window.Hann.CoherentGain)));
        }
        return Highest(frequencies, re, 0, step, cells);
    }

    // The highest level in each cell; where a cell holds no point, the straight line between its neighbours.
    private static double[] Highest(ReadOnlySpan<double> frequencies, ReadOnlySpan<double> levels, double start, double step, int count)
    {
        var cells = new double[count];
        int i = 0;
        for (int c = 0; c < count; c++)
        {
            double from = start + c * step, middle = from + step / 2, highest = double.NegativeInfinity;
            while (i < frequencies.Length && frequencies[i] < from)
                i++;
            for (int k = i; k < frequencies.Length && frequencies[k] < from + step; k++)
                highest = Math.Max(highest, levels[k]);
            if (double.IsNegativeInfinity(highest))
            {
                int after = Math.Clamp(i, 1, frequencies.Length - 1);
                double share = (middle - frequencies[after - 1]) / (frequencies[after] - frequencies[after - 1]);
                highest = levels[after - 1] + Math.Clamp(share, 0, 1) * (levels[after] - levels[after - 1]);
            }
            cells[c] = highest;
        }
        return cells;
    }
}
