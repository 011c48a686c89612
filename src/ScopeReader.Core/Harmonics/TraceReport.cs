using ScopeReader.Captures;
using ScopeReader.Readings;
using static ScopeReader.Harmonics.HarmonicAnalyser;

namespace ScopeReader.Harmonics;

/// <summary>Finds the lines of one spectrum trace and writes them down, or why not.</summary>
internal sealed partial class TraceReport(SpectrumTrace trace, Plan plan, ReadingSheet sheet)
{
    private const string Method = "parabola";
    private const double Million = 1e6, NearNominal = 0.01, ShareBetween = 0.01, PpmWorthSaying = 1;
    private const int LongestOrder = 5;

    private readonly ChainErrors _chain = new(plan, null);
    private readonly int _wanted = Math.Clamp(plan.Levels.Harmonics, 2, Quantities.HighestHarmonic);

    public void Write()
    {
        if (TraceLevels.Of(trace) is not { } levels)
        {
            string unit = trace.Unit.Length == 0 ? "no unit" : "the unit " + trace.Unit, expected = $"the trace has {unit}; expected dBm, dBV, dBµV, V or W: name it with units in [import]";
            RefuseAll("unit", expected);
            sheet.Refuse("unit", expected, Quantities.OccupiedBandwidth, Quantities.ChannelPower, Quantities.NoiseDensity);
            return;
        }
        int from = levels.AfterFeedThrough(), top = levels.Highest(Math.Min(from, levels.Count - 2), levels.Count - 2);
        if (levels.Level(top) < levels.Noise(top).Threshold(levels.Count))
        {
            RefuseAll("no-line", "no line stands out of the noise; narrow the resolution bandwidth, or raise the level");
            new TracePowerReport(levels, trace, plan, sheet).Write(from);
            return;
        }
        if (levels.Line(top) is not { } peak)
        {
            RefuseAll("unresolved", Text($"fewer than 3 points lie on the line at {Engineering.Format(levels.Frequency(top), "Hz")}; narrow the span, or take more points"));
            new TracePowerReport(levels, trace, plan, sheet).Write(from);
            return;
        }
        WritePeak(levels, peak);

        int order = Order(levels, peak, from);
        if (order > 1 && FindNear(levels, peak.Frequency / order) is not { } _)
            order = 1;
        double fundamental = peak.Frequency / order;
        new TraceWidthReport(levels, trace.ResolutionBandwidth, _chain, sheet).Write(top, peak);
        new TracePowerReport(levels, trace, plan, sheet).Write(from);
        WriteError(peak, order, levels.Spacing);
        TraceLine? first = order == 1 ? peak : levels.Line(FindNear(levels, fundamental)!.Value);
        if (first is null)
            RefuseHarmonics("unresolved", Text($"fewer than 3 points lie on the fundamental at {Engineering.Format(fundamental, "Hz")}; narrow the span, or take more points"));
        else
            WriteHarmonics(levels, first, fundamental, from);
        WriteSubharmonic(levels, peak, order);
        TraceCombFindings.Write(levels, from, fundamental, peak, Window, sheet);
    }

    private double Window => Math.Max(trace.ResolutionBandwidth ?? 0, 0);

    // Index of the highest point near an expected line where it stands out of the noise; null where none does.
    private int? FindNear(TraceLevels levels, double frequency)
    {
        double reach = Math.Max(Window, 2 * levels.Spacing);
        if (frequency - reach < levels.Start || frequency + reach > levels.Stop)
            return null;
        int from = levels.Nearest(frequency - reach), to = levels.Nearest(frequency + reach), top = levels.Highest(from, to);
        bool isPeak = top > 0 && top < levels.Count - 1 && levels.Level(top) >= levels.Level(top - 1) && levels.Level(top) >= levels.Level(top + 1);
        return isPeak && levels.Level(top) > levels.Noise(top).Threshold(to - from + 1) ? top : null;
    }

