using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>The lines of one waveform's spectrum, as the reports share them: harmonics, and what is none.</summary>
internal sealed class HarmonicLines
{
    private const int HighestFolded = 1000, SamplesAnOrder = 100;
    private const double StrongestFolded = 2;

    public HarmonicLines(WaveformJob job, HarmonicLevels levels, HarmonicCounts counts)
    {
        (Job, Levels, Counts) = (job, levels, counts);
        Harmonics = [.. Enumerable.Range(1, counts.Fitted).Select(k => levels[k])];
        double? fundamental = job.Waveform.Axis.IsTimed ? levels.Frequency / job.Waveform.Interval : null;
        RollOff = new RollOff(job.Plan.Chain, fundamental);
        Smear = Smear.Of(job.Fitness);
        Others = [.. levels.Rest.Lines.Select(line => new OtherLine(line, OrderOf(line.Frequency, line.FrequencyUncertainty, line.Amplitude)))];
    }

    public WaveformJob Job { get; }

    public HarmonicLevels Levels { get; }

    public HarmonicCounts Counts { get; }

    /// <summary>Fundamental and harmonics, in order, as far as they were fitted.</summary>
    public IReadOnlyList<HarmonicLevel> Harmonics { get; }

    public HarmonicLevel Fundamental => Harmonics[0];

    /// <summary>Harmonics 2 to the highest that lies in band.</summary>
    public IEnumerable<HarmonicLevel> InBand => Harmonics.Take(Counts.Seen).Skip(1);

    /// <summary>Lines that the fit does not have, the strongest first.</summary>
    public IReadOnlyList<OtherLine> Others { get; }

    public RollOff RollOff { get; }

    public Smear Smear { get; }

    /// <summary>Where a line of the record shows, in words.</summary>
    public string Place(double cyclesPerSample) =>
        Engineering.Format(cyclesPerSample * Job.Chain.FrequencyFactor / Job.Waveform.Interval, Job.Waveform.Axis.FrequencyUnit, 5);

    /// <summary>An amplitude relative to the fundamental's, dBc.</summary>
    public double Dbc(double amplitude) => Decibels.OfAmplitudes(amplitude / Fundamental.Amplitude);

    /// <summary>What the frequency's uncertainty leaves unknown of a harmonic's level.</summary>
    /// <remarks>Over the record the wave is off the fitted one by up to x cycles at a harmonic: its level reads low by π²x²/6.</remarks>
    public BudgetTerm FrequencyTerm(int order)
    {
        double x = 2 * order * Levels.FrequencyUncertainty * Levels.Count;
        return BudgetTerm.Rectangular("frequency", Math.PI * Math.PI * x * x / 6, Decibels.PerRelativeAmplitude);
    }

    /// <summary>The terms of a harmonic's level relative to the fundamental, dB.</summary>
    public IEnumerable<BudgetTerm> Terms(HarmonicLevel line) =>
        [.. line.Terms(), .. Fundamental.Terms(" of fundamental"), .. RollOff.Terms(line.Order), FrequencyTerm(line.Order), .. Smear.Terms(line.Order)];

    // Of so many orders that are tried, one in a hundred or fewer may fit by chance.
    private int? OrderOf(double frequency, double uncertainty, double amplitude)
    {
        double highest = Math.Min(Math.Min(HighestFolded, Levels.Count / SamplesAnOrder), StrongestFolded * Fundamental.Fitted / amplitude);
        return Folding.Order(frequency, 3 * uncertainty + 0.3 / Levels.Count, Levels.Frequency, Levels.FrequencyUncertainty, Counts.Fitted + 1, (int)highest);
    }
}
