using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>Power in a channel from the levels of a trace.</summary>
public static class ChannelPower
{
    /// <summary>P = 10 log[(Δf/B_n) Σ 10^(P_i/10)].</summary>
    /// <param name="levels">Shape [n]: levels of the points in the channel, dB to any reference.</param>
    /// <param name="spacing">Δf, from point to point, Hz: at most the resolution bandwidth.</param>
    /// <param name="noiseBandwidth">B_n of the resolution filter, Hz.</param>
    /// <returns>dB to the same reference.</returns>
    public static double Decibel(ReadOnlySpan<double> levels, double spacing, double noiseBandwidth)
    {
        double sum = 0;
        foreach (double level in levels)
            sum += Decibels.PowerRatio(level);
        return Decibels.OfPowers(sum * spacing / noiseBandwidth);
    }
}
