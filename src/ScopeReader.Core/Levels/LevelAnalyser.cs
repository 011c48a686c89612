using ScopeReader.Readings;

namespace ScopeReader.Levels;

/// <summary>Mean, rms and peak-to-peak of the wave.</summary>
/// <remarks>
/// Mean and rms are over whole periods where there is a period, else over the record. The variance of the noise is taken
/// out of the rms: it is that of the wave. Largest and smallest value are those of the folded wave, since the extremes of a
/// noisy record lie outside those of the wave, and the further the longer it is.
/// </remarks>
public static class LevelAnalyser
{
    private const int FewestSamples = 4;

    /// <summary>Measures and writes down.</summary>
    /// <param name="job">The waveform and where readings go.</param>
    /// <param name="shape">What the first look gave.</param>
    /// <param name="noise">Rms noise of one sample.</param>
    /// <param name="period">The period, samples; null where there is none.</param>
    public static void Measure(WaveformJob job, WaveShape shape, double noise, double? period)
    {
        ArgumentNullException.ThrowIfNull(job);
        ArgumentNullException.ThrowIfNull(shape);
        ReadOnlySpan<double> samples = job.Waveform.Samples;
        if (shape.Kind == WaveKind.Flat || samples.Length < FewestSamples)
        {
            job.Sheet.Refuse("flat", samples.Length < FewestSamples
                ? "too few samples to tell the wave from its noise"
                : $"every sample is {Engineering.Format(shape.Minimum, job.Waveform.Unit)}: how fine the converter's steps are does not show, and so no uncertainty can be stated",
                Quantities.Mean, Quantities.Rms, Quantities.PeakToPeak);
            return;
        }
        if (period is { } p && p >= 2 && p <= samples.Length)
        {
            var (mean, square, periods) = WholePeriods.Average(job.Waveform.Memory, p, noise);
            // A wave that sweeps many codes dithers itself; one that rests on two does not.
            double bound = shape.Kind == WaveKind.TwoState ? StateEstimate.Quantisation(noise, shape.Step) : 0;
            // One period is cut where it ends, half a sample off at most.
            double cut = periods == 1 ? (shape.Maximum - shape.Minimum) / (4 * p) : 0;
            AddMeanAndRms(job, mean, square, noise, bound, cut, periods, periods == 1 ? "over one period" : $"over {periods} periods");
        }
        else if (shape.Kind is WaveKind.TwoState or WaveKind.Sinusoidal)
        {
            job.Sheet.Refuse("no-whole-period", "the record holds no whole period that was found, and over a part of one mean and rms depend on where it was cut; capture two periods or more",
                Quantities.Mean, Quantities.Rms);
        }
        else
        {
            AddOverRecord(job, shape, noise);
        }
        PeakToPeak(job, shape, noise, period);
    }

    private static void AddMeanAndRms(WaveformJob job, WholePeriods.Estimate mean, WholePeriods.Estimate square, double noise, double bound, double cut, int? count, string note)
    {
        double rms = Math.Sqrt(Math.Max(0, square.Value - noise * noise));
        job.Sheet.Add(new Reading(Quantities.Mean, mean.Value, job.Waveform.Unit, job.Chain.ForLevel(mean.Value, Terms(mean.Uncertainty, mean.DegreesOfFreedom, 1)), "average")
        {
            Count = count,
            Note = note,
        });
        // d(rms) = d(square)/(2 rms); an offset of the chain moves it by mean/rms of itself.
        double perSquare = rms > 0 ? 1 / (2 * rms) : 0;
        job.Sheet.Add(new Reading(Quantities.Rms, rms, job.Waveform.Unit, job.Chain.ForLevel(rms, Terms(square.Uncertainty * perSquare, square.DegreesOfFreedom, 1)), "average")
        {
            Count = count,
            Note = noise > 0 ? note + ", noise taken out" : note,
        });

        List<BudgetTerm> Terms(double uncertainty, double? freedom, double sensitivity)
        {
            var terms = new List<BudgetTerm> { BudgetTerm.Normal("noise", uncertainty, sensitivity, freedom) };
            if (bound > 0)
                terms.Add(BudgetTerm.Rectangular("quantisation", bound));
            if (cut > 0)
                terms.Add(BudgetTerm.Rectangular("ends", cut));
            return terms;
        }
    }

    private static void AddOverRecord(WaveformJob job, WaveShape shape, double noise)
    {
        ReadOnlySpan<double> samples = job.Waveform.Samples;
        double sum = 0, squares = 0, n = samples.Length;
        foreach (double value in samples)
            sum += value - samples[0];
        double mean = samples[0] + sum / n;
        foreach (double value in samples)
            squares += (value - mean) * (value - mean);
        double square = mean * mean + squares / n, u = noise / Math.Sqrt(n);
        AddMeanAndRms(job, new WholePeriods.Estimate(mean, u, null), new WholePeriods.Estimate(square, 2 * Math.Sqrt(square) * u, null),
            shape.Kind is WaveKind.TwoState or WaveKind.Sinusoidal ? noise : 0, shape.Kind == WaveKind.Sinusoidal ? 0 : shape.Step / 2, 0, null, "over the whole record: no period was found");
    }

    private static void PeakToPeak(WaveformJob job, WaveShape shape, double noise, double? period)
    {
        ReadOnlySpan<double> samples = job.Waveform.Samples;
        var terms = new List<BudgetTerm>();
        if (period is { } p && FoldedExtremes.Find(samples, p) is { } found)
        {
            terms.Add(BudgetTerm.Normal("noise", double.Hypot(found.Highest.Uncertainty, found.Lowest.Uncertainty)));
            foreach (double bound in (ReadOnlySpan<double>)[found.Highest.Bound, found.Lowest.Bound])
                if (bound > 0)
                    terms.Add(BudgetTerm.Rectangular("shape", bound));
            double quantisation = shape.Kind == WaveKind.Sinusoidal ? 0 : StateEstimate.Quantisation(noise, shape.Step);
            if (quantisation > 0)
                terms.AddRange([BudgetTerm.Rectangular("quantisation", quantisation), BudgetTerm.Rectangular("quantisation", quantisation)]);
            double value = found.Highest.Value - found.Lowest.Value;
            job.Sheet.Add(new Reading(Quantities.PeakToPeak, value, job.Waveform.Unit, job.Chain.ForLevelDifference(value, terms), "folded")
            {
                Count = found.Periods,
                Note = "of the wave folded on its period",
            });
            // The parts of an unsteady wave differ from their average, and none of that is a spike.
            if (job.Fitness.IsSteady)
                Strays.Look(job, shape, noise, found.Highest.Value, found.Lowest.Value);
            return;
        }
        // Without a period the extremes are single samples, each as uncertain as a sample.
        double raw = shape.Maximum - shape.Minimum;
        if (noise > 0)
            terms.Add(BudgetTerm.Normal("noise", noise * Math.Sqrt(2)));
        if (shape.Step > 0)
            terms.AddRange([BudgetTerm.Rectangular("quantisation", shape.Step / 2), BudgetTerm.Rectangular("quantisation", shape.Step / 2)]);
        job.Sheet.Add(new Reading(Quantities.PeakToPeak, raw, job.Waveform.Unit, job.Chain.ForLevelDifference(raw, terms), "extremes")
        {
            Note = "largest less smallest sample: noise is in it",
        });
    }
}
