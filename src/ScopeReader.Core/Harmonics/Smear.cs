using ScopeReader.Frequency;
using ScopeReader.Readings;
using static ScopeReader.Harmonics.HarmonicAnalyser;

namespace ScopeReader.Harmonics;

/// <summary>What a wave that is not steady does to its lines: a phase that wanders by x cycles smears harmonic k, a level that moves leaves a mean.</summary>
/// <remarks>
/// The fitted amplitude is that of the mean phasor: with phases within ±2πkx of it, at most (2πkx)²/2 is lost. What a level does to
/// the ratio of two lines is not known; that the harmonic's moves with the fundamental's by half as much again bounds it here.
/// </remarks>
/// <param name="PhaseCycles">x of the fundamental, cycles.</param>
/// <param name="AmplitudeRange">Largest less smallest amplitude over their mean.</param>
internal readonly record struct Smear(double PhaseCycles, double AmplitudeRange)
{
    private const double MostLost = 0.1, MostRange = 0.2;

    /// <summary>The smear of a record.</summary>
    public static Smear Of(WaveFitness fitness) =>
        fitness.Steadiness is { } found ? new Smear(found.PhaseExcursion, found.AmplitudeRange) : default;

    /// <summary>Why a record has no harmonics that mean anything; null where it has.</summary>
    public static string? Refusal(WaveFitness fitness)
    {
        if (fitness.Steadiness is not { } found)
            return null;
        Smear smear = Of(fitness);
        const string Remedy = "capture a shorter stretch in which it holds still";
        return found.Kind is SteadinessKind.NotPeriodic ? "the record is not one periodic wave, and harmonics are multiples of one frequency"
            : found.Kind is SteadinessKind.Interrupted ? Text($"the wave is absent for {100 * found.Absent:F0} % of the record; {Remedy}")
            : smear.Lost(1) > MostLost ? Text($"the wave's phase wanders by {found.PhaseExcursion:G2} cycles, which smears its lines; {Remedy}")
            : smear.AmplitudeRange > MostRange ? Text($"the wave's amplitude moves by {100 * found.AmplitudeRange:F0} % through the record; {Remedy}")
            : null;
    }

    /// <summary>True where too much of a harmonic may be lost for a number.</summary>
    public bool Blurs(int order) => Lost(order) > MostLost;

    /// <summary>The term of a level, dB; none for a steady wave.</summary>
    public IEnumerable<BudgetTerm> Terms(int order)
    {
        double share = Lost(order) + (order > 1 ? AmplitudeRange / 2 : 0);
        if (share > 0)
            yield return BudgetTerm.Rectangular("unsteady wave", share, Decibels.PerRelativeAmplitude);
    }

    private double Lost(int order) => Math.Pow(2 * Math.PI * order * PhaseCycles, 2) / 2;
}
