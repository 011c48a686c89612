using System.Numerics;

namespace ScopeReader.Ringing;

/// <summary>An oscillation of its own.</summary>
/// <param name="Frequency">Cycles per sample.</param>
/// <param name="FrequencyUncertainty">Standard uncertainty of it.</param>
/// <param name="Low">Amplitude on the low level, in the channel's unit.</param>
/// <param name="High">Amplitude on the high level.</param>
/// <param name="AmplitudeUncertainty">Standard uncertainty of either.</param>
/// <param name="Span">From the first window to the last, samples.</param>
internal sealed record FoundTone(double Frequency, double FrequencyUncertainty, double Low, double High, double AmplitudeUncertainty, double Span)
{
    // An amplitude under this share of the other level's is not there.
    private const double Absent = 0.35;

    /// <summary>True where it starts anew on each level, so that its phase is not the same sine's throughout.</summary>
    public bool Restarts { get; init; }

    /// <summary>True where every edge finds it in the same phase.</summary>
    public bool IsInStep { get; init; }

    /// <summary>Where it lives: high, low or both.</summary>
    public string Level => Low < Absent * High ? "high" : High < Absent * Low ? "low" : "both";

    /// <summary>Rms where it lives.</summary>
    public double Rms => Level switch { "high" => High, "low" => Low, _ => Math.Sqrt((High * High + Low * Low) / 2) } / Math.Sqrt(2);

    /// <summary>Standard uncertainty of <see cref="Rms"/>.</summary>
    public double RmsUncertainty => AmplitudeUncertainty / (Level == "both" ? 2 : Math.Sqrt(2));

    /// <summary>Of a sine that goes on through the edges.</summary>
    /// <param name="windows">Where it was found.</param>
    /// <param name="tone">The sine.</param>
    /// <param name="scatter">Variance of a window about it.</param>
    public static FoundTone Of(BandWindows windows, SteadyTone tone, double scatter)
    {
        double mean = 0, first = double.PositiveInfinity, last = double.NegativeInfinity, weights = 0, squares = 0;
        for (int i = 0; i < windows.Count; i++)
        {
            double t = windows.Centre(i);
            (mean, first, last) = (mean + t / windows.Count, Math.Min(first, t), Math.Max(last, t));
        }
        for (int i = 0; i < windows.Count; i++)
        {
            double d = windows.Centre(i) - mean, a = windows.IsHigh(i) ? tone.High.Magnitude : tone.Low.Magnitude;
            (weights, squares) = (weights + a * a, squares + a * a * d * d);
        }
        // Phase noise of a window is half of its scatter over the amplitude squared; a straight line through the phases.
        double noise = scatter / 2 * BandWindows.Overlap, half = windows.Count / 2.0;
        return new FoundTone(tone.Frequency, squares > 0 ? Math.Sqrt(noise / squares) / (2 * Math.PI) : 0, tone.Low.Magnitude, tone.High.Magnitude, Math.Sqrt(noise / half), last - first);
    }

    /// <summary>Of a sine that starts anew on each level: amplitudes from the power within the levels.</summary>
    /// <param name="windows">Where it was found.</param>
    /// <param name="frequency">Its frequency, cycles per sample.</param>
    /// <param name="values">What is in the windows.</param>
    public static FoundTone Anew(BandWindows windows, double frequency, Complex[] values)
    {
        double[] power = new double[2], squares = new double[2];
        int[] count = new int[2];
        for (int i = 0; i < windows.Count; i++)
        {
            int level = windows.IsHigh(i) ? 1 : 0;
            double p = values[i].Real * values[i].Real + values[i].Imaginary * values[i].Imaginary;
            (power[level], squares[level], count[level]) = (power[level] + p, squares[level] + p * p, count[level] + 1);
        }
        double Amplitude(int level) => count[level] > 0 ? Math.Sqrt(power[level] / count[level]) : 0;
        double u = Math.Max(Amplitude(0), Amplitude(1)) / Math.Sqrt(Math.Max(1, windows.Count / 2.0));
        return new FoundTone(frequency, 0.5 / (windows.Width * Math.Sqrt(windows.Count)), Amplitude(0), Amplitude(1), u, 0) { Restarts = true };
    }

    /// <summary>Of a sine that every edge finds in the same phase: its frequency from the later half of the levels, where ringing has died away.</summary>
    /// <param name="samples">The record.</param>
    /// <param name="spans">Its levels.</param>
    /// <param name="frequency">About its frequency, cycles per sample.</param>
    /// <param name="width">Length of a window, samples.</param>
    /// <param name="scatter">Variance of a window about what the edges have in common.</param>
    public static FoundTone OfLate(ReadOnlySpan<double> samples, IReadOnlyList<LevelSpan> spans, double frequency, double width, double scatter)
    {
        LevelSpan[] late = [.. spans.Select(s => s with { From = s.From + s.Length / 2, Length = s.Length / 2 })];
        var windows = new BandWindows(samples, late, frequency, width);
        SteadyTone tone = SteadyTone.Of(windows, windows.Values);
        windows = new BandWindows(samples, late, tone.Frequency, width);
        return Of(windows, SteadyTone.Of(windows, windows.Values), scatter) with { IsInStep = true, Low = 0, High = 0 };
    }

    /// <summary>With an amplitude on one level that was found there.</summary>
    public FoundTone With(bool high, double amplitude) => high ? this with { High = Math.Max(High, amplitude) } : this with { Low = Math.Max(Low, amplitude) };
}
