using System.Numerics;

namespace ScopeReader.Ringing;

/// <summary>The levels between edges, seen through short Hann windows at one frequency: a complex amplitude a window.</summary>
/// <remarks>
/// Windows lie at the same times after every edge of a polarity (slots), half over each other, or farther apart where the
/// levels are long. Phases are counted from the record's first sample.
/// </remarks>
internal sealed class BandWindows
{
    /// <summary>Variance of a mean over windows that half overlap, over that of as many separate ones: 1 + 2/6 for Hann.</summary>
    public const double Overlap = 4.0 / 3;

    private const int MostSlots = 16, MostSamples = 96;

    private readonly int[] _slots = new int[2], _windows = new int[2];
    private readonly List<bool> _high = [];
    private readonly List<int> _slot = [], _span = [];
    private readonly List<double> _centre = [], _edge = [];

    /// <param name="samples">The record.</param>
    /// <param name="spans">Its levels.</param>
    /// <param name="frequency">Cycles per sample.</param>
    /// <param name="width">Length of a window, samples.</param>
    public BandWindows(ReadOnlySpan<double> samples, IReadOnlyList<LevelSpan> spans, double frequency, double width)
    {
        (Frequency, Width) = (frequency, width);
        var values = new List<Complex>();
        for (int polarity = 0; polarity < 2; polarity++)
        {
            bool high = polarity == 1;
            double[] lengths = [.. spans.Where(s => s.IsHigh == high).Select(s => s.Length).Order()];
            if (lengths.Length == 0 || lengths[lengths.Length / 10] < width)
                continue;
            // What nine in ten have: the others are left out.
            double length = lengths[lengths.Length / 10], step = Math.Max(width / 2, (length - width) / (MostSlots - 1));
            _slots[polarity] = (int)((length - width) / step + 1e-9) + 1;
            Steps[polarity] = step;
            for (int k = 0; k < spans.Count; k++)
                if (spans[k].IsHigh == high && spans[k].Length >= length)
                    for (int j = 0; j < _slots[polarity]; j++)
                    {
                        double start = spans[k].Edge + spans[k].From + j * step;
                        values.Add(Demodulated(samples, start, width, frequency));
                        _high.Add(high);
                        _slot.Add(j);
                        _span.Add(k);
                        _edge.Add(spans[k].Edge);
                        _centre.Add(start + width / 2);
                    }
        }
        Values = [.. values];
        for (int i = 0; i < Count; i++)
            _windows[_high[i] ? 1 : 0]++;
    }

    /// <summary>Cycles per sample.</summary>
    public double Frequency { get; }

    /// <summary>Length of a window, samples.</summary>
    public double Width { get; }

    /// <summary>Complex amplitudes: a sine of amplitude A has magnitude A.</summary>
    public Complex[] Values { get; }

    /// <summary>How many windows there are.</summary>
    public int Count => Values.Length;

    /// <summary>From one window to the next, samples, on the low and on the high level.</summary>
    public double[] Steps { get; } = new double[2];

    /// <summary>Windows after an edge.</summary>
    public int Slots(bool high) => _slots[high ? 1 : 0];

    /// <summary>Edges that a slot has a window after.</summary>
    public int Edges(bool high) => Slots(high) == 0 ? 0 : _windows[high ? 1 : 0] / Slots(high);

    /// <summary>Whether a window is on the high level.</summary>
    public bool IsHigh(int i) => _high[i];

    /// <summary>Number of the window after its edge.</summary>
    public int Slot(int i) => _slot[i];

    /// <summary>Number of the level that it is on.</summary>
    public int Span(int i) => _span[i];

    /// <summary>Middle of a window, samples from the first.</summary>
    public double Centre(int i) => _centre[i];

    /// <summary>What turns a window's phase into that counted from its edge.</summary>
    public Complex EdgePhase(int i) => Turned(Frequency * _edge[i]);

    /// <summary>Mean over the edges, phases counted from the edge; shape [2][slots], low first.</summary>
    public Complex[][] Mean(Complex[] values)
    {
        Complex[][] mean = [new Complex[_slots[0]], new Complex[_slots[1]]];
        for (int i = 0; i < Count; i++)
            mean[_high[i] ? 1 : 0][_slot[i]] += values[i] * EdgePhase(i) / Edges(_high[i]);
        return mean;
    }

    /// <summary>What the edges do not have in common.</summary>
    public Complex[] Without(Complex[] values, Complex[][] mean)
    {
        var rest = new Complex[Count];
        for (int i = 0; i < Count; i++)
            rest[i] = values[i] - mean[_high[i] ? 1 : 0][_slot[i]] * Complex.Conjugate(EdgePhase(i));
        return rest;
    }

    /// <summary>Variance of one window about the mean of its slot.</summary>
    /// <param name="rest">As <see cref="Without"/> gives it.</param>
    public double Scatter(Complex[] rest)
    {
        double sum = 0;
        foreach (Complex r in rest)
            sum += r.Real * r.Real + r.Imaginary * r.Imaginary;
        int freedom = Math.Max(1, (Edges(false) - 1) * Slots(false)) + Math.Max(1, (Edges(true) - 1) * Slots(true));
        return sum / freedom;
    }

    /// <summary>A unit vector at an angle.</summary>
    /// <param name="cycles">The angle.</param>
    public static Complex Turned(double cycles)
    {
        (double sin, double cos) = Math.SinCos(2 * Math.PI * (cycles - Math.Round(cycles)));
        return new Complex(cos, sin);
    }

    private static Complex Demodulated(ReadOnlySpan<double> samples, double start, double width, double frequency)
    {
        int first = Math.Max(0, (int)Math.Ceiling(start)), end = Math.Min(samples.Length, (int)Math.Floor(start + width) + 1);
        // Far more samples than the frequency needs cost time and bring little.
        int every = Math.Max(1, (int)Math.Min((end - first) / MostSamples, 0.1 / frequency));
        // Both phases by rotation: a few dozen steps cost no more than a few roundings.
        Complex wave = Complex.Conjugate(Turned(frequency * first)), waveStep = Complex.Conjugate(Turned(frequency * every));
        Complex window = Turned((first - start) / width), windowStep = Turned(every / width), sum = 0, waves = 0;
        double weights = 0, mean = 0;
        for (int i = first; i < end; i += every)
        {
            double w = 0.5 - 0.5 * window.Real;
            Complex weighted = w * wave;
            weights += w;
            mean += w * samples[i];
            sum += weighted * samples[i];
            waves += weighted;
            wave *= waveStep;
            window *= windowStep;
        }
        // Less the window's own mean, which a level far from zero would otherwise leak.
        return 2 * (sum - mean / weights * waves) / weights;
    }
}
