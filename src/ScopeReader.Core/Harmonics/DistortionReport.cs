using ScopeReader.Readings;
using static ScopeReader.Harmonics.HarmonicAnalyser;

namespace ScopeReader.Harmonics;

/// <summary>Writes total harmonic distortion down.</summary>
/// <remarks>Each fitted square holds 2u² of noise on average, which is taken off; what is left scatters by 2Au and 2u².</remarks>
internal sealed class DistortionReport(HarmonicLines lines)
{
    // As for one harmonic: a sum is a number where it is five times its uncertainty, in amplitude.
    private const double MostRelative = 0.2, OneSided99 = 2.326;

    private readonly WaveformJob _job = lines.Job;
    private readonly HarmonicCounts _counts = lines.Counts;

    public void Write()
    {
        if (_counts.Seen < _counts.Wanted)
        {
            _job.Sheet.Refuse("above-nyquist", Beyond(), Quantities.Thd, Quantities.ThdR);
            return;
        }
        double power = 0, noise = 0, alone = 0, steps = 0, most = 0, leakage = 0, degreesOfFreedom = double.PositiveInfinity;
        foreach (HarmonicLevel h in lines.InBand)
        {
            double variance = h.Noise * h.Noise;
            power += h.Fitted * h.Fitted - 2 * variance;
            noise += 4 * h.Fitted * h.Fitted * variance;
            alone += 8 * variance * variance;
            leakage += Math.Pow(2 * h.Fitted * h.Leakage, 2);
            steps += 2 * h.Fitted * h.Steps.Likely;
            most += h.Steps.Most * h.Steps.Most;
            degreesOfFreedom = Math.Min(degreesOfFreedom, h.DegreesOfFreedom);
        }
        bool stands = lines.InBand.Any(h => h.IsResolved) && power > 0 && Math.Sqrt(noise + leakage) < 2 * MostRelative * power && steps < 2 * MostRelative * power;
        if (!stands)
        {
            // χ² of so many cosines and sines, or the sum that was found and what noise may hide of it; and steps on top.
            double bound = 100 * Math.Sqrt(Math.Max(power, 0) + OneSided99 * Math.Sqrt(Math.Max(noise, alone)) + most) / lines.Fundamental.Amplitude;
            bool hidden = lines.InBand.Any(h => h.IsHiddenBySteps);
            string why = hidden ? "not resolved: quantisation: no noise spreads the converter's steps" : Text($"harmonics 2 to {_counts.Wanted} together do not stand out of the noise enough for a number; capture longer");
            foreach (Quantity quantity in (ReadOnlySpan<Quantity>)[Quantities.Thd, Quantities.ThdR])
                if (_job.Plan.Chain.FlatnessDb is { } flatness)
                    _job.Sheet.RefuseBelow(hidden ? "quantisation" : "below-noise", $"< {Engineering.Format(bound, "%", 2)}: {why}", bound * Decibels.AmplitudeRatio(flatness), quantity);
                else
                    _job.Sheet.Refuse(hidden ? "quantisation" : "below-noise", $"< {Engineering.Format(bound, "%", 2)}: {why}", quantity);
            return;
        }
        double decibels = Decibels.PerRelativeAmplitude / (2 * power), thd = Math.Sqrt(power) / lines.Fundamental.Amplitude;
        int strongest = lines.InBand.MaxBy(h => h.Fitted)!.Order;
        Budget budget = _job.Chain.ForRelativeDecibels(
            [
                BudgetTerm.Normal("noise", Math.Sqrt(noise), decibels, degreesOfFreedom),
                .. steps > 0 ? [BudgetTerm.Rectangular("quantisation", steps, decibels)] : (BudgetTerm[])[],
                .. leakage > 0 ? [BudgetTerm.Normal("other lines", Math.Sqrt(leakage), decibels)] : (BudgetTerm[])[],
                .. lines.Fundamental.Terms(" of fundamental"),
                .. lines.RollOff.Terms(strongest),
                lines.FrequencyTerm(strongest),
                .. lines.Smear.Terms(strongest),
            ]);
        // From dB to parts: d(thd) = thd · ln 10/20 · dB; THD_R changes with THD_F by (1 + THD_F²)^(-3/2).
        Budget parts = budget.Times(100 * thd / Decibels.PerRelativeAmplitude);
        Add(Quantities.Thd, 100 * thd, parts);
        Add(Quantities.ThdR, 100 * Distortion.ToWhole(thd), parts.Times(Math.Pow(1 + thd * thd, -1.5)));
    }

    private string Beyond() =>
        Text($"thd counts harmonics 2 to {_counts.Wanted}, and {_counts.Seen + 1} and above lie beyond half of the sample rate; sample faster, or set harmonics = {Math.Max(2, _counts.Seen)} in [levels]");

    private void Add(Quantity quantity, double value, Budget budget) =>
        _job.Sheet.Add(new Reading(quantity, value, quantity.Unit, budget, Method) { Count = _counts.Cycles, Note = Text($"harmonics 2 to {_counts.Wanted}") });
}
