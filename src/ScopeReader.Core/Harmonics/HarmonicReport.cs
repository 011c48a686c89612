using ScopeReader.Readings;
using static ScopeReader.Harmonics.HarmonicAnalyser;

namespace ScopeReader.Harmonics;

/// <summary>Writes the fundamental, each harmonic and the worst of them down.</summary>
internal sealed class HarmonicReport(HarmonicLines lines)
{
    private const double OneSided95 = 1.645;

    private readonly WaveformJob _job = lines.Job;
    private readonly HarmonicCounts _counts = lines.Counts;
    private readonly ExpectedPulse? _pulse = ExpectedPulse.Of(lines.Job);

    public IReadOnlyList<Reading> Write()
    {
        WriteFundamental();
        var written = new List<Reading>();
        for (int k = 2; k <= _counts.Wanted; k++)
            if (k > _counts.Seen)
                _job.Sheet.Refuse("above-nyquist", AboveNyquist(k), Quantities.Harmonic(k));
            else if (Harmonic(lines.Harmonics[k - 1], Quantities.Harmonic(k)) is { } reading)
                written.Add(reading);
        foreach (Reading reading in written)
            _job.Sheet.Add(reading);
        WriteWorst(written);
        return written;
    }

    private void WriteFundamental()
    {
        if (_job.Waveform.Unit != "V")
        {
            string unit = _job.Waveform.Unit.Length == 0 ? "no unit" : "the unit " + _job.Waveform.Unit;
            _job.Sheet.Refuse("not-volts", $"the channel has {unit}, and this level is one of a voltage", Quantities.FundamentalLevel, Quantities.FundamentalPower);
            return;
        }
        double volts = lines.Fundamental.Amplitude / Math.Sqrt(2);
        Budget budget = _job.Chain.ForAbsoluteDecibels([.. lines.Fundamental.Terms(), .. lines.RollOff.Terms(1), lines.FrequencyTerm(1), .. lines.Smear.Terms(1)]);
        Add(Quantities.FundamentalLevel, Decibels.OfAmplitudes(volts), budget);
        if (_job.Plan.Chain.Impedance is { } ohms)
            Add(Quantities.FundamentalPower, Decibels.DbmOfVolts(volts, ohms), budget);
        else
            _job.Sheet.Refuse("no-impedance", "a voltage has no dBm without an impedance; add impedance to [chain]", Quantities.FundamentalPower);
    }

    private Reading? Harmonic(HarmonicLevel line, Quantity quantity)
    {
        if (lines.Smear.Blurs(line.Order))
        {
            _job.Sheet.Refuse("unsteady", Text($"the wave's phase wanders by {line.Order * lines.Smear.PhaseCycles:G2} cycles of this harmonic, which smears it; capture a shorter stretch"), quantity);
            return null;
        }
        if (line.IsResolved)
            return new Reading(quantity, lines.Dbc(line.Amplitude), "dBc", _job.Chain.ForRelativeDecibels(lines.Terms(line)), Method)
            {
                Count = _counts.Cycles,
                Expected = _pulse?.LevelDbc(line.Order),
            };
        double bound = lines.Dbc(line.AtMost);
        string code = line.IsHiddenBySteps ? "quantisation" : "below-noise", reason = line.IsHiddenBySteps
            ? Text($"< {bound:F1} dBc: not resolved: quantisation: no noise spreads the converter's steps, which may make as much; use more of the range, more bits, or add noise")
            : line.Shows
            ? Text($"< {bound:F1} dBc: a line shows, too near the noise for a number; capture longer")
            : Text($"< {bound:F1} dBc: noise alone shows as much in one record of a hundred; capture longer");
        // The bound holds at the source only where the chain's flatness is known.
        if (_job.Plan.Chain.FlatnessDb is { } flatness)
            _job.Sheet.RefuseBelow(code, reason, bound + flatness, quantity);
        else
            _job.Sheet.Refuse(code, reason, quantity);
        return null;
    }

    private string AboveNyquist(int order)
    {
        string how = _job.Waveform.Axis.IsTimed
            ? Text($"sample at {Engineering.Format(2.2 * order * lines.Levels.Frequency / _job.Waveform.Interval, "Sa/s", 2)} or more")
            : Text($"take {2.2 * order:F0} samples or more a period");
        if (order <= _counts.Fitted && lines.Harmonics[order - 1] is { IsResolved: true } folded)
            return Text($"harmonic {order} lies above half of the sample rate; where sampling folds it to, {lines.Place(Folding.Apparent(order * lines.Levels.Frequency, 1))}, stands a line of {lines.Dbc(folded.Amplitude):F1} dBc; {how}");
        if (Folding.Collision(lines.Levels.Frequency, lines.Levels.Count, order, _counts.Wanted) is { } other)
            return Text($"harmonic {order} lies above half of the sample rate, and sampling folds it onto {(other == 0 ? "the mean" : other == order ? "half of the sample rate, where only one of its two phases shows" : other == 1 ? "the fundamental" : Text($"harmonic {other}"))}; {how}");
        return Text($"harmonic {order} lies above half of the sample rate; {how}");
    }

    private void WriteWorst(List<Reading> written)
    {
        if (_counts.Seen < 2)
        {
            _job.Sheet.Refuse("above-nyquist", AboveNyquist(2), Quantities.WorstHarmonic);
            return;
        }
        string among = _counts.Seen > 2 ? Text($"of harmonics 2 to {_counts.Seen}") : "the only one in band";
        double hidden = lines.InBand.Where(h => !h.IsResolved).Select(h => lines.Dbc(h.AtMost)).DefaultIfEmpty(double.NegativeInfinity).Max();
        if (written.MaxBy(r => r.Value) is not { } worst)
        {
            double bound = lines.Dbc(lines.InBand.Max(h => Math.Max(h.AtMost, h.ThresholdAmong(_counts.Seen - 1))));
            string reason = lines.InBand.Any(h => h.IsHiddenBySteps)
                ? Text($"< {bound:F1} dBc: not resolved: quantisation, {among}")
                : Text($"< {bound:F1} dBc: noise alone shows as much in the strongest {among}, in one record of a hundred; capture longer");
            _job.Sheet.Refuse(lines.InBand.Any(h => h.IsHiddenBySteps) ? "quantisation" : "below-noise", reason, Quantities.WorstHarmonic);
            return;
        }
        // Where others are as strong within their uncertainty, the largest of them reads high, or one that is hidden is larger.
        double next = written.Where(r => r != worst).Select(r => r.Value + OneSided95 * r.Budget.Repeatability).DefaultIfEmpty(double.NegativeInfinity).Max();
        double excess = Math.Max(0, Math.Max(next, hidden) - worst.Value);
        Budget budget = excess > 0 ? worst.Budget.With(BudgetTerm.Rectangular("choice of the worst", excess)) : worst.Budget;
        _job.Sheet.Add(new Reading(Quantities.WorstHarmonic, worst.Value, "dBc", budget, Method) { Count = _counts.Cycles, Note = $"{worst.Quantity.Id}, {among}" });
    }

    private void Add(Quantity quantity, double value, Budget budget) =>
        _job.Sheet.Add(new Reading(quantity, value, quantity.Unit, budget, Method) { Count = _counts.Cycles });
}
