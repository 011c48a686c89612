using System.Globalization;
using ScopeReader.Readings;

namespace ScopeReader.Frequency;

/// <summary>What an unsteady record means for its frequency: a finding, a term of the budget, or a reason to refuse.</summary>
public static class SteadinessFindings
{
    /// <summary>The code of the finding, and of the refusal.</summary>
    public const string Code = "not-one-steady-tone";

    // Above this share of the wave a second tone takes the edges over for a while in each beat.
    private const double MostSecondTone = 0.6;

    /// <summary>Why the record has no one frequency; null where it has.</summary>
    internal static string? WhyNone(WaveformJob job, Steadiness found) => found switch
    {
        { Kind: SteadinessKind.NotPeriodic } => "the record is not one steady tone: no one period describes it from start to end (a sweep, hopping, or noise); capture the source while it stands still, or a shorter record",
        { Kind: SteadinessKind.SecondTone, SecondToneRatio: > MostSecondTone } => string.Create(CultureInfo.InvariantCulture,
            $"the record is not one steady tone: a second one at {Place(job, found)} has {found.SecondToneRatio:P0} of the first one's amplitude; filter one of them out, or look at a spectrum"),
        _ => null,
    };

    /// <summary>The term that an unsteady record adds to a frequency; null for none.</summary>
    /// <param name="found">What was found.</param>
    /// <param name="frequency">Cycles per sample.</param>
    /// <param name="count">Samples in the record.</param>
    /// <remarks>
    /// Half-width: the largest distance of a part's frequency from the mean, so that the interval holds every frequency the source
    /// had; and what a phase that stays within ±ψ can do to a regression over the record, 3ψ/N. A second tone of ratio r turns
    /// the phase by asin r at most; d cycles a record from the nearest harmonic it can do 6ψ/(πd) at most.
    /// </remarks>
    internal static BudgetTerm? Term(Steadiness found, double frequency, int count)
    {
        double turned = Math.Asin(Math.Min(1, found.SecondToneRatio)) / (2 * Math.PI), order = Math.Round(found.SecondTone / frequency);
        double beats = Math.Max(1, Math.Abs(found.SecondTone - order * frequency) * count);
        double half = Math.Max(found.FrequencyExcursion * frequency, Math.Max(3 * found.PhaseExcursion, Math.Min(3, 6 / (Math.PI * beats)) * turned) / count);
        return half > 0 ? BudgetTerm.Rectangular("unsteadiness", half) : null;
    }

    /// <summary>Writes down in which way the record is unsteady.</summary>
    internal static void Write(WaveformJob job, Steadiness found)
    {
        string? text = found.Kind switch
        {
            SteadinessKind.Drifting => string.Create(CultureInfo.InvariantCulture,
                $"the frequency drifts by {Ppm(found.Drift)} over the record; the reading is its mean and the interval holds the whole drift: let the source warm up, or take a shorter record"),
            SteadinessKind.PhaseModulated => string.Create(CultureInfo.InvariantCulture,
                $"the phase goes to and fro by up to {360 * found.PhaseExcursion:G3}°, and the frequency with it by up to {Ppm(found.FrequencyExcursion)}: the source is modulated or wanders, or the digitiser's clock does; compare with a steady reference on the same instrument"),
            SteadinessKind.AmplitudeModulated => string.Create(CultureInfo.InvariantCulture,
                $"the amplitude of its parts differs by {found.AmplitudeRange:P1}: the source is modulated, starts up, or another lies close to it; levels and harmonics are means over that"),
            SteadinessKind.Modulated => string.Create(CultureInfo.InvariantCulture,
                $"lines lie {Apart(job, found.Modulation)} above and below it, with {found.SecondToneRatio:P1} of its amplitude together: it is modulated at that frequency; look for it on the supply"),
            SteadinessKind.Interrupted => string.Create(CultureInfo.InvariantCulture,
                $"the wave is absent from about {found.Absent:P0} of the record: a burst, a gated source or a bad contact; readings describe the part in which it is there, so capture that alone"),
            SteadinessKind.SecondTone => string.Create(CultureInfo.InvariantCulture,
                $"a line at {Place(job, found)}, {20 * Math.Log10(found.SecondToneRatio):0.0} dB from the strongest harmonic, belongs to no harmonic of the wave: hum, a second source, or an oscillation; switch neighbours off one by one"),
            _ => null,
        };
        if (text is not null)
            job.Sheet.Add(new Finding(Code, "not one steady tone: " + text, Word(found.Kind)));
    }

    private static string Word(SteadinessKind kind) => kind switch
    {
        SteadinessKind.Drifting => "drifting",
        SteadinessKind.PhaseModulated => "phase-modulated",
        SteadinessKind.AmplitudeModulated => "amplitude-modulated",
        SteadinessKind.Modulated => "modulated",
        SteadinessKind.Interrupted => "interrupted",
        _ => "second-tone",
    };

    private static string Place(WaveformJob job, Steadiness found) => Apart(job, found.SecondTone);

    private static string Apart(WaveformJob job, double cyclesPerSample) =>
        Engineering.Format(cyclesPerSample * job.Chain.FrequencyFactor / job.Waveform.Interval, job.Waveform.Axis.FrequencyUnit, 4);

    private static string Ppm(double relative) => string.Create(CultureInfo.InvariantCulture, $"{relative * 1e6:G3} ppm");
}
