using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>Harmonics of an ideal pulse train, from its Fourier series: what is the shape of a wave and no distortion of it.</summary>
public static class IdealPulse
{
    /// <summary>Level of a harmonic of a rectangular wave: A_k ∝ |sin(πkd)|/k.</summary>
    /// <param name="dutyFactor">d, above 0 and below 1.</param>
    /// <param name="harmonic">k, 1 or more.</param>
    /// <returns>dBc; minus infinity where the wave does not have it.</returns>
    public static double LevelDbc(double dutyFactor, int harmonic) =>
        Decibels.OfAmplitudes(Math.Abs(Math.Sin(Math.PI * harmonic * dutyFactor) / (harmonic * Math.Sin(Math.PI * dutyFactor))));

    /// <summary>The same with straight edges of equal duration, the width taken at half height: each harmonic times sinc(k·t/T).</summary>
    /// <param name="dutyFactor">d, above 0 and below 1.</param>
    /// <param name="edge">Duration of an edge from 0 to 100 %, over the period.</param>
    /// <param name="harmonic">k, 1 or more.</param>
    /// <returns>dBc.</returns>
    public static double TrapezoidLevelDbc(double dutyFactor, double edge, int harmonic) =>
        LevelDbc(dutyFactor, harmonic) + Decibels.OfAmplitudes(Math.Abs(Sinc(harmonic * edge) / Sinc(edge)));

    /// <summary>What Gaussian edges take off a harmonic relative to the fundamental: exp(-2π²(k² - 1)s²).</summary>
    /// <param name="edgeSigma">s, standard deviation of the edge over the period: its 10 to 90 % duration over 2.5631.</param>
    /// <param name="harmonic">k, 1 or more.</param>
    /// <returns>dB, 0 or less.</returns>
    public static double GaussianEdgeDb(double edgeSigma, int harmonic) =>
        -Decibels.PerRelativeAmplitude * 2 * Math.PI * Math.PI * ((double)harmonic * harmonic - 1) * edgeSigma * edgeSigma;

    /// <summary>The same with Gaussian edges of their own durations, the width taken at half height.</summary>
    /// <param name="dutyFactor">d, above 0 and below 1.</param>
    /// <param name="riseSigma">Standard deviation of the rising edge over the period.</param>
    /// <param name="fallSigma">Standard deviation of the falling edge over the period.</param>
    /// <param name="harmonic">k, 1 or more.</param>
    /// <returns>dBc: of c_k ∝ (g_r - g_f e^(-2πikd))/k with g = exp(-2π²k²s²).</returns>
    public static double EdgedLevelDbc(double dutyFactor, double riseSigma, double fallSigma, int harmonic) =>
        Decibels.OfAmplitudes(Edged(dutyFactor, riseSigma, fallSigma, harmonic) / Edged(dutyFactor, riseSigma, fallSigma, 1));

    /// <summary>How far from one half a duty factor is that gives a second harmonic of a level: 20 log|cos πd|, solved.</summary>
    /// <param name="secondDbc">Level of the second harmonic, 0 dBc or less.</param>
    /// <returns>|d - 1/2|; the level does not say on which side.</returns>
    public static double DutyDeviation(double secondDbc) => Math.Asin(Decibels.AmplitudeRatio(secondDbc)) / Math.PI;

    private static double Edged(double duty, double riseSigma, double fallSigma, int k)
    {
        double rise = Math.Exp(-2 * Math.PI * Math.PI * k * k * riseSigma * riseSigma), fall = Math.Exp(-2 * Math.PI * Math.PI * k * k * fallSigma * fallSigma);
        // |g_r - g_f e^(-2ix)|² with x = πkd, written so that nothing cancels where the edges are alike.
        double s = Math.Sin(Math.PI * k * duty);
        return Math.Sqrt((rise - fall) * (rise - fall) + 4 * rise * fall * s * s) / k;
    }

    private static double Sinc(double x) => x == 0 ? 1 : Math.Sin(Math.PI * x) / (Math.PI * x);
}
