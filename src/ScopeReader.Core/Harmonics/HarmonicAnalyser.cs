using System.Globalization;
using ScopeReader.Frequency;
using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>Fundamental and harmonics of a waveform: levels, the worst of them, and total harmonic distortion.</summary>
/// <remarks>
/// <para>Level: 20 log10(A_k/A_1), amplitudes by a joint fit (see <see cref="HarmonicLevels"/>). THD_F = √(Σ A_k²)/A_1 and
/// THD_R = THD_F/√(1 + THD_F²), over the harmonics of the plan.</para>
/// <para>A harmonic that noise alone would show in one record of a hundred is not given a level but that bound.</para>
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
        double cycles = frequency.CyclesPerSample * count;
        if (cycles < FewestCycles)
        {
            RefuseAll(job, wanted, "too-few-cycles", Text($"the record holds {cycles:F1} cycles, and harmonics need {FewestCycles}; capture more cycles"));
            return;
        }
        int seen = Math.Min(wanted, HarmonicLevels.InBand(frequency.CyclesPerSample, count));
        if (seen < 1 || count < FewestSamplesAnUnknown * 2 * seen)
        {
            RefuseAll(job, wanted, "too-few-samples", Text($"{count} samples are too few for a fit of {seen} harmonics; sample faster or longer"));
            return;
        }
        if (HarmonicLevels.Fit(job.Waveform.Samples, frequency.CyclesPerSample, new Budget(frequency.Terms).StandardUncertainty, seen) is not { } levels)
        {
            RefuseAll(job, wanted, "colliding", "two harmonics cannot be told apart in this record; capture more cycles or change the sample rate");
            return;
        }
        new HarmonicReport(job, levels, wanted, seen, (int)cycles).Write();
    }

    internal static string Text(FormattableString text) => text.ToString(CultureInfo.InvariantCulture);

    private static void RefuseAll(WaveformJob job, int wanted, string code, string reason)
    {
        job.Sheet.Refuse(code, reason, Quantities.FundamentalLevel, Quantities.FundamentalPower);
        for (int k = 2; k <= wanted; k++)
            job.Sheet.Refuse(code, reason, Quantities.Harmonic(k));
        job.Sheet.Refuse(code, reason, Quantities.WorstHarmonic, Quantities.Thd, Quantities.ThdR);
    }
}
