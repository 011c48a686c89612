using ScopeReader.Numerics;

namespace ScopeReader.Frequency;

/// <summary>Asks whether a record is one steady wave, by fitting its template to parts of it.</summary>
/// <remarks>
/// Of a steady wave the parts' phases lie on a line and their gains are equal, but for noise. Whatever is faster than the
/// parts stands in the residual's spectrum as a line that is no harmonic.
/// </remarks>
internal sealed class SteadinessCheck
{
    private const int FewestParts = 5, SpoiltShare = 20;
    private const double Significant = 5;

    // Below these nothing is said: a table's own error, and gains that a bench source's level control leaves.
    private const double LeastPhase = 2e-5, LeastGain = 0.01, LeastTone = 0.01, AbsentGain = 0.1, MostlyDrift = 0.8, MirrorRatio = 1.4, GainPerPhase = 4;

    // Parts whose phases jump by more have lost the wave.
    private const double LostPhase = 0.2, MostLost = 0.1, WidestFrequency = 0.05, LargestTone = 1.5;

    private readonly PartFit[] _parts;
    private readonly double[] _phases;
    private readonly double _frequency, _noise, _timing;

    private SteadinessCheck(PartFit[] parts, double[] phases, double frequency, double noise, double timing) =>
        (_parts, _phases, _frequency, _noise, _timing) = (parts, phases, frequency, noise, timing);

    /// <summary>Looks at a record.</summary>
    /// <param name="fits">Its parts.</param>
    /// <param name="count">Samples in it.</param>
    /// <param name="comb">Its lines, fitted at the frequency.</param>
    /// <param name="frequency">Cycles per sample.</param>
    /// <param name="crossings">What the edges gave; null where they gave nothing.</param>
    public static Steadiness Look(PartFit[] fits, int count, Comb comb, double frequency, CrossingFrequency? crossings)
    {
        Steadiness alone = SecondTone(comb);
        if (fits.Length < FewestParts)
            return alone.SecondToneRatio > 0 ? alone : new Steadiness(SteadinessKind.Untested);
        double strongest = fits.Select(f => f.Gain).DefaultIfEmpty(0).Max();
        // Where the wave is absent, noise has some phase too.
        PartFit[] present = [.. fits.Where(f => f.Gain > AbsentGain * strongest)];
        if (present.Length < FewestParts)
            return new Steadiness(SteadinessKind.Untested);
        double[] residuals = [.. present.Select(f => f.Residual)];
        Array.Sort(residuals);
        double allowance = 0, timing = 0;
        if (crossings is not null)
        {
            // What sampling does to an instant averages over the edges of a part, unless they all lie at one place between samples.
            double edges = Math.Max(1, 2 * frequency * count / fits.Length), bound = crossings.InterpolationBound * frequency;
            allowance = crossings.CommensurateMultiple > 0 ? bound : bound / Math.Sqrt(edges);
            // Jitter from edge to edge is no unsteadiness of the parts.
            timing = crossings.Grid.TimingSpread * frequency / Math.Sqrt(edges);
        }
        var check = new SteadinessCheck(present, Unwrapped(present), frequency, residuals[residuals.Length / 2], timing);
        return check.Judge(alone with { Absent = 1 - (double)present.Length / fits.Length }, allowance);
    }

    private static Steadiness SecondTone(Comb comb)
    {
        int order = 1;
        for (int k = 2; k <= comb.Model.Harmonics; k++)
            order = comb.Amplitude(k) > comb.Amplitude(order) ? k : order;
        double strongest = comb.Amplitude(order);
        double last = 0;
        for (int k = Math.Max(1, comb.Model.Harmonics - 4); k <= comb.Model.Harmonics; k++)
            last = Math.Max(last, comb.Amplitude(k));
        (double frequency, double amplitude) = comb.Noise.StrongestLine(2 * last);
        if (amplitude < LeastTone * strongest)
            return new Steadiness(SteadinessKind.Steady);
        double mirrored = comb.Noise.AmplitudeAt(Math.Abs(2 * order * comb.Model.Frequency - frequency));
        bool isSideband = mirrored > amplitude / MirrorRatio;
        return new Steadiness(isSideband ? SteadinessKind.Modulated : SteadinessKind.SecondTone)
        {
            SecondTone = frequency,
            SecondToneRatio = (isSideband ? amplitude + mirrored : amplitude) / strongest,
            Modulation = isSideband ? Math.Abs(order * comb.Model.Frequency - frequency) : 0,
        };
    }

