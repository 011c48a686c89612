using ScopeReader.Numerics;
using ScopeReader.Readings;
using static ScopeReader.Harmonics.HarmonicAnalyser;

namespace ScopeReader.Harmonics;

/// <summary>Writes down what stands beside the fundamental: signal to noise and distortion, the strongest other line, the noise floor.</summary>
/// <remarks>
/// SINAD: power of the fundamental over that of all the rest but the mean; ENOB = (SINAD - 1.7609 dB)/6.0206 dB (IEEE Std 1057 and
/// 1241, from memory). Noise floor: σ² of the noise over half of the sample rate, over the fundamental's power A²/2: 4σ²Δt/A² a hertz.
/// </remarks>
internal sealed class NoiseReport(HarmonicLines lines)
{
    private const double OneSided95 = 1.645;

    // Squares of the fundamental's: what arithmetic leaves of the sums of a fit, and of a residual taken sample by sample.
    private const double SumRounding = 1e-14, ResidualRounding = 1e-26;

    // A mean rounding error of this share of a step is left by noise of a third of one.
    private const double SpreadSteps = 0.05;
    // Harmonics of a triangle have 1.5 % of its power.
    private const double MostDistorted = 0.01;
    private const int MostNamed = 5;

    private readonly WaveformJob _job = lines.Job;
    private readonly HarmonicLevels _levels = lines.Levels;
    private readonly double _power = lines.Fundamental.Amplitude * lines.Fundamental.Amplitude / 2;

    public void Write()
    {
        WriteRest();
        WriteStrongest();
        WriteFloor();
        WriteOthers();
    }

    private bool StepsRemain => lines.Fundamental.Steps.Most > SpreadSteps * _levels.Step && _levels.Step > 0;

    private void WriteRest()
    {
        double harmonics = _levels.HarmonicPower, rest = _levels.RestVariance + harmonics;
        if (rest < SumRounding * _power)
        {
            _job.Sheet.Refuse("no-noise", "nothing is left beside the fundamental: the samples look computed, not captured", Quantities.Sinad, Quantities.Enob);
            return;
        }
        NoiseLines noise = _levels.Rest;
        double others = harmonics + noise.Lines.Sum(l => l.Amplitude * l.Amplitude / 2), n = _levels.Count;
        // The mean square of noise scatters by σ²√(2/ν); a line of amplitude A, read together with it, by A·σ√(2/N).
        double own = noise.Variance * Math.Sqrt(2 / (noise.Whiteness * n));
        double square = own * own + 4 * others * noise.Variance / n;
        // Two lines that are some cycles a record apart are not quite orthogonal: their powers do not just add up.
        foreach (HarmonicLevel h in lines.Harmonics.Skip(1))
            square += Math.Pow(h.Fitted * h.Leakage, 2);
        Budget budget = _job.Chain.ForRelativeDecibels(
            [BudgetTerm.Normal("noise", Math.Sqrt(square), Decibels.PerRelativeAmplitude / 2 / rest), .. lines.Fundamental.Terms(" of fundamental"), .. lines.RollOff.Terms(2), lines.FrequencyTerm(1)]);
        double sinad = Decibels.OfPowers(_power / rest);
        Add(Quantities.Sinad, sinad, budget, Text($"over the band to {lines.Place(0.5)}"));
        if (harmonics > MostDistorted * _power)
            _job.Sheet.Refuse("no-sine", "the wave is no sine: its own harmonics would count as a converter's errors", Quantities.Enob);
        else
            Add(Quantities.Enob, Distortion.EffectiveBits(sinad), budget.Times(1 / Distortion.DbPerBit), "of this wave, source and instrument together");
    }

