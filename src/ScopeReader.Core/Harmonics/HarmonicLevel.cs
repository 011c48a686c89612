using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>A harmonic as fitted, with what disturbs it; amplitudes are peak, in the samples' unit.</summary>
/// <param name="Order">1 for the fundamental.</param>
/// <param name="Fitted">Amplitude as the fit gives it, noise in it.</param>
/// <param name="Noise">Standard uncertainty by the noise density near it.</param>
/// <param name="DegreesOfFreedom">Of the noise.</param>
/// <param name="Steps">What the converter's steps make there, and what they may make at most.</param>
/// <param name="Leakage">Rms amplitude of what lines outside the fit add to it.</param>
internal sealed record HarmonicLevel(int Order, double Fitted, double Noise, double DegreesOfFreedom, StepError Steps, double Leakage)
{
    // A number is given from 5 u on: noise alone reaches that in one line of 270,000, and the interval in dB is still nearly even.
    private const double Strong = 5, OneSided95 = 1.645;

    /// <summary>The amplitude above which one in a hundred lines of noise alone lies.</summary>
    public double Threshold => ThresholdAmong(1);

    /// <summary>The amplitude above which the strongest of several lines of noise alone lies once in a hundred records.</summary>
    /// <remarks>Powers of noise are spread exponentially: one in a hundred is above ln 100 times their mean, which is twice the square of u.</remarks>
    public double ThresholdAmong(int lines) => Math.Sqrt(2 * Math.Log(100.0 * lines)) * Spread;

    /// <summary>True where the line is strong enough for a number.</summary>
    public bool IsResolved => Fitted > Strong * Spread && !IsHiddenBySteps;

    /// <summary>True where noise alone would seldom show as much.</summary>
    public bool Shows => Fitted > Threshold;

    /// <summary>True where the converter's steps could have made the whole line.</summary>
    public bool IsHiddenBySteps => Fitted <= Steps.Most && Steps.Most > Threshold;

    /// <summary>What the amplitude lies below in 95 records of a hundred, and never under what noise alone shows.</summary>
    public double AtMost => Math.Max(Threshold, Fitted + OneSided95 * Spread) + (IsHiddenBySteps ? Steps.Most : Steps.Likely);

    /// <summary>The amplitude, what noise adds to it on average taken off (Rice 1944: the mean square is A² + 2u², one u² of it in phase).</summary>
    public double Amplitude => Math.Sqrt(Math.Max(Fitted * Fitted - Noise * Noise, Fitted * Fitted / 4));

    private double Spread => double.Hypot(Noise, Leakage);

    /// <summary>The terms of its level in dB.</summary>
    public IEnumerable<BudgetTerm> Terms(string suffix = "")
    {
        double decibels = Decibels.PerRelativeAmplitude / Amplitude;
        yield return BudgetTerm.Normal("noise" + suffix, Noise, decibels, DegreesOfFreedom);
        if (Steps.Likely > 0)
            yield return BudgetTerm.Rectangular("quantisation" + suffix, Steps.Likely, decibels);
        if (Leakage > 0)
            yield return BudgetTerm.Rectangular("other lines" + suffix, Math.Sqrt(3) * Leakage, decibels);
    }
}