    private static double[] Unwrapped(PartFit[] parts)
    {
        var phases = new double[parts.Length];
        for (int i = 0; i < parts.Length; i++)
        {
            phases[i] = parts[i].Phase;
            if (i > 0)
                phases[i] += Math.Round(phases[i - 1] - phases[i]);
        }
        return phases;
    }

    private Steadiness Judge(Steadiness alone, double allowance)
    {
        (double gains, double range) = Gains();
        (double[] straight, double phases) = Distances(1);
        double excursion = straight.Max(Math.Abs);
        bool moves = phases > Limit(2) && excursion > Math.Max(LeastPhase, allowance) && Spread(straight) > allowance;
        bool breathes = gains > Limit(1) && range > LeastGain + GainPerPhase * allowance;
        int lost = 0;
        for (int i = 1; i < _phases.Length; i++)
            lost += Math.Abs(_phases[i] - _phases[i - 1]) > LostPhase ? 1 : 0;
        Steadiness found = alone with
        {
            Curvature = Curvature(),
            PhaseExcursion = moves ? excursion : 0,
            FrequencyExcursion = moves ? Deviation(straight) : 0,
            AmplitudeRange = breathes ? range : 0,
        };
        if ((moves && (lost > MostLost * _parts.Length || found.FrequencyExcursion > WidestFrequency)) || alone.SecondToneRatio > LargestTone)
            return found with { Kind = SteadinessKind.NotPeriodic };
        if (found.Absent > 0)
            return found with { Kind = SteadinessKind.Interrupted };
        if (moves && Spread(Distances(2).Distances) < Math.Sqrt(1 - MostlyDrift) * Spread(straight))
            return found with { Kind = SteadinessKind.Drifting, Drift = Sweep(straight) };
        if (!moves && !breathes)
            return found;
        // A second tone that the parts can follow makes the wave breathe by twice its ratio, and turns it by its ratio.
        if (alone.Kind == SteadinessKind.SecondTone && range < 2.5 * alone.SecondToneRatio && 2 * Math.PI * excursion < 1.5 * alone.SecondToneRatio)
            return found with { PhaseExcursion = 0, FrequencyExcursion = 0 };
        return found with { Kind = found.AmplitudeRange > 2 * Math.PI * found.PhaseExcursion ? SteadinessKind.AmplitudeModulated : SteadinessKind.PhaseModulated };
    }

    // A mean of squares in units of what noise makes it, for that many unknowns less than parts.
    private double Limit(int unknowns) => 1 + Significant * Math.Sqrt(2.0 / (_parts.Length - unknowns));

    private (double Squares, double Range) Gains()
    {
        double weights = 0, mean = 0, squares = 0;
        foreach (PartFit part in _parts)
            (weights, mean) = (weights + 1 / (part.GainFactor * part.GainFactor), mean + part.Gain / (part.GainFactor * part.GainFactor));
        mean /= weights;
        // A spike spoils one part, and is none of this.
        PartFit[] usual = [.. _parts.OrderBy(p => Math.Abs(p.Gain - mean) / p.GainFactor).Take(_parts.Length - _parts.Length / SpoiltShare)];
        foreach (PartFit part in usual)
            squares += (part.Gain - mean) * (part.Gain - mean) / (part.GainFactor * part.GainFactor);
        return (squares / (_noise * _noise * (usual.Length - 1)), (usual.Max(p => p.Gain) - usual.Min(p => p.Gain)) / mean);
    }