    private void WriteStrongest()
    {
        var found = new List<(string Name, double Amplitude, double U, IReadOnlyList<BudgetTerm> Terms)>();
        foreach (HarmonicLevel h in lines.Harmonics.Skip(1).Where(h => h.IsResolved))
            found.Add((h.Order <= lines.Counts.Seen ? $"harmonic-{h.Order}" : $"harmonic-{h.Order}, folded", h.Amplitude, h.Noise, [.. lines.Terms(h)]));
        foreach (OtherLine other in lines.Others)
            found.Add((other.FoldedOrder is { } order ? $"harmonic-{order}, folded" : $"a line at {lines.Place(other.Line.Frequency)}", other.Line.Amplitude, other.Line.Uncertainty,
                [other.Term, .. lines.Fundamental.Terms(" of fundamental"), .. lines.RollOff.Terms(1)]));
        found.Sort((a, b) => b.Amplitude.CompareTo(a.Amplitude));
        double hidden = lines.InBand.Where(h => !h.IsResolved).Select(h => h.AtMost).DefaultIfEmpty(0).Max();
        if (found.Count == 0)
        {
            double bound = -lines.Dbc(Math.Max(hidden, _levels.Rest.Threshold));
            string reason = lines.InBand.Any(h => h.IsHiddenBySteps)
                ? Text($"> {bound:F1} dB: not resolved: quantisation: no noise spreads the converter's steps, and no line stands out of what they may make")
                : Text($"> {bound:F1} dB: no other line stands out of the noise; capture longer");
            if (_job.Plan.Chain.FlatnessDb is { } flatness)
                _job.Sheet.RefuseAbove("below-noise", reason, bound - flatness, Quantities.Sfdr);
            else
                _job.Sheet.Refuse("below-noise", reason, Quantities.Sfdr);
            return;
        }
        double largest = found[0].Amplitude, next = found.Skip(1).Select(l => l.Amplitude + OneSided95 * l.U).Append(hidden).Max();
        Budget budget = _job.Chain.ForRelativeDecibels(found[0].Terms);
        if (next > largest)
            budget = budget.With(BudgetTerm.Rectangular("choice of the strongest", Decibels.OfAmplitudes(next / largest)));
        Add(Quantities.Sfdr, -lines.Dbc(largest), budget, found[0].Name);
    }

    private void WriteFloor()
    {
        NoiseFloor noise = _levels.Floor;
        if (!_job.Waveform.Axis.IsTimed)
        {
            _job.Sheet.Refuse("no-interval", "the file states no sample interval, and a density needs one; give it with --interval or --rate", Quantities.NoiseFloor);
            return;
        }
        double density = 2 * noise.Variance * _job.Waveform.Interval / _job.Chain.FrequencyFactor;
        if (noise.Variance < ResidualRounding * _power || StepsRemain)
        {
            _job.Sheet.Refuse(StepsRemain ? "quantisation" : "no-noise", StepsRemain
                ? Text($"not resolved: quantisation: the converter's steps, not noise, leave {Decibels.OfPowers(density / _power):F1} dBc/Hz; add half a step of noise, or more bits")
                : "there is no noise: the samples look computed, not captured", Quantities.NoiseFloor);
            return;
        }
        Budget budget = _job.Chain.ForRelativeDecibels(
            [BudgetTerm.Normal("noise", Math.Sqrt(2 / noise.DegreesOfFreedom), Decibels.PerRelativeAmplitude / 2), .. lines.Fundamental.Terms(" of fundamental"), .. lines.RollOff.Terms(2)]);
        Add(Quantities.NoiseFloor, Decibels.OfPowers(density / _power), budget, Text($"mean over the band to {lines.Place(0.5)}, lines left out"));
    }

    private void WriteOthers()
    {
        OtherLine[] spurs = [.. lines.Others.Where(l => l.FoldedOrder is null)];
        if (spurs.Length == 0)
            return;
        string named = string.Join(", ", spurs.Take(MostNamed).Select(s => Text($"{lines.Place(s.Line.Frequency)} ({lines.Dbc(s.Line.Amplitude):F1} dBc)")));
        string more = spurs.Length > MostNamed ? Text($" and {spurs.Length - MostNamed} weaker") : "";
        string why = StepsRemain
            ? "the converter's steps may make them, for no noise spreads those"
            : "another source, a supply or a mixing product; see whether they stay when this source is off";
        _job.Sheet.Add(new Finding("spurs", Text($"{(spurs.Length == 1 ? "a line that is no harmonic" : "lines that are no harmonics")}: {named}{more}: {why}"), "spurs"));
    }

    private void Add(Quantity quantity, double value, Budget budget, string note) =>
        _job.Sheet.Add(new Reading(quantity, value, quantity.Unit, budget, Method) { Count = lines.Counts.Cycles, Note = note });
}