    // Which harmonic the strongest line is: by the nominal frequency where the plan has one, else by lines between its own harmonics.
    private int Order(TraceLevels levels, TraceLine peak, int from)
    {
        if (plan.Nominal is { } nominal)
        {
            double order = Math.Round(peak.Frequency / nominal);
            return order is >= 1 and <= 10 && Math.Abs(peak.Frequency / (order * nominal) - 1) < NearNominal ? (int)order : 1;
        }
        for (int order = 2; order <= LongestOrder; order++)
        {
            double between = 0;
            for (int j = 1; j < 3 * order; j++)
                if (j % order != 0 && FindNear(levels, peak.Frequency * j / order) is { } found && found >= from)
                    between += Decibels.PowerRatio(levels.Level(found) - peak.LevelDb);
            if (between > ShareBetween)
                return order;
        }
        return 1;
    }

    private void WritePeak(TraceLevels levels, TraceLine peak)
    {
        double frequency = peak.Frequency * _chain.FrequencyFactor;
        Add(Quantities.PeakFrequency, frequency, "Hz", _chain.ForTime(frequency, peak.FrequencyTerms));
        bool power = levels.Unit == "dBm";
        (Quantity own, Quantity other) = power ? (Quantities.PeakPower, Quantities.PeakLevel) : (Quantities.PeakLevel, Quantities.PeakPower);
        Budget budget = _chain.ForAbsoluteDecibels(peak.LevelTerms);
        sheet.Add(new Reading(own, peak.LevelDb, levels.Unit, budget, Method) { Note = trace.Unit == levels.Unit ? null : $"the file has {trace.Unit}" });
        if (plan.Chain.Impedance is { } ohms)
            sheet.Add(new Reading(other, power ? peak.LevelDb - Decibels.DbmOfDbv(0, ohms) : Decibels.DbmOfDbv(peak.LevelDb, ohms), other.Unit, budget, Method) { Note = $"in {Engineering.Given(ohms, "ohm", 5)}" });
        else
            sheet.Refuse("no-impedance", Text($"the trace is in {trace.Unit}: {own.Id} has its level; add impedance to [chain] for this one"), other);
    }

    private void WriteError(TraceLine peak, int order, double spacing)
    {
        if (plan.Nominal is not { } nominal)
        {
            sheet.Refuse("no-nominal", "no nominal frequency to compare with; add nominal to the plan, or give --nominal", Quantities.FrequencyError);
            return;
        }
        double frequency = peak.Frequency / order * _chain.FrequencyFactor;
        Budget budget = _chain.ForTime(frequency, peak.FrequencyTerms.Select(t => t.Times(1.0 / order))).Times(Million / nominal);
        Add(Quantities.FrequencyError, (frequency - nominal) / nominal * Million, "ppm", budget);
        var own = new Budget(budget.Terms.Where(t => !t.OfChain));
        if (own.ExpandedUncertainty > PpmWorthSaying)
            sheet.Add(new Finding("frequency-from-trace",
                Text($"points {Engineering.Format(spacing, "Hz", 3)} apart give the frequency to ±{Engineering.Format(own.ExpandedUncertainty, "ppm", 2)} at best; for less, capture the waveform or narrow the span"),
                "span"));
    }

    private void RefuseAll(string code, string reason)
    {
        sheet.Refuse(code, reason, Quantities.PeakFrequency, Quantities.PeakPower, Quantities.PeakLevel, Quantities.FrequencyError);
        sheet.Refuse(code, reason, Quantities.Bandwidth3Db, Quantities.Bandwidth6Db, Quantities.Bandwidth60Db);
        RefuseHarmonics(code, reason);
    }

    private void RefuseHarmonics(string code, string reason)
    {
        for (int k = 2; k <= _wanted; k++)
            sheet.Refuse(code, reason, Quantities.Harmonic(k));
        sheet.Refuse(code, reason, Quantities.WorstHarmonic);
    }

    private void Add(Quantity quantity, double value, string unit, Budget budget) => sheet.Add(new Reading(quantity, value, unit, budget, Method));
}