    // Distances of the phases from a polynomial, and their mean square in units of what noise makes it.
    private (double[] Distances, double Squares) Distances(int degree)
    {
        double reach = _parts.Max(p => Math.Abs(p.Instant));
        var equations = new NormalEquations(degree + 1);
        for (int i = 0; i < _parts.Length; i++)
            equations.Add(Row(_parts[i].Instant / reach, degree), _phases[i], Weight(_parts[i]));
        var distances = new double[_parts.Length];
        double squares = 0;
        if (equations.Factor() is { } factor)
        {
            double[] fitted = equations.Solve(factor);
            for (int i = 0; i < _parts.Length; i++)
            {
                double[] row = Row(_parts[i].Instant / reach, degree);
                distances[i] = _phases[i];
                for (int k = 0; k <= degree; k++)
                    distances[i] -= fitted[k] * row[k];
                squares += distances[i] * distances[i] * Weight(_parts[i]);
            }
        }
        return (distances, squares / (_parts.Length - degree - 1));
    }

    // The parts' own scatter is the uncertainty, whatever it comes from.
    private (double Rate, double Uncertainty, int DegreesOfFreedom)? Curvature()
    {
        double reach = _parts.Max(p => Math.Abs(p.Instant)), squares = 0;
        int freedom = _parts.Length - 3;
        var equations = new NormalEquations(3);
        for (int i = 0; i < _parts.Length; i++)
            equations.Add(Row(_parts[i].Instant / reach, 2), _phases[i], Certainty(_parts[i]));
        if (freedom < FewestParts || equations.Factor() is not { } factor)
            return null;
        double[] fitted = equations.Solve(factor);
        for (int i = 0; i < _parts.Length; i++)
        {
            double[] row = Row(_parts[i].Instant / reach, 2);
            double distance = _phases[i] - fitted[0] - fitted[1] * row[1] - fitted[2] * row[2];
            squares += distance * distance * Certainty(_parts[i]);
        }
        // Phase a + bx + cx², x = t/reach: the frequency changes by 2c/reach² a sample.
        double perRate = 2 / (reach * reach * _frequency);
        return (perRate * fitted[2], perRate * Math.Sqrt(squares / freedom * equations.Covariances(factor, 2)[2]), freedom);
    }

    private static double Certainty(PartFit part) => part.Gain * part.Gain / (part.PhaseFactor * part.PhaseFactor);

    private static double[] Row(double x, int degree) => degree == 1 ? [1, x] : [1, x, x * x];

    private double Weight(PartFit part)
    {
        double noise = _noise * part.PhaseFactor / part.Gain;
        return 1 / (noise * noise + _timing * _timing + LeastPhase * LeastPhase / 9);
    }

    private double Spread(double[] distances)
    {
        double squares = 0, weights = 0;
        for (int i = 0; i < distances.Length; i++)
            (squares, weights) = (squares + Weight(_parts[i]) * distances[i] * distances[i], weights + Weight(_parts[i]));
        return Math.Sqrt(squares / weights);
    }

    // Largest slope of the phase over an eighth of the record, of the frequency.
    private double Deviation(double[] distances)
    {
        int apart = Math.Max(1, _parts.Length / 8);
        double largest = 0;
        for (int i = apart; i < _parts.Length; i++)
            largest = Math.Max(largest, Math.Abs(distances[i] - distances[i - apart]) / (_parts[i].Instant - _parts[i - apart].Instant));
        return largest / _frequency;
    }

    // Of a parabola the slope at one end less that at the other: twice the largest, which is read an eighth of the record short of the end.
    private double Sweep(double[] distances)
    {
        double bend = distances[^1] + distances[0] - 2 * distances[distances.Length / 2];
        return Math.Sign(bend) * 2 * Deviation(distances) * 8 / 7;
    }
}
