using ScopeReader.Readings;
using static ScopeReader.Harmonics.HarmonicAnalyser;

namespace ScopeReader.Harmonics;

/// <summary>Writes the harmonics of one waveform down.</summary>
internal sealed class HarmonicReport
{
    private readonly WaveformJob _job;
    private readonly HarmonicLevels _levels;
    private readonly HarmonicLevel[] _harmonics;
    private readonly int _wanted, _seen, _cycles;
    private readonly RollOff _rollOff;

    public HarmonicReport(WaveformJob job, HarmonicLevels levels, int wanted, int seen, int cycles)
    {
        (_job, _levels, _wanted, _seen, _cycles) = (job, levels, wanted, seen, cycles);
        _harmonics = [.. Enumerable.Range(1, seen).Select(k => levels[k])];
        _rollOff = new RollOff(job.Plan.Chain, job.Waveform.Axis.IsTimed ? levels.Frequency / job.Waveform.Interval : null);
    }

    private HarmonicLevel Fundamental => _harmonics[0];

    // Of nine harmonics of noise alone one passes its own threshold in nine records of a hundred: what is said of all of them asks for more.
    private bool AnyStandsOut => _harmonics.Skip(1).Any(h => h.Fitted > h.ThresholdAmong(_seen - 1));

    public void Write()
    {
        WriteFundamental();
        var written = new List<Reading>();
        for (int k = 2; k <= _wanted; k++)
            if (k > _seen)
                _job.Sheet.Refuse("above-nyquist", AboveNyquist(k), Quantities.Harmonic(k));
            else if (Harmonic(_harmonics[k - 1], Quantities.Harmonic(k)) is { } reading)
                written.Add(reading);
        foreach (Reading reading in written)
            _job.Sheet.Add(reading);
        WriteWorst(written);
        WriteDistortion();
        new HarmonicFindings(_job, _rollOff, written).Write();
    }

    private void WriteFundamental()
    {
        if (_job.Waveform.Unit != "V")
        {
            string unit = _job.Waveform.Unit.Length == 0 ? "no unit" : "the unit " + _job.Waveform.Unit;
            _job.Sheet.Refuse("not-volts", $"the channel has {unit}, and this level is one of a voltage", Quantities.FundamentalLevel, Quantities.FundamentalPower);
            return;
        }
        double volts = Fundamental.Amplitude / Math.Sqrt(2);
        Budget budget = _job.Chain.ForAbsoluteDecibels([.. Fundamental.Terms(), .. _rollOff.Terms(1), Frequency(1)]);
        Add(Quantities.FundamentalLevel, Decibels.OfAmplitudes(volts), budget);
        if (_job.Plan.Chain.Impedance is { } ohms)
            Add(Quantities.FundamentalPower, Decibels.DbmOfVolts(volts, ohms), budget);
        else
            _job.Sheet.Refuse("no-impedance", "a voltage has no dBm without an impedance; add impedance to [chain]", Quantities.FundamentalPower);
    }

    private Reading? Harmonic(HarmonicLevel line, Quantity quantity)
    {
        if (!line.IsResolved)
        {
            Hide(line, quantity);
            return null;
        }
        Budget budget = _job.Chain.ForRelativeDecibels([.. line.Terms(), .. Fundamental.Terms(" of fundamental"), .. _rollOff.Terms(line.Order), Frequency(line.Order)]);
        return new Reading(quantity, Decibels.OfAmplitudes(line.Amplitude / Fundamental.Amplitude), "dBc", budget, Method) { Count = _cycles };
    }

    private void Hide(HarmonicLevel line, Quantity quantity)
    {
        double bound = Decibels.OfAmplitudes(line.Threshold / Fundamental.Amplitude);
        string code = line.IsHiddenBySteps ? "quantisation" : "below-noise", reason = line.IsHiddenBySteps
            ? Text($"< {bound:F1} dBc: not resolved from the converter's steps, for no noise spreads them; use more of the range, or more bits")
            : Text($"< {bound:F1} dBc: noise alone shows as much in one record of a hundred; capture longer");
        // The bound holds at the source only where the chain's flatness is known.
        if (_job.Plan.Chain.FlatnessDb is { } flatness)
            _job.Sheet.RefuseBelow(code, reason, bound + flatness, quantity);
        else
            _job.Sheet.Refuse(code, reason, quantity);
    }

    private string AboveNyquist(int order) => _job.Waveform.Axis.IsTimed
        ? Text($"harmonic {order} lies above half of the sample rate; sample at {Engineering.Format(2.2 * order * _levels.Frequency / _job.Waveform.Interval, "Sa/s", 2)} or more")
        : Text($"harmonic {order} lies above half of the sample rate; take {2.2 * order:F0} samples or more a period");

