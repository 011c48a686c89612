namespace ScopeReader.Readings;

/// <summary>Levels in decibels and what they stand for. Voltages are rms unless the name says otherwise.</summary>
/// <remarks>dBV: relative to 1 V; dBµV: to 1 µV; dBm: to 1 mW, and of a voltage only in a stated impedance.</remarks>
public static class Decibels
{
    /// <summary>Decibels of a change of an amplitude by a small part of it: 20/ln 10.</summary>
    public const double PerRelativeAmplitude = 8.685889638065035;

    private const double Milliwatt = 1e-3, MicrovoltDbv = -120;

    /// <summary>Level of a ratio of amplitudes, dB.</summary>
    public static double OfAmplitudes(double ratio) => 20 * Math.Log10(ratio);

    /// <summary>Level of a ratio of powers, dB.</summary>
    public static double OfPowers(double ratio) => 10 * Math.Log10(ratio);

    /// <summary>Ratio of amplitudes of a level in dB.</summary>
    public static double AmplitudeRatio(double decibels) => Math.Pow(10, decibels / 20);

    /// <summary>Ratio of powers of a level in dB.</summary>
    public static double PowerRatio(double decibels) => Math.Pow(10, decibels / 10);

    /// <summary>dBm of a voltage in an impedance.</summary>
    /// <param name="volts">Rms, above 0.</param>
    /// <param name="ohms">Above 0.</param>
    public static double DbmOfVolts(double volts, double ohms) => OfPowers(volts * volts / ohms / Milliwatt);

    /// <summary>Volts rms of a power in an impedance.</summary>
    /// <param name="dbm">Power.</param>
    /// <param name="ohms">Above 0.</param>
    public static double VoltsOfDbm(double dbm, double ohms) => Math.Sqrt(PowerRatio(dbm) * Milliwatt * ohms);

    /// <summary>dBm of a power in watts.</summary>
    public static double DbmOfWatts(double watts) => OfPowers(watts / Milliwatt);

    /// <summary>dBm of a level in dBV in an impedance.</summary>
    public static double DbmOfDbv(double dbv, double ohms) => dbv - OfPowers(ohms * Milliwatt);

    /// <summary>dBµV of a power in dBm in an impedance.</summary>
    public static double DbuvOfDbm(double dbm, double ohms) => dbm + OfPowers(ohms * Milliwatt) - MicrovoltDbv;

    /// <summary>dBV of a level in dBµV.</summary>
    public static double DbvOfDbuv(double dbuv) => dbuv + MicrovoltDbv;

    /// <summary>Level of a line alone that was read together with noise of known level, powers subtracted.</summary>
    /// <param name="readDb">Level of line and noise together.</param>
    /// <param name="noiseDb">Mean power of the noise as the same filter shows it, below <paramref name="readDb"/>.</param>
    public static double WithoutNoise(double readDb, double noiseDb) => readDb + OfPowers(1 - PowerRatio(noiseDb - readDb));
}
