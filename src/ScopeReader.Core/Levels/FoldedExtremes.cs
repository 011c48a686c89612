using ScopeReader.Numerics;

namespace ScopeReader.Levels;

/// <summary>Highest and lowest value of a periodic wave, read off all periods laid over each other.</summary>
/// <remarks>
/// Averages over bins of the period show where the extreme is; a polynomial of degree 4 through the samples about it
/// gives its height, or their mean where the top is flat.
/// </remarks>
internal static class FoldedExtremes
{
    private const int MostSamples = 400_000, FewestPeriods = 4, SamplesPerBin = 12, FewestBins = 8, MostBins = 2048, Halvings = 4;

    // The window reaches down to this share of peak-to-peak below the extreme; the polynomial follows a sine or a ringing so far.
    private const double Depth = 0.04, WidestShare = 0.1, Agreement = 2, Rise = 1.5, Grid = 0.01;

    // Noise of a twelfth of the swing stays below this; steep edges in wide bins do not, and no extreme is read off them.
    private const double StrayShare = 0.5;

    /// <summary>An extreme, its standard uncertainty from noise, and a bound of what the polynomial misses.</summary>
    public readonly record struct Extreme(double Value, double Uncertainty, double Bound);

    /// <summary>Both extremes and over how many periods; null where there are fewer than four periods.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="period">The period, samples.</param>
    public static (Extreme Highest, Extreme Lowest, int Periods)? Find(ReadOnlySpan<double> samples, double period)
    {
        int periods = (int)Math.Min(Math.Floor(samples.Length / period), Math.Max(FewestPeriods, Math.Floor(MostSamples / period)));
        if (periods < FewestPeriods)
            return null;
        ReadOnlySpan<double> used = samples[..(int)Math.Min(samples.Length, Math.Ceiling(periods * period))];
        int bins = Math.Clamp(used.Length / SamplesPerBin, FewestBins, MostBins);
        double[] sums = Averages(used, period, bins);
        double swing = sums.Where(double.IsFinite).Max() - sums.Where(double.IsFinite).Min();
        if (WithoutStrays(used, period, sums, StrayShare * swing) is { } rest)
        {
            used = rest;
            sums = Averages(used, period, bins);
        }
        double highest = sums.Where(double.IsFinite).Max(), lowest = sums.Where(double.IsFinite).Min();
        return (Top(used, period, sums, highest, highest - lowest, 1), Top(used, period, sums, -lowest, highest - lowest, -1), periods);
    }

    private static double[] Averages(ReadOnlySpan<double> samples, double period, int bins)
    {
        double[] sums = new double[bins], counts = new double[bins];
        for (int i = 0; i < samples.Length; i++)
        {
            int bin = (int)(Phase(i, period) * bins);
            sums[bin] += samples[i];
            counts[bin]++;
        }
        for (int b = 0; b < bins; b++)
            // A period that is nearly a whole number of samples leaves bins empty.
            sums[b] = counts[b] > 0 ? sums[b] / counts[b] : double.NaN;
        return sums;
    }

    // A copy in which samples far from their place in the period have its value; null where there are none. The middle one of
    // three neighbouring averages: a stray can have spoilt one of them.
    private static double[]? WithoutStrays(ReadOnlySpan<double> samples, double period, double[] averages, double limit)
    {
        int bins = averages.Length;
        var usual = new double[bins];
        int[] filled = [.. Enumerable.Range(0, bins).Where(b => double.IsFinite(averages[b]))];
        for (int f = 0; f < filled.Length; f++)
        {
            double before = averages[filled[(f + filled.Length - 1) % filled.Length]], own = averages[filled[f]], after = averages[filled[(f + 1) % filled.Length]];
            usual[filled[f]] = Math.Max(Math.Min(before, own), Math.Min(Math.Max(before, own), after));
        }
        double[]? copy = null;
        for (int i = 0; i < samples.Length; i++)
        {
            double place = usual[(int)(Phase(i, period) * bins)];
            if (Math.Abs(samples[i] - place) > limit)
                (copy ??= samples.ToArray())[i] = place;
        }
        return copy;
    }

    private static double Phase(int i, double period)
    {
        double cycles = i / period;
        double phase = cycles - Math.Floor(cycles);
        return phase < 1 ? phase : 0;
    }

    private static Extreme Top(ReadOnlySpan<double> samples, double period, double[] averages, double top, double swing, int sign)
    {
        int bins = averages.Length, best = Array.FindIndex(averages, a => sign * a == top), widest = Math.Max(1, (int)(WidestShare * bins));
        int left = Reach(averages, best, -1, top - Depth * swing, sign, widest), right = Reach(averages, best, 1, top - Depth * swing, sign, widest);
        // The widest window whose curve agrees with that of half of it: wider ones reach into what a polynomial does not follow.
        double middle = (2 * best + right - left + 1) / 2.0 / bins, half = (left + right + 1) / 2.0 / bins;
        Extreme? wide = Fit(samples, period, middle, half, sign);
        for (int i = 0; i < Halvings; i++)
        {
            half /= 2;
            if (Fit(samples, period, middle, half, sign) is not { } narrow)
                break;
            double difference = wide is { } w ? Math.Abs(w.Value - narrow.Value) : double.PositiveInfinity;
            if (difference <= Agreement * narrow.Uncertainty)
                return wide!.Value with { Bound = 0 };
            wide = narrow with { Bound = double.IsFinite(difference) ? difference : 0 };
        }
        return wide ?? new Extreme(sign * top, swing / 100, swing / 50);
    }

    private static int Reach(double[] averages, int from, int direction, double level, int sign, int widest)
    {
        int bins = averages.Length, reach = 0;
        while (reach < widest && !(sign * averages[((from + direction * (reach + 1)) % bins + bins) % bins] < level))
            reach++;
        return Math.Max(1, reach);
    }

    private static Extreme? Fit(ReadOnlySpan<double> samples, double period, double centre, double half, int sign)
    {
        SummedPolynomial curve = new(4), flat = new(0);
        double shift = double.NaN;
        for (int i = 0; i < samples.Length; i++)
        {
            double x = Phase(i, period) - centre;
            x = (x - Math.Round(x)) / half;
            if (Math.Abs(x) > 1)
                continue;
            if (double.IsNaN(shift))
                shift = samples[i];
            curve.Add(x, sign * (samples[i] - shift));
            flat.Add(x, sign * (samples[i] - shift));
        }
        if (!curve.Solve() || !flat.Solve())
            return null;
        double top = -1;
        for (double x = -1; x <= 1; x += Grid)
            top = curve.At(x) > curve.At(top) ? x : top;
        // A top that rises over the mean by less than noise can make it, or lies at an end of the window, counts as flat; where
        // it is not plain which, a third of the difference is uncertain too.
        double rise = curve.At(top) - flat.At(0), u = curve.UncertaintyAt(top);
        (double value, double own) = Math.Abs(top) < 1 - Grid && rise > Rise * u ? (curve.At(top), u) : (flat.At(0), flat.UncertaintyAt(0));
        return new Extreme(shift + sign * value, rise < 2 * Rise * u ? double.Hypot(own, rise / 3) : own, 0);
    }
}
