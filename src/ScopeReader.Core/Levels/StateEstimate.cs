using ScopeReader.Readings;

namespace ScopeReader.Levels;

/// <summary>One state's level and what is uncertain about it, before the chain.</summary>
/// <param name="Level">In the samples' unit.</param>
/// <param name="Terms">Noise, quantisation, and the drift of the level along the plateau where there is any.</param>
/// <param name="Noise">Rms noise of one sample.</param>
/// <param name="Count">Samples that it rests on.</param>
internal sealed record StateEstimate(double Level, IReadOnlyList<BudgetTerm> Terms, double Noise, int Count)
{
    // Fewer plateaus say less about their scatter than the samples on them do.
    private const int FewestPlateaus = 10, MostLags = 50;
    private const double SignificantDrift = 3, LeastCorrelation = 0.05;

    /// <summary>Combined standard uncertainty.</summary>
    public double Uncertainty => new Budget(Terms).StandardUncertainty;

    /// <summary>Averages the samples of one state.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="plateaus">That state's plateaus, one or more.</param>
    /// <param name="step">Quantisation step, 0 for none.</param>
    /// <param name="swing">Rough distance of the two states, for what slow edges leave on their plateaus.</param>
    public static StateEstimate Average(ReadOnlySpan<double> samples, IReadOnlyList<Plateau> plateaus, double step, double swing)
    {
        double shift = samples[plateaus[0].First], sum = 0, squares = 0, between = 0;
        int count = 0;
        foreach (Plateau plateau in plateaus)
        {
            foreach (double value in samples[plateau.First..plateau.End])
                sum += value - shift;
            count += plateau.Count;
        }
        double level = shift + sum / count;
        foreach (Plateau plateau in plateaus)
        {
            double own = 0;
            foreach (double value in samples[plateau.First..plateau.End])
            {
                squares += (value - level) * (value - level);
                own += value - level;
            }
            between += own * own / plateau.Count;
        }

        double noise = FromNeighbours(samples, plateaus) ?? Math.Sqrt(squares / Math.Max(1, count - 1)), bound = Quantisation(noise, step);
        bool typeA = plateaus.Count >= FewestPlateaus;
        double uncertainty, drift = 0;
        if (AlignedAverage(samples, plateaus) is { } average && PlateauRinging.Settled(average) is { } settled)
        {
            // A few plateaus show their noise best as what the fit leaves; many show noise that is slower than a plateau too.
            noise = typeA ? noise : settled.Noise * Math.Sqrt(plateaus.Count);
            double scatter = typeA ? Math.Sqrt(between / (plateaus.Count - 1)) : noise;
            (level, uncertainty) = (settled.Level, scatter / Math.Sqrt(plateaus.Count) * settled.Factor);
        }
        else
        {
            double scatter = typeA ? Math.Sqrt(between / (plateaus.Count - 1)) : noise * Math.Sqrt(CorrelationLength(samples, plateaus, level, squares));
            uncertainty = scatter / Math.Sqrt(count);
            drift = Drift(samples, plateaus, scatter, bound);
        }

        var terms = new List<BudgetTerm> { BudgetTerm.Normal("noise", uncertainty, degreesOfFreedom: typeA ? plateaus.Count - 1 : null) };
        if (bound > 1e-3 * uncertainty)
            terms.Add(BudgetTerm.Rectangular("quantisation", bound));
        double unsettled = drift + swing * plateaus.Max(p => p.Unsettled);
        if (unsettled > 0)
            terms.Add(BudgetTerm.Rectangular("settling", unsettled));
        return new StateEstimate(level, terms, noise, count);
    }

