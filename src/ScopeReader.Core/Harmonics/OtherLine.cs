using ScopeReader.Numerics;
using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>A line in a waveform's spectrum that is none of the fitted harmonics.</summary>
/// <param name="Line">Where and how strong it is.</param>
/// <param name="FoldedOrder">The harmonic above half of the sample rate that sampling would show there; null where none fits.</param>
internal sealed record OtherLine(NoiseLine Line, int? FoldedOrder)
{
    /// <summary>The term of its level in dB.</summary>
    public BudgetTerm Term => BudgetTerm.Normal("noise", Line.Uncertainty, Decibels.PerRelativeAmplitude / Line.Amplitude);
}
