using System.Numerics;
using ScopeReader.Numerics;

namespace ScopeReader.Ringing;

/// <summary>Finds one damped sinusoid without a start.</summary>
internal static class RingingSearch
{
    // Poles for one damped sinusoid and a level.
    private const int Poles = 3;

    /// <summary>The best of the fits from the highest line of a short transform, with three decays, and from the matrix pencil.</summary>
    /// <param name="window">The points.</param>
    /// <returns>Null where none of them holds.</returns>
    public static DampedSinusoidFit? One(RingingWindow window)
    {
        if (window.Times.Length < 3)
            return null;
        DampedSinusoidFit? best = null;
        double span = window.Times[^1] - window.Times[0];
        if (RingingStart.Frequency(window) is { } frequency)
            foreach (double decay in (ReadOnlySpan<double>)[2 / span, frequency, 8 / span])
                best = Better(best, window.Fit(frequency, decay));
        foreach ((double f, double a) in OfPencil(window, Poles))
            best = Better(best, window.Fit(f, a));
        return best;
    }

    /// <summary>Frequencies and decays of the matrix pencil's poles, levels and slopes left out.</summary>
    /// <param name="window">The points.</param>
    /// <param name="poles">How many poles.</param>
    public static IEnumerable<(double Frequency, double Decay)> OfPencil(RingingWindow window, int poles)
    {
        double[] values = window.Evenly(MatrixPencil.MostValues);
        if (values.Length < 3 * poles)
            yield break;
        double span = window.Times[^1] - window.Times[0], step = span / (values.Length - 1);
        foreach (Complex pole in MatrixPencil.Poles(values, poles))
        {
            double frequency = pole.Phase / (2 * Math.PI * step), decay = -Math.Log(pole.Magnitude) / step;
            if (frequency > 0.3 / span && frequency < 0.48 / step && decay > 0.1 / span && decay < 10 * frequency)
                yield return (frequency, decay);
        }
    }

    private static DampedSinusoidFit? Better(DampedSinusoidFit? one, DampedSinusoidFit? other) =>
        other is null || one?.ChiSquare <= other.ChiSquare ? one : other;
}