    /// <summary>Bound of what a converter's steps leave in a mean.</summary>
    /// <param name="noise">Rms noise as seen after the converter.</param>
    /// <param name="step">Quantisation step.</param>
    /// <remarks>
    /// Half a step without noise. Gaussian noise σ dithers it to (q/π) e^(−2π²σ²/q²); σ² is what was seen less q²/12.
    /// Seen noise under 0.42 q can be a level that happens to lie between two codes, and then nothing is known of σ.
    /// </remarks>
    internal static double Quantisation(double noise, double step)
    {
        if (!(step > 0))
            return 0;
        double ratio = noise / step;
        return ratio < 0.42 ? step / 2 : step / Math.PI * Math.Exp(-2 * Math.PI * Math.PI * (ratio * ratio - 1.0 / 12));
    }

    // Samples at one place of two plateaus differ by noise, whatever the plateaus' shape: √2 sigma.
    private static double? FromNeighbours(ReadOnlySpan<double> samples, IReadOnlyList<Plateau> plateaus)
    {
        double squares = 0;
        int count = 0;
        for (int p = 1; p < plateaus.Count; p++)
        {
            Plateau before = plateaus[p - 1], after = plateaus[p];
            int first = Math.Max(before.First - before.Edge, after.First - after.Edge), end = Math.Min(before.End - before.Edge, after.End - after.Edge);
            for (int i = first; i < end; i++)
            {
                double difference = samples[after.Edge + i] - samples[before.Edge + i];
                squares += difference * difference;
                count++;
            }
        }
        return count >= 8 ? Math.Sqrt(squares / (2 * count)) : null;
    }

    // The plateaus laid over each other by their edges; null where they are too unlike in length.
    private static double[]? AlignedAverage(ReadOnlySpan<double> samples, IReadOnlyList<Plateau> plateaus)
    {
        int first = plateaus.Max(p => p.Settling - p.Edge), end = plateaus.Min(p => p.End - p.Edge);
        if (end - first < plateaus.Average(p => p.End - p.Settling) / 2)
            return null;
        var average = new double[end - first];
        foreach (Plateau plateau in plateaus)
            for (int i = 0; i < average.Length; i++)
                average[i] += samples[plateau.Edge + first + i];
        for (int i = 0; i < average.Length; i++)
            average[i] /= plateaus.Count;
        return average;
    }

    // How far the later half of the plateaus lies from the earlier one, where that is more than noise.
    private static double Drift(ReadOnlySpan<double> samples, IReadOnlyList<Plateau> plateaus, double scatter, double bound)
    {
        double early = 0, late = 0, origin = samples[plateaus[0].First];
        int earlyCount = 0, lateCount = 0;
        foreach (Plateau plateau in plateaus.Where(p => p.Count >= 2))
        {
            int half = plateau.First + plateau.Count / 2;
            foreach (double value in samples[plateau.First..half])
                early += value - origin;
            foreach (double value in samples[half..plateau.End])
                late += value - origin;
            earlyCount += half - plateau.First;
            lateCount += plateau.End - half;
        }
        if (earlyCount == 0)
            return 0;
        double drift = Math.Abs(late / lateCount - early / earlyCount);
        return drift > SignificantDrift * scatter * Math.Sqrt(1.0 / earlyCount + 1.0 / lateCount) + bound ? drift : 0;
    }

    // 1 + 2 Σ ρ_k, up to the first lag that is as good as uncorrelated.
    private static double CorrelationLength(ReadOnlySpan<double> samples, IReadOnlyList<Plateau> plateaus, double level, double squares)
    {
        double length = 1;
        if (!(squares > 0))
            return length;
        long all = plateaus.Sum(p => (long)p.Count);
        for (int lag = 1; lag <= MostLags; lag++)
        {
            double products = 0;
            long pairs = 0;
            foreach (Plateau plateau in plateaus)
            {
                for (int i = plateau.First + lag; i < plateau.End; i++)
                    products += (samples[i] - level) * (samples[i - lag] - level);
                pairs += Math.Max(0, plateau.Count - lag);
            }
            if (pairs < all / 2)
                break;
            double correlation = products / pairs / (squares / all);
            if (correlation < LeastCorrelation)
                break;
            length += 2 * correlation;
        }
        return length;
    }
}
