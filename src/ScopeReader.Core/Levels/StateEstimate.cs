using ScopeReader.Readings;

namespace ScopeReader.Levels;

/// <summary>One state's level and what is uncertain about it, before the chain.</summary>
/// <param name="Level">In the samples' unit.</param>
/// <param name="Terms">Noise, quantisation, and the drift of the level along the plateau where there is any.</param>
/// <param name="Noise">Rms distance of the samples from the level.</param>
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
    public static StateEstimate Average(ReadOnlySpan<double> samples, IReadOnlyList<Plateau> plateaus, double step)
    {
        double shift = samples[plateaus[0].First], sum = 0;
        int count = 0;
        foreach (Plateau plateau in plateaus)
        {
            foreach (double value in samples[plateau.First..plateau.End])
                sum += value - shift;
            count += plateau.Count;
        }
        double level = shift + sum / count;

        double squares = 0, betweenSquares = 0, early = 0, late = 0;
        int earlyCount = 0, lateCount = 0;
        foreach (Plateau plateau in plateaus)
        {
            double own = 0;
            int half = plateau.First + plateau.Count / 2;
            for (int i = plateau.First; i < plateau.End; i++)
            {
                double distance = samples[i] - level;
                squares += distance * distance;
                own += distance;
                if (plateau.Count < 2)
                    continue;
                if (i < half)
                    (early, earlyCount) = (early + distance, earlyCount + 1);
                else
                    (late, lateCount) = (late + distance, lateCount + 1);
            }
            betweenSquares += own * own / plateau.Count;
        }
        double noise = count > 1 ? Math.Sqrt(squares / (count - 1)) : 0;
        bool typeA = plateaus.Count >= FewestPlateaus;
        double scatter = typeA ? Math.Sqrt(betweenSquares / (plateaus.Count - 1)) : noise * Math.Sqrt(CorrelationLength(samples, plateaus, level, squares));
        var terms = new List<BudgetTerm> { BudgetTerm.Normal("noise", scatter / Math.Sqrt(count), degreesOfFreedom: typeA ? plateaus.Count - 1 : null) };
        if (Quantisation(noise, step) is > 0 and var bound)
            terms.Add(BudgetTerm.Rectangular("quantisation", bound));
        if (earlyCount > 0 && lateCount > 0)
        {
            double drift = Math.Abs(late / lateCount - early / earlyCount);
            if (drift > SignificantDrift * scatter * Math.Sqrt(1.0 / earlyCount + 1.0 / lateCount) + Quantisation(noise, step))
                terms.Add(BudgetTerm.Rectangular("settling", drift));
        }
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

    // 1 + 2 Σ ρ_k, up to the first lag that is as good as uncorrelated.
    private static double CorrelationLength(ReadOnlySpan<double> samples, IReadOnlyList<Plateau> plateaus, double level, double squares)
    {
        double length = 1;
        if (!(squares > 0))
            return length;
        for (int lag = 1; lag <= MostLags; lag++)
        {
            double products = 0;
            long pairs = 0, all = 0;
            foreach (Plateau plateau in plateaus)
            {
                all += plateau.Count;
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
