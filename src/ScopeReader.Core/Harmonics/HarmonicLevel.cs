using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>A harmonic as fitted, with what disturbs it; amplitudes are peak, in the samples' unit.</summary>
/// <param name="Order">1 for the fundamental.</param>
/// <param name="Fitted">Amplitude as the fit gives it, noise in it.</param>
/// <param name="Noise">Standard uncertainty by the noise density near it.</param>
/// <param name="DegreesOfFreedom">Of the noise.</param>
/// <param name="Steps">Standard uncertainty by lines that the converter's steps make where no noise spreads them.</param>
/// <param name="Folded">Rms amplitude of what folds onto it from above half of the sample rate.</param>
internal sealed record HarmonicLevel(int Order, double Fitted, double Noise, double DegreesOfFreedom, double Steps, double Folded)
{
    /// <summary>The amplitude above which one in a hundred lines of noise alone lies.</summary>
    public double Threshold => ThresholdAmong(1);

    /// <summary>The amplitude above which the strongest of several lines of noise alone lies once in a hundred records.</summary>
    /// <remarks>Powers of noise are spread exponentially: one in a hundred is above ln 100 times their mean, which is twice the square of u.</remarks>
    public double ThresholdAmong(int lines) => Math.Sqrt(2 * Math.Log(100.0 * lines)) * double.Hypot(Noise, Steps);

    public bool IsResolved => Fitted > Threshold;

    /// <summary>True where the converter's steps, not noise, set the threshold.</summary>
    public bool IsHiddenBySteps => Steps > Noise;

    /// <summary>The amplitude, what noise adds to it on average taken off (Rice 1944: the mean square is A² + 2u², one u² of it in phase).</summary>
    public double Amplitude => Math.Sqrt(Math.Max(Fitted * Fitted - Noise * Noise, Fitted * Fitted / 4));

    /// <summary>The terms of its level in dB.</summary>
    public IEnumerable<BudgetTerm> Terms(string suffix = "")
    {
        double decibels = Decibels.PerRelativeAmplitude / Amplitude;
        yield return BudgetTerm.Normal("noise" + suffix, Noise, decibels, DegreesOfFreedom);
        if (Steps > 0)
            yield return BudgetTerm.Normal("quantisation" + suffix, Steps, decibels);
        if (Folded > 0)
            yield return BudgetTerm.Rectangular("folding" + suffix, Math.Sqrt(3) * Folded, decibels);
    }
}
