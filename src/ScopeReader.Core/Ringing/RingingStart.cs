using System.Numerics;

namespace ScopeReader.Ringing;

/// <summary>Where a ringing fit starts from: the highest line of a short transform.</summary>
internal static class RingingStart
{
    private const int Cells = 1024;

    /// <summary>Frequency of the highest line, cycles per unit of time; null where the window is too short to have one.</summary>
    public static double? Frequency(RingingWindow window)
    {
        ReadOnlySpan<double> times = window.Times;
        if (times.Length < 12)
            return null;
        double span = times[^1] - times[0];
        int cells = Math.Min(Cells, (int)BitOperations.RoundUpToPowerOf2((uint)times.Length + 1) / 2);
        // Twice as long with zeros: lines come half a bin apart, close enough for the fit.
        var values = new Complex[2 * cells];
        double tail = 0;
        int late = times.Length * 3 / 4;
        for (int i = late; i < times.Length; i++)
            tail += window.Values[i] / (times.Length - late);
        var counts = new int[cells];
        for (int i = 0; i < times.Length; i++)
        {
            int c = Math.Min(cells - 1, (int)((times[i] - times[0]) / span * cells));
            values[c] += window.Values[i] - tail;
            counts[c]++;
        }
        for (int c = 0; c < cells; c++)
            values[c] = counts[c] > 0 ? values[c] / counts[c] : c > 0 ? values[c - 1] : 0;
        FftSharp.FFT.Forward(values);
        int best = 0;
        // Below half a cycle in the window is the level's own lobe; the last lines may be folded.
        for (int k = 2; k < cells * 7 / 8; k++)
            if (best == 0 || values[k].Magnitude > values[best].Magnitude)
                best = k;
        return best == 0 ? null : best / (2 * span);
    }
}
