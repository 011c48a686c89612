using ScopeReader.Levels;
using ScopeReader.Readings;

namespace ScopeReader.Signals;

/// <summary>What the coefficients of a period say, by quantity identifier.</summary>
internal static class HarmonicTruth
{
    /// <summary>Below this a harmonic counts as absent: it is rounding.</summary>
    private const double AbsentDbc = -200;

    /// <summary>Frequency, levels over whole periods, harmonics in dBc (those that exist) and distortion.</summary>
    public static Dictionary<string, double> Of(PeriodicSignal signal, LevelSettings settings)
    {
        FourierSeries series = signal.Series;
        double fundamental = series.Amplitude(1), worst = double.NegativeInfinity, sum = 0;
        var truth = new Dictionary<string, double>
        {
            ["frequency"] = signal.Frequency,
            ["period"] = 1 / signal.Frequency,
            ["mean"] = series.Mean,
            ["rms"] = series.Rms,
            ["peak-to-peak"] = Peak(signal.Table, 1) + Peak(signal.Table, -1),
            ["fundamental-level"] = 20 * Math.Log10(fundamental / Math.Sqrt(2)),
        };
        for (int k = 2; k <= settings.Harmonics; k++)
        {
            double ratio = series.Amplitude(k) / fundamental, dbc = 20 * Math.Log10(ratio);
            sum += ratio * ratio;
            if (dbc < AbsentDbc)
                continue;
            truth[Quantities.Harmonic(k).Id] = dbc;
            worst = Math.Max(worst, dbc);
        }
        if (double.IsFinite(worst))
            truth["worst-harmonic"] = worst;
        truth["thd"] = 100 * Math.Sqrt(sum);
        truth["thd-r"] = 100 * Math.Sqrt(sum / (1 + sum));
        return truth;
    }

    // The top of a parabola through the highest point and its neighbours.
    private static double Peak(ReadOnlySpan<double> table, int sign)
    {
        int n = table.Length, best = 0;
        for (int i = 1; i < n; i++)
            if (sign * table[i] > sign * table[best])
                best = i;
        return Parabola.Top(sign * table[(best + n - 1) % n], sign * table[best], sign * table[(best + 1) % n]);
    }
}