    private void WriteWorst(List<Reading> written)
    {
        if (AnyStandsOut && written.MaxBy(r => r.Value) is { } worst)
            _job.Sheet.Add(new Reading(Quantities.WorstHarmonic, worst.Value, "dBc", worst.Budget, Method) { Count = _cycles, Note = $"{worst.Quantity.Id}, of harmonics 2 to {_seen}" });
        else if (_seen < 2)
            _job.Sheet.Refuse("above-nyquist", AboveNyquist(2), Quantities.WorstHarmonic);
        else
        {
            double bound = Decibels.OfAmplitudes(_harmonics.Skip(1).Max(h => h.ThresholdAmong(_seen - 1)) / Fundamental.Amplitude);
            _job.Sheet.Refuse("below-noise", Text($"< {bound:F1} dBc: noise alone shows as much in the strongest of harmonics 2 to {_seen}, in one record of a hundred; capture longer"), Quantities.WorstHarmonic);
        }
    }

    private void WriteDistortion()
    {
        if (_seen < _wanted)
        {
            _job.Sheet.Refuse("above-nyquist", Beyond(), Quantities.Thd, Quantities.ThdR);
            return;
        }
        ReadOnlySpan<HarmonicLevel> harmonics = _harmonics.AsSpan(1);
        double power = 0, noise = 0, steps = 0, most = 0, degreesOfFreedom = double.PositiveInfinity;
        foreach (HarmonicLevel h in harmonics)
        {
            double variance = h.Noise * h.Noise;
            // Each fitted square holds 2u² of noise on average, which is taken off; what is left scatters by 2Au and 2u².
            power += h.Fitted * h.Fitted - 2 * variance;
            noise += 4 * h.Fitted * h.Fitted * variance;
            steps += Math.Pow(2 * h.Fitted * h.Steps, 2) + Math.Pow(2 * h.Fitted * h.Folded, 2);
            most += h.Threshold * h.Threshold;
            degreesOfFreedom = Math.Min(degreesOfFreedom, h.DegreesOfFreedom);
        }
        if (!AnyStandsOut || power <= 0)
        {
            double bound = 100 * Math.Sqrt(most) / Fundamental.Amplitude;
            _job.Sheet.Refuse("below-noise", $"< {Engineering.Format(bound, "%", 2)}: none of harmonics 2 to {_wanted} stands out of the noise; capture longer", Quantities.Thd, Quantities.ThdR);
            return;
        }
        double decibels = Decibels.PerRelativeAmplitude / (2 * power), thd = Math.Sqrt(power) / Fundamental.Amplitude;
        Budget budget = _job.Chain.ForRelativeDecibels(
            [
                BudgetTerm.Normal("noise", Math.Sqrt(noise), decibels, degreesOfFreedom),
                BudgetTerm.Normal("quantisation", Math.Sqrt(steps), decibels),
                .. Fundamental.Terms(" of fundamental"),
                .. _rollOff.Terms(Strongest()),
                Frequency(Strongest()),
            ]);
        // From dB to parts: d(thd) = thd · ln 10/20 · dB; THD_R changes with THD_F by (1 + THD_F²)^(-3/2).
        Budget parts = budget.Times(100 * thd / Decibels.PerRelativeAmplitude);
        Add(Quantities.Thd, 100 * thd, parts, Text($"harmonics 2 to {_wanted}"));
        Add(Quantities.ThdR, 100 * Distortion.ToWhole(thd), parts.Times(Math.Pow(1 + thd * thd, -1.5)), Text($"harmonics 2 to {_wanted}"));
    }

    private int Strongest() => _harmonics.Skip(1).MaxBy(h => h.Fitted)!.Order;

    private string Beyond() =>
        Text($"thd counts harmonics 2 to {_wanted}, and {_seen + 1} and above lie beyond half of the sample rate; sample faster, or set harmonics = {Math.Max(2, _seen)} in [levels]");

    // Over the record the wave is off the fitted one by up to x cycles at a harmonic: its level reads low by π²x²/6.
    private BudgetTerm Frequency(int order)
    {
        double x = 2 * order * _levels.FrequencyUncertainty * _job.Waveform.Count;
        return BudgetTerm.Rectangular("frequency", Math.PI * Math.PI * x * x / 6, Decibels.PerRelativeAmplitude);
    }

    private void Add(Quantity quantity, double value, Budget budget, string? note = null) =>
        _job.Sheet.Add(new Reading(quantity, value, quantity.Unit, budget, Method) { Count = _cycles, Note = note });
}
