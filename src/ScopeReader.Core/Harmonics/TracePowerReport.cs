using ScopeReader.Captures;
using ScopeReader.Readings;
using static ScopeReader.Harmonics.HarmonicAnalyser;

namespace ScopeReader.Harmonics;

/// <summary>Writes channel power and noise density of a trace down, or why not.</summary>
/// <remarks>
/// The resolution filter counts as Gaussian; four synchronously tuned poles have 0.25 dB more noise bandwidth, which bounds the
/// error. What a trace averages decides how far its noise reads low: 2.51 dB for levels, 1.05 for voltages, nothing for power.
/// Unless the file says, a trace whose noise scatters as a single sweep's does is not averaged, and for any other the middle of 0
/// and 2.51 dB is added with half of it as bound. A peak detector's noise has no such figure and is refused.
/// </remarks>
internal sealed class TracePowerReport(TraceLevels levels, SpectrumTrace trace, Plan plan, ReadingSheet sheet)
{
    private const string Method = "trace-power";

    // Unaveraged noise has 1 average by its scatter; a median of a hundred points or more stays below this.
    private const double Unaveraged = 1.6;
    private const double NoNoise = 1e6;
    private const int FewPoles = 4;

    private readonly ChainErrors _chain = new(plan, null);

    public void Write(int from)
    {
        TraceNoise noise = levels.Floor(from);
        new OccupiedBandReport(levels, trace, _chain, sheet).Write(from, noise);
        Quantity[] powers = [Quantities.ChannelPower, Quantities.NoiseDensity];
        if (trace.ResolutionBandwidth is not { } filter)
            sheet.Refuse("no-resolution-bandwidth", "the file states no resolution bandwidth, and a power needs the filter's noise bandwidth", powers);
        else if (trace.Averaging == TraceAveraging.Peak)
            sheet.Refuse("peak-detector", "a peak detector reads noise high by an amount that nobody states; save the trace with an rms or sample detector", powers);
        else if (PowerOffset() is not { } offset)
            sheet.Refuse("no-impedance", Text($"the trace is in {trace.Unit}, and a voltage has no power without an impedance; add impedance to [chain]"), powers);
        else
        {
            WriteDensity(noise, filter, offset);
            WriteChannel(from, noise, filter, offset);
        }
    }

    private double? PowerOffset() => levels.Unit == "dBm" ? 0 : plan.Chain.Impedance is { } ohms ? Decibels.DbmOfDbv(0, ohms) : null;

    private static BudgetTerm FilterTerm =>
        BudgetTerm.Rectangular("noise bandwidth of the filter", Decibels.OfPowers(ResolutionFilter.SynchronousNoiseBandwidth(FewPoles) / ResolutionFilter.GaussianNoiseBandwidth));

    // What is added to noise as it stands for its mean power, and how far off that may be, dB.
    private (double Correction, double Bound, string Note) Detector(TraceNoise noise) => trace.Averaging switch
    {
        TraceAveraging.Power => (0, 0, "power averaging"),
        TraceAveraging.Voltage => (NoiseAveraging.OfVoltages, 0, Text($"voltage averaging, {NoiseAveraging.OfVoltages:F2} dB added")),
        TraceAveraging.Level => (NoiseAveraging.OfLevels, 0, Text($"averaging of levels, {NoiseAveraging.OfLevels:F2} dB added")),
        _ when noise.Averages < Unaveraged => (0, 0, "not averaged, by its scatter"),
        // The cases are its ends rather than its middle, and 95 % of a rectangle would leave them out.
        _ => (NoiseAveraging.OfLevels / 2, NoiseAveraging.OfLevels / 2 / 0.95, Text($"averaging not stated: {NoiseAveraging.OfLevels / 2:F2} dB added, ± as much")),
    };

    // Averaged levels are their own mean; a power's mean is that of the powers.
    private double Mean(TraceNoise noise) => trace.Averaging is TraceAveraging.Level or TraceAveraging.Voltage ? noise.MeanLevelDb : noise.MeanDb;

    private void WriteDensity(TraceNoise noise, double filter, double offset)
    {
        if (noise.Averages > NoNoise)
        {
            sheet.Refuse("no-noise", "the trace's floor does not scatter: there is no noise on it", Quantities.NoiseDensity);
            return;
        }
        (double correction, double bound, string note) = Detector(noise);
        double value = Mean(noise) + offset + correction - Decibels.OfPowers(filter * ResolutionFilter.GaussianNoiseBandwidth);
        Budget budget = _chain.ForAbsoluteDecibels([NoiseTerm(noise, filter), FilterTerm, .. Bounded("detector", bound)]);
        sheet.Add(new Reading(Quantities.NoiseDensity, value, "dBm/Hz", budget, "trace-noise") { Note = $"of the whole trace, its lines left out; {note}" });
    }

    // Points closer than the filter's width share their noise.
    private BudgetTerm NoiseTerm(TraceNoise noise, double filter) =>
        BudgetTerm.Normal("noise", Decibels.PerRelativeAmplitude / 2 / Math.Sqrt(Math.Max(1, noise.Points * Math.Min(1, levels.Spacing / filter) * noise.Averages)));

    private void WriteChannel(int from, TraceNoise noise, double filter, double offset)
    {
        if (levels.TooCoarse(filter) is { } coarse)
        {
            sheet.Refuse("point-spacing", coarse, Quantities.ChannelPower);
            return;
        }
        ReadOnlySpan<double> part = levels.Levels[from..];
        double total = ChannelPower.Decibel(part, levels.Spacing, filter * ResolutionFilter.GaussianNoiseBandwidth);
        double noisePart = Math.Min(1, part.Length * Decibels.PowerRatio(noise.MeanDb - total) * levels.Spacing / (filter * ResolutionFilter.GaussianNoiseBandwidth));
        (double correction, double bound, string note) = Detector(noise);
        // Only the noise in it reads low.
        double added = Decibels.OfPowers(1 + noisePart * (Decibels.PowerRatio(correction) - 1)), most = Decibels.OfPowers(1 + noisePart * (Decibels.PowerRatio(correction + bound) - 1)) - added;
        TraceNoise whole = noise with { Points = part.Length };
        Budget budget = _chain.ForAbsoluteDecibels([NoiseTerm(whole, filter).Times(noisePart), FilterTerm, .. Bounded("detector", most), .. levels.Strongest() is { } line ? line.LevelTerms.Select(t => t.Times(1 - noisePart)) : []]);
        sheet.Add(new Reading(Quantities.ChannelPower, total + offset + added, "dBm", budget, Method)
        {
            Note = $"of {Engineering.Format(levels.Frequency(from), "Hz", 4)} to {Engineering.Format(levels.Stop, "Hz", 4)}{(noisePart > 0.05 ? "; " + note : "")}",
        });
    }

    private static BudgetTerm[] Bounded(string name, double half) => half > 0 ? [BudgetTerm.Rectangular(name, half)] : [];
}
