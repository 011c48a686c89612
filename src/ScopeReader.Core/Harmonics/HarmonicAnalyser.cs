using System.Globalization;
using ScopeReader.Frequency;
using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>Fundamental and harmonics of a waveform: levels, the worst of them, distortion, noise and what else stands in the spectrum.</summary>
/// <remarks>
/// <para>Level: 20 log10(A_k/A_1), amplitudes by a joint fit (see <see cref="HarmonicLevels"/>). THD_F = √(Σ A_k²)/A_1 and
/// THD_R = THD_F/√(1 + THD_F²), over the harmonics of the plan.</para>
/// <para>A harmonic under five standard uncertainties is not given a level but a bound: noise alone shows a tenth of that as often
/// as not, and a number picked because noise had lifted it would not hold what its interval says.</para>
/// </remarks>
public static class HarmonicAnalyser
{
    /// <summary>The method's name in readings.</summary>
    public const string Method = "harmonic-fit";

    private const double FewestCycles = 3;
    private const int FewestSamplesAnUnknown = 4;

    /// <summary>Measures the harmonics and writes them down, or why not.</summary>
    /// <param name="job">The waveform, the plan and where readings go.</param>
    /// <param name="frequency">The primary frequency; null where there is none.</param>
    public static void Measure(WaveformJob job, FrequencyEstimate? frequency)
    {
        ArgumentNullException.ThrowIfNull(job);
        int wanted = Math.Clamp(job.Plan.Levels.Harmonics, 2, Quantities.HighestHarmonic), count = job.Waveform.Count;
        if (frequency is null)
        {
            RefuseAll(job, wanted, "no-frequency", "harmonics are counted from the frequency of the wave, and it has none");
            return;
        }
        if (job.Fitness.IsClipped)
        {
            RefuseAll(job, wanted, "clipped", "the wave is cut off, which makes harmonics of its own and takes from the fundamental; use a larger vertical range");
            return;
        }
        if (Smear.Refusal(job.Fitness) is { } unsteady)
        {
            RefuseAll(job, wanted, "unsteady", unsteady);
            return;
        }
        double f = frequency.CyclesPerSample, cycles = f * count;
        if (cycles < FewestCycles)
        {
            RefuseAll(job, wanted, "too-few-cycles", Text($"the record holds {cycles:F1} cycles, and harmonics need {FewestCycles}; capture more cycles"));
            return;
        }
        int seen = Math.Min(wanted, HarmonicLevels.InBand(f, count));
        if (seen < 1 || count < FewestSamplesAnUnknown * 2 * seen)
        {
            RefuseAll(job, wanted, "too-few-samples", Text($"{count} samples are too few for a fit of {seen} harmonics; sample faster or longer"));
            return;
        }
        // Those above half of the sample rate are fitted too, where they fold to a place of their own.
        int fitted = seen;
        while (fitted < wanted && count >= FewestSamplesAnUnknown * 2 * (fitted + 1) && Folding.Collision(f, count, fitted + 1, fitted) is null)
            fitted++;
        double u = new Budget(frequency.Terms).StandardUncertainty;
        HarmonicLevels? levels = HarmonicLevels.Fit(job.Waveform.Samples, f, u, fitted);
        if (levels is null && fitted > seen)
            levels = HarmonicLevels.Fit(job.Waveform.Samples, f, u, fitted = seen);
        if (levels is null)
        {
            RefuseAll(job, wanted, "colliding", "two harmonics cannot be told apart in this record; capture more cycles or change the sample rate");
            return;
        }
        var lines = new HarmonicLines(job, levels, new HarmonicCounts(wanted, seen, fitted, (int)cycles));
        IReadOnlyList<Reading> written = new HarmonicReport(lines).Write();
        new DistortionReport(lines).Write();
        new NoiseReport(lines).Write();
        new FoldingFindings(lines).Write();
        new HarmonicFindings(job, lines.RollOff, written).Write();
    }

    internal static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);

    private static void RefuseAll(WaveformJob job, int wanted, string code, string reason)
    {
        job.Sheet.Refuse(code, reason, Quantities.FundamentalLevel, Quantities.FundamentalPower);
        for (int k = 2; k <= wanted; k++)
            job.Sheet.Refuse(code, reason, Quantities.Harmonic(k));
        job.Sheet.Refuse(code, reason, Quantities.WorstHarmonic, Quantities.Thd, Quantities.ThdR, Quantities.Sinad, Quantities.Enob, Quantities.Sfdr, Quantities.NoiseFloor);
    }
}
